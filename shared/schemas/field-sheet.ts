import { z } from 'zod'
import { WALL_CONVENTIONS } from '#shared/domain/wall-offset.ts'
import { finiteSchema, idSchema } from '#shared/schemas/common.ts'

export const fieldMethodSchema = z.enum(['sand-cone', 'nuclear-gauge', 'plain'])

const massUnit = z.enum(['g', 'kg', 'lb'])
const densityUnit = z.enum(['kg/m3', 'g/cm3', 'pcf', 'kN/m3', 'lb/yd3'])
const lengthUnit = z.enum(['mm', 'cm', 'in', 'm', 'ft', 'us-ft'])

/** The correction beside a vertical face, with the sign it is written in (shared/domain/wall-offset.ts). */
const wallOffsetSchema = z.object({ convention: z.enum(WALL_CONVENTIONS), appliedBy: z.enum(['gauge', 'here']), offset: finiteSchema })

/** Raw moisture sheets (shared/domain/field-sheets.ts). Ranges are the reduction's business, which names the field. */
export const moistureSheetSchema = z.discriminatedUnion('method', [
  z.object({ method: z.literal('oven'), massUnit, wetAndTin: finiteSchema, dryAndTin: finiteSchema, tin: finiteSchema }),
  z.object({ method: z.literal('microwave'), massUnit, wetAndTin: finiteSchema, dryAndTin: finiteSchema, tin: finiteSchema }),
  z.object({ method: z.literal('carbide'), readingPercent: finiteSchema }),
  z.object({ method: z.literal('gauge'), densityUnit, moistureDensity: finiteSchema, correctionK: finiteSchema, wall: wallOffsetSchema.optional(), gaugeId: idSchema.optional() }),
  z.object({ method: z.literal('stated'), percent: finiteSchema }),
])

export const rawSheetSchema = z.discriminatedUnion('method', [
  z.object({
    method: z.literal('sand-cone'),
    massUnit,
    apparatusBefore: finiteSchema,
    apparatusAfter: finiteSchema,
    coneAndPlate: finiteSchema,
    densityUnit,
    sandDensity: finiteSchema,
    moistSoil: finiteSchema,
    largestParticle: finiteSchema.optional(),
    lengthUnit: lengthUnit.optional(),
    moisture: moistureSheetSchema,
  }),
  z.object({
    method: z.literal('nuclear-gauge'),
    gaugeId: idSchema.optional(),
    mode: z.enum(['direct-transmission', 'backscatter']),
    lengthUnit,
    rodDepth: finiteSchema,
    densityUnit,
    wetDensity: finiteSchema,
    secondWetDensity: finiteSchema.optional(),
    standardCounts: z
      .object({
        density: finiteSchema,
        moisture: finiteSchema,
        referenceDensity: finiteSchema.optional(),
        referenceMoisture: finiteSchema.optional(),
      })
      .optional(),
    moisture: moistureSheetSchema,
  }),
  z.object({
    method: z.literal('plain'),
    densityUnit,
    densityIs: z.enum(['wet', 'dry']),
    density: finiteSchema,
    moisture: moistureSheetSchema,
  }),
])
