import { z } from 'zod'
import { idSchema, instantSchema, personSchema, reasonSchema } from '#shared/schemas/common.ts'
import { outcomeSchema, purposeSchema, verdictSchema } from '#shared/schemas/field-test.ts'

/** Most tests that are judged again at once. */
export const MOST_REJUDGED = 5_000

/** POST …/curves/:id/supersede: which approved curve of the same material takes its place, and why. */
export const supersedeCurveSchema = z.object({ successorId: idSchema, reason: reasonSchema })
export type SupersedeCurve = z.infer<typeof supersedeCurveSchema>

/** GET …/curves/:id/rejudging: by its successor, or by a curve that is only thought of. */
export const rejudgingQuerySchema = z.object({ by: idSchema.optional() })

/** Tests to judge again, each named: nothing is judged that was not seen. */
export const rehearseSchema = z.object({ by: idSchema, tests: z.array(idSchema).min(1, 'Choose at least one test').max(MOST_REJUDGED) })
export type Rehearse = z.infer<typeof rehearseSchema>
export const rejudgeSchema = rehearseSchema.extend({ id: idSchema, reason: reasonSchema })
export type Rejudge = z.infer<typeof rejudgeSchema>

const briefSchema = z.object({
  outcome: outcomeSchema,
  treatedAsFail: z.boolean(),
  near: z.boolean(),
  headline: z.string(),
  rc: z.number(),
  moistureDeviation: z.number(),
})
export type VerdictBrief = z.infer<typeof briefSchema>

export const verdictChangeSchema = z.enum(['to-fail', 'to-suspect', 'to-pass', 'reasons', 'near', 'figures'])
const effectSchema = z.object({
  marks: z.enum(['keep', 'lift', 'make']),
  order: z.enum(['none', 'issue', 'withdraw', 'hand-back', 'stands', 'reword']),
})
export type RejudgeEffectView = z.infer<typeof effectSchema>

/** One test of the old curve, as it is and as it would be. */
export const rejudgedTestSchema = z.object({
  id: z.string(),
  number: z.string(),
  purpose: purposeSchema,
  zoneId: z.string(),
  lift: z.number(),
  cell: z.number(),
  sampledAt: instantSchema,
  /** its chain's result that counts, not put out of force by rework */
  inForce: z.boolean(),
  /** whether the reader may judge it again: the lead the contractor's, the owner's representative the owner's */
  mine: z.boolean(),
  before: briefSchema,
  /** null where it cannot be judged by the new curve; then `refusal` says why */
  after: briefSchema.nullable(),
  refusal: z.string().nullable(),
  change: verdictChangeSchema.nullable(),
  effect: effectSchema.nullable(),
  /** the open order it caused */
  orderNumber: z.string().nullable(),
})
export type RejudgedTest = z.infer<typeof rejudgedTestSchema>

const curveBriefSchema = z.object({ id: z.string(), code: z.string(), maxDryDensity: z.number(), optimumMoisture: z.number() })
export type CurveBrief = z.infer<typeof curveBriefSchema>

export const rejudgingSchema = z.object({
  curve: curveBriefSchema,
  by: curveBriefSchema,
  /** by number */
  tests: z.array(rejudgedTestSchema),
})
export type Rejudging = z.infer<typeof rejudgingSchema>

/** What judging again does, or would do, to the ground. */
export const rejudgeAnswerSchema = z.object({
  revision: z.number(),
  tests: z.array(
    z.object({
      id: z.string(),
      number: z.string(),
      change: verdictChangeSchema,
      effect: effectSchema,
      /** cells it marked anew */
      marked: z.number(),
      /** released cells that it took the basis from */
      revoked: z.number(),
      /** the order issued, joined, withdrawn, handed back or left standing */
      orderId: z.string().nullable(),
      orderNumber: z.string().nullable(),
    }),
  ),
  /** cells that changed their state, by lift and by the state they came to */
  moves: z.array(z.object({ lift: z.number(), from: z.string(), to: z.string(), cells: z.array(z.number()) })),
  /** releases of which cells were revoked */
  releases: z.array(z.object({ number: z.string(), lift: z.number(), cells: z.array(z.number()) })),
})
export type RejudgeAnswer = z.infer<typeof rejudgeAnswerSchema>

/** GET …/tests/:id/verdicts: all of them, the current one last; empty where the test was judged only once. */
export const verdictHistorySchema = z.object({
  verdicts: z.array(
    z.object({
      version: z.number(),
      current: z.boolean(),
      curve: z.object({ id: z.string(), code: z.string() }),
      verdict: verdictSchema,
      marks: z.array(z.object({ kind: z.enum(['fail', 'suspect', 'hold']), cells: z.array(z.number()) })),
      judgedAt: instantSchema,
      judgedBy: personSchema,
      reason: z.string().nullable(),
    }),
  ),
})
export type VerdictHistory = z.infer<typeof verdictHistorySchema>
