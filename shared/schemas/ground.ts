import { z } from 'zod'
import { GROUND_STATES } from '#shared/domain/ground-state.ts'
import { groundTotalsSchema } from '#shared/ground-codec.ts'
import { instantSchema } from '#shared/schemas/common.ts'

export const groundQuerySchema = z.object({
  /** "surface", or an elevation in µm */
  cut: z.union([z.literal('surface'), z.string().regex(/^-?\d{1,12}$/, 'A cut is "surface" or an elevation in µm')]).default('surface'),
})
export const patchesQuerySchema = z.object({ since: z.coerce.number().int().min(0) })

const stateSchema = z.enum(GROUND_STATES)

/** Shares of one lift of one zone, for the lift rail. */
export const liftTotalSchema = z.object({
  zoneId: z.string(),
  lift: z.number(),
  states: z.array(z.object({ state: stateSchema, cells: z.number(), cm3: z.number() })),
})

/** Cells that may receive the next lift. */
export const readyGroupSchema = z.object({
  zoneId: z.string(),
  /** the lift that comes next */
  lift: z.number(),
  cells: z.array(z.number()),
  /** compacted volume of that lift in those cells */
  cm3: z.number(),
  topUm: z.number(),
  thicknessUm: z.number(),
})

/** Cells that may not, by the lowest unresolved layer's reason. */
export const notYetGroupSchema = z.object({
  reason: z.enum(['awaiting-inspection', 'awaiting-test', 'rework', 'awaiting-retest', 'suspect', 'recheck', 'hold', 'awaiting-release', 'awaiting-acceptance', 'partial', 'not-placed', 'at-grade']),
  zoneId: z.string(),
  lift: z.number(),
  cells: z.array(z.number()),
  cm3: z.number(),
  owed: z.number(),
  stakes: z.array(z.string()),
  orderId: z.string().nullable(),
  orderNumber: z.string().nullable(),
  orderState: z.string().nullable(),
  workingSince: instantSchema.nullable(),
  lotId: z.string().nullable(),
  lotName: z.string().nullable(),
  testNumber: z.string().nullable(),
  testId: z.string().nullable(),
  headline: z.string(),
})

/** Everything the panel, rail and title block say, of one revision. */
export const boardSchema = z.object({
  revision: z.number(),
  at: instantSchema,
  totals: groundTotalsSchema,
  lifts: z.array(liftTotalSchema),
  ready: z.array(readyGroupSchema),
  notYet: z.array(notYetGroupSchema),
  zones: z.array(
    z.object({ zoneId: z.string(), designCm3: z.number(), placedCm3: z.number(), releasedCm3: z.number(), lots: z.number(), owed: z.number() }),
  ),
  /** current results that cannot be right and want a re-run */
  doubtful: z.array(z.object({ testId: z.string(), number: z.string(), cell: z.number(), lift: z.number(), headline: z.string() })),
  exceptions: z.array(z.object({ kind: z.enum(['covered-early', 'retest-without-rework', 'voided-failure', 'rejudged-failure', 'override', 'volume-difference', 'hold']), text: z.string(), detail: z.string(), cells: z.array(z.number()), lift: z.number().nullable(), testId: z.string().nullable() })),
  verification: z.object({ tests: z.number(), failing: z.number() }),
})
export type Board = z.infer<typeof boardSchema>

/** One cell's lifts, top down. */
export const columnSchema = z.object({
  revision: z.number(),
  cell: z.number(),
  zoneId: z.string().nullable(),
  ready: z.boolean(),
  nextLift: z.number().nullable(),
  blockedBy: z.object({ lift: z.number(), state: stateSchema, reason: z.string() }).nullable(),
  rows: z.array(
    z.object({
      lift: z.number(),
      bottomUm: z.number(),
      topUm: z.number(),
      state: stateSchema,
      flags: z.number(),
      volumeCm3: z.number(),
      spokenCm3: z.number(),
      lotId: z.string().nullable(),
      lotName: z.string().nullable(),
      lotRequired: z.number(),
      lotOwed: z.number(),
      materialName: z.string().nullable(),
      placedAt: instantSchema.nullable(),
      test: z
        .object({ id: z.string(), number: z.string(), rc: z.number(), moisture: z.number(), moistureDeviation: z.number(), dryDensity: z.number(), outcome: z.enum(['pass', 'fail', 'suspect']), near: z.boolean(), curveId: z.string(), headline: z.string(), purpose: z.enum(['required', 'judgement', 'verification', 'referee']) })
        .nullable(),
      orderId: z.string().nullable(),
      why: z.string(),
    }),
  ),
})
export type Column = z.infer<typeof columnSchema>

/** Patches after a revision; `reset` says: read the sheet again. */
export const patchesSchema = z.object({ reset: z.boolean(), revision: z.number(), patches: z.array(z.base64()) })
export type Patches = z.infer<typeof patchesSchema>
