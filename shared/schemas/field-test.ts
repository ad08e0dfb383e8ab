import { z } from 'zod'
import { criterionSchema, roundingSchema } from '#shared/schemas/criterion.ts'
import { finiteSchema, idSchema, instantSchema, liftSchema, personSchema, reasonSchema, remarksSchema, sitePointSchema } from '#shared/schemas/common.ts'
import { testGaugeSchema } from '#shared/schemas/gauge.ts'
import { fieldMethodSchema, rawSheetSchema } from '#shared/schemas/field-sheet.ts'

export const purposeSchema = z.enum(['required', 'judgement', 'verification', 'referee'])
export type Purpose = z.infer<typeof purposeSchema>
export const outcomeSchema = z.enum(['pass', 'fail', 'suspect'])

/** What a technician sends. The place is a point; its cell is found by the server. */
export const createTestSchema = z.object({
  id: idSchema,
  purpose: purposeSchema,
  /** null for a new test; else the test it follows, after rework (retest) or because the reading is doubted (rerun) */
  follows: z.object({ testId: idSchema, kind: z.enum(['retest', 'rerun']) }).nullable(),
  stakeId: idSchema.nullable(),
  at: sitePointSchema,
  lift: liftSchema.min(1, 'A density test belongs to lift 1 or higher'),
  /** true once the person has confirmed a lift that the elevation does not agree with (409 lift_differs) */
  liftConfirmed: z.boolean(),
  surfaceUm: z.number().int().min(-5e8).max(9e9).nullable(),
  depthUm: z.number().int().min(0).max(3_000_000),
  sampledAt: instantSchema,
  curveId: idSchema,
  oversizePercent: finiteSchema.min(0).max(100).nullable(),
  sheet: rawSheetSchema,
  remarks: remarksSchema,
})
export type CreateTest = z.infer<typeof createTestSchema>

/** What saving would do to the ground, asked for while typing; nothing is stored. */
export const previewTestSchema = createTestSchema.pick({ purpose: true, follows: true, at: true, lift: true, sampledAt: true, curveId: true, oversizePercent: true, sheet: true })
export type PreviewTest = z.infer<typeof previewTestSchema>
export const testPreviewSchema = z.object({
  zoneId: z.string().nullable(),
  cell: z.number().nullable(),
  lotName: z.string().nullable(),
  /** cells that would go to rework, be suspect or be put on hold */
  marks: z.array(z.object({ kind: z.enum(['fail', 'suspect', 'hold']), cells: z.array(z.number()), volumeCm3: z.number() })),
  /** cells that would meet specification */
  meets: z.array(z.number()),
  /** of a test read with a gauge: whether that gauge was good then, as things stand now */
  gauge: testGaugeSchema.nullable(),
})
export type TestPreview = z.infer<typeof testPreviewSchema>

const verdictReasonSchema = z.object({ code: z.string(), message: z.string(), value: z.number(), limit: z.string() })
const noteSchema = z.object({ code: z.string(), message: z.string() })

/** The frozen verdict (shared/domain/verdict-types.ts) as it is stored and shown. */
export const verdictSchema = z.object({
  outcome: outcomeSchema,
  treatedAsFail: z.boolean(),
  near: z.boolean(),
  reasons: z.array(verdictReasonSchema),
  suspicions: z.array(noteSchema.extend({ check: z.string() })),
  advice: z.array(noteSchema),
  rc: z.number(),
  moistureDeviation: z.number(),
  saturation: z.number().nullable(),
  airVoids: z.number(),
  maxDryDensityUsed: z.number(),
  optimumUsed: z.number(),
  gsUsed: z.number(),
  oversizeCorrected: z.boolean(),
  headline: z.string(),
  against: z.object({
    criteria: z.array(criterionSchema),
    rounding: roundingSchema,
    repeatability: z.object({ rc: z.number(), moisture: z.number() }),
    waterDensity: z.number(),
    curve: z.object({
      maxDryDensity: z.number(),
      optimumMoisture: z.number(),
      gs: z.number(),
      gsMeasured: z.boolean(),
      coarse: z.object({ bulkGravity: z.number(), moisture: z.number(), sieve: z.enum(['no-4', '3/8-in', '3/4-in']) }).optional(),
    }),
  }),
})

/** A test as registers and maps need it. */
export const testSummarySchema = z.object({
  id: z.string(),
  number: z.string(),
  seq: z.number(),
  purpose: purposeSchema,
  method: fieldMethodSchema,
  zoneId: z.string(),
  lift: z.number(),
  cell: z.number(),
  lotId: z.string().nullable(),
  easting: z.number(),
  northing: z.number(),
  sampledAt: instantSchema,
  recordedBy: personSchema,
  curveId: z.string(),
  curveCode: z.string(),
  outcome: outcomeSchema,
  treatedAsFail: z.boolean(),
  near: z.boolean(),
  headline: z.string(),
  rc: z.number(),
  moisture: z.number(),
  moistureDeviation: z.number(),
  dryDensity: z.number(),
  /** the last non-void result of its chain */
  current: z.boolean(),
  /** put out of force by rework reported done in its cell */
  superseded: z.boolean(),
  voided: z.boolean(),
  flagged: z.boolean(),
})
export type TestSummary = z.infer<typeof testSummarySchema>
export const testListSchema = z.object({ tests: z.array(testSummarySchema), total: z.number() })

export const testDetailSchema = testSummarySchema.extend({
  follows: z.object({ testId: z.string(), kind: z.enum(['retest', 'rerun']) }).nullable(),
  chain: z.array(z.object({ id: z.string(), number: z.string(), outcome: outcomeSchema, headline: z.string(), rc: z.number(), sampledAt: instantSchema, voided: z.boolean() })),
  stakeLabel: z.string().nullable(),
  surfaceUm: z.number().nullable(),
  depthUm: z.number(),
  recordedAt: instantSchema,
  oversizePercent: z.number().nullable(),
  wetDensity: z.number(),
  sheet: rawSheetSchema,
  remarks: z.string(),
  verdict: verdictSchema,
  flags: z.array(noteSchema),
  marks: z.array(z.object({ kind: z.enum(['fail', 'suspect', 'hold']), cells: z.array(z.number()) })),
  /** cells it speaks for now, with the volume it gives each */
  speaksFor: z.array(z.object({ cell: z.number(), cm3: z.number() })),
  orderId: z.string().nullable(),
  /** the gauge it was read with, as its counts stand now; null for a test without a gauge */
  gauge: testGaugeSchema.nullable(),
  void: z.object({ at: instantSchema, by: personSchema, reason: z.string() }).nullable(),
})
export type TestDetail = z.infer<typeof testDetailSchema>
export const voidTestSchema = z.object({ reason: reasonSchema })

/** POST /api/sites/:siteId/tests: what saving did. */
export const recordTestAnswerSchema = z.object({
  id: z.string(),
  number: z.string(),
  outcome: outcomeSchema,
  headline: z.string(),
  revision: z.number(),
  /** cells it marked */
  marked: z.number(),
  /** the rework order it opened or went back to */
  orderId: z.string().nullable(),
  orderNumber: z.string().nullable(),
})
export type RecordTestAnswer = z.infer<typeof recordTestAnswerSchema>

/** POST /api/sites/:siteId/tests/:id/void */
export const voidTestAnswerSchema = z.object({
  id: z.string(),
  number: z.string(),
  revision: z.number(),
  /** the chain's result that counts now, null when none is left */
  currentId: z.string().nullable(),
})
export type VoidTestAnswer = z.infer<typeof voidTestAnswerSchema>
