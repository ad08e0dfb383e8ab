import { z } from 'zod'
import { LOT_STANDINGS } from '#shared/domain/lot-facts.ts'
import { idSchema, instantSchema } from '#shared/schemas/common.ts'

export const lotStandingSchema = z.enum(LOT_STANDINGS)

export const lotSchema = z.object({
  id: z.string(),
  seq: z.number(),
  /** such as "Pad L10, Dec 1" */
  name: z.string(),
  zoneId: z.string(),
  lift: z.number(),
  materialId: z.string(),
  materialName: z.string(),
  workDay: z.string(),
  specificationVersion: z.number(),
  cells: z.array(z.number()),
  volumeCm3: z.number(),
  spokenCm3: z.number(),
  areaMm2: z.number(),
  /** the volume one test speaks for */
  fCm3: z.number(),
  required: z.number(),
  taken: z.number(),
  passing: z.number(),
  owed: z.number(),
  reruns: z.number(),
  staked: z.number(),
  standing: lotStandingSchema,
  releasedAt: instantSchema.nullable(),
  /** one entry a test's block, by volume: what it stands for and how much it holds */
  blocks: z.array(z.object({ testId: z.string().nullable(), state: z.enum(['meets', 'released', 'rework', 'suspect', 'owed']), cm3: z.number() })),
})
export type Lot = z.infer<typeof lotSchema>
export const lotQuerySchema = z.object({ zoneId: z.string().max(36).optional(), lift: z.coerce.number().int().optional() })
export type LotQuery = z.infer<typeof lotQuerySchema>
export const lotListSchema = z.object({ lots: z.array(lotSchema) })

export const stakeSchema = z.object({
  id: z.string(),
  label: z.string(),
  lotId: z.string(),
  lotName: z.string(),
  zoneId: z.string(),
  lift: z.number(),
  cell: z.number(),
  easting: z.number(),
  northing: z.number(),
  drawnAt: instantSchema,
  drawnBy: z.string(),
})
export type Stake = z.infer<typeof stakeSchema>
export const stakeListSchema = z.object({ stakes: z.array(stakeSchema) })
export const drawStakesSchema = z.object({ id: idSchema, lotId: idSchema })
export type DrawStakes = z.infer<typeof drawStakesSchema>
/** POST /api/sites/:siteId/stakes/draw: the stakes it drew. */
export const drawStakesAnswerSchema = z.object({ id: z.string(), revision: z.number(), stakes: z.array(stakeSchema) })
export type DrawStakesAnswer = z.infer<typeof drawStakesAnswerSchema>

/** GET /api/sites/:siteId/frequency/series: of all zones, or of one. */
export const seriesQuerySchema = z.object({ zoneId: z.string().max(36).optional() })
export type SeriesQuery = z.infer<typeof seriesQuerySchema>

/** Volume placed and volume spoken for, summed up to and with each working day on which either grew; oldest first. */
export const frequencySeriesSchema = z.object({
  days: z.array(z.object({ day: z.iso.date(), placedCm3: z.number().int(), spokenCm3: z.number().int() })),
})
export type FrequencySeries = z.infer<typeof frequencySeriesSchema>
