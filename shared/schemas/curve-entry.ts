import { z } from 'zod'
import { finiteSchema } from '#shared/schemas/common.ts'
import { densityUnitSchema, massUnitSchema, volumeUnitSchema } from '#shared/schemas/field-sheet.ts'

const MOST_SPECIMENS = 40

const specimenMoistureSchema = z.union([
  z.object({ percent: finiteSchema }),
  z.object({ massUnit: massUnitSchema, tins: z.array(z.object({ wetAndTin: finiteSchema, dryAndTin: finiteSchema, tin: finiteSchema })).max(3) }),
])

/** The specimens as the laboratory wrote them down (shared/domain/compaction-specimen.ts); ranges are the reduction's business. */
export const curveEntrySchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('masses'),
    massUnit: massUnitSchema,
    volumeUnit: volumeUnitSchema,
    mould: finiteSchema,
    mouldVolume: finiteSchema,
    specimens: z.array(z.object({ mouldAndSoil: finiteSchema, moisture: specimenMoistureSchema })).max(MOST_SPECIMENS),
  }),
  z.object({ kind: z.literal('wet'), densityUnit: densityUnitSchema, specimens: z.array(z.object({ density: finiteSchema, moisture: specimenMoistureSchema })).max(MOST_SPECIMENS) }),
  z.object({
    kind: z.literal('dry'),
    densityUnit: densityUnitSchema,
    specimens: z.array(z.object({ density: finiteSchema, wetDensity: finiteSchema.optional(), moisture: specimenMoistureSchema })).max(MOST_SPECIMENS),
  }),
])

/** How the specimens were compacted, as far as the report says it. */
export const curveApparatusSchema = z.object({
  /** of D698 and D1557: what their methods take depends on it; 2007 where it is left out */
  edition: z.enum(['2007', '2000']).optional(),
  mould: z.enum(['4-in', '6-in']).nullable().optional(),
  layers: z.number().int().min(1).max(20).nullable(),
  /** blows a layer */
  blows: z.number().int().min(1).max(500).nullable(),
  /** retained on the method's sieve, percent of the dry mass */
  oversizePercent: finiteSchema.min(0, 'Not below 0 %').max(100, 'Not above 100 %').nullable(),
})
