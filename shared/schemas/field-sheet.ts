import { z } from 'zod'
import { WALL_CONVENTIONS } from '#shared/domain/wall-offset.ts'
import { finiteSchema, idSchema } from '#shared/schemas/common.ts'

export const fieldMethodSchema = z.enum(['sand-cone', 'rubber-balloon', 'drive-cylinder', 'nuclear-gauge', 'plain'])

export const SHEET_LIMITS = { weighings: 12, calibrations: 4 } as const

export const massUnitSchema = z.enum(['g', 'kg', 'lb'])
export const densityUnitSchema = z.enum(['kg/m3', 'g/cm3', 'pcf', 'kN/m3', 'lb/yd3'])
export const volumeUnitSchema = z.enum(['cm3', 'L', 'm3', 'in3', 'ft3', 'yd3', 'gal'])
export const lengthUnitSchema = z.enum(['mm', 'cm', 'in', 'm', 'ft', 'us-ft'])

/** The correction beside a vertical face, with the sign it is written in (shared/domain/wall-offset.ts). */
const wallOffsetSchema = z.object({ convention: z.enum(WALL_CONVENTIONS), appliedBy: z.enum(['gauge', 'here']), offset: finiteSchema })

const tinSchema = z.object({ massUnit: massUnitSchema, wetAndTin: finiteSchema, dryAndTin: finiteSchema, tin: finiteSchema, earlier: z.array(finiteSchema).max(SHEET_LIMITS.weighings).optional() })
const calibrationIds = z.array(idSchema).max(SHEET_LIMITS.calibrations).optional()

/** Raw moisture sheets (shared/domain/field-sheets.ts). Ranges are the reduction's business, which names the field. */
export const moistureSheetSchema = z.discriminatedUnion('method', [
  tinSchema.extend({ method: z.literal('oven') }),
  tinSchema.extend({ method: z.literal('microwave') }),
  z.object({ method: z.literal('carbide'), readingPercent: finiteSchema }),
  z.object({ method: z.literal('gauge'), densityUnit: densityUnitSchema, moistureDensity: finiteSchema, correctionK: finiteSchema, wall: wallOffsetSchema.optional(), gaugeId: idSchema.optional() }),
  z.object({ method: z.literal('stated'), percent: finiteSchema }),
])

export const rawSheetSchema = z.discriminatedUnion('method', [
  z.object({
    method: z.literal('sand-cone'),
    massUnit: massUnitSchema,
    apparatusBefore: finiteSchema,
    apparatusAfter: finiteSchema,
    coneAndPlate: finiteSchema,
    densityUnit: densityUnitSchema,
    sandDensity: finiteSchema,
    moistSoil: finiteSchema,
    largestParticle: finiteSchema.optional(),
    lengthUnit: lengthUnitSchema.optional(),
    calibrationIds,
    moisture: moistureSheetSchema,
  }),
  z.object({
    method: z.literal('rubber-balloon'),
    volumeUnit: volumeUnitSchema,
    volumeBefore: finiteSchema,
    volumeAfter: finiteSchema,
    massUnit: massUnitSchema,
    moistSoil: finiteSchema,
    largestParticle: finiteSchema.optional(),
    lengthUnit: lengthUnitSchema,
    calibrationIds,
    moisture: moistureSheetSchema,
  }),
  z.object({
    method: z.literal('drive-cylinder'),
    massUnit: massUnitSchema,
    cylinderAndSoil: finiteSchema,
    cylinder: finiteSchema,
    volumeBy: z.enum(['stated', 'measured']),
    volumeUnit: volumeUnitSchema,
    volume: finiteSchema.optional(),
    lengthUnit: lengthUnitSchema,
    diameter: finiteSchema.optional(),
    height: finiteSchema.optional(),
    largestParticle: finiteSchema.optional(),
    calibrationIds,
    moisture: moistureSheetSchema,
  }),
  z.object({
    method: z.literal('nuclear-gauge'),
    gaugeId: idSchema.optional(),
    mode: z.enum(['direct-transmission', 'backscatter']),
    lengthUnit: lengthUnitSchema,
    rodDepth: finiteSchema,
    densityUnit: densityUnitSchema,
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
    densityUnit: densityUnitSchema,
    densityIs: z.enum(['wet', 'dry']),
    density: finiteSchema,
    moisture: moistureSheetSchema,
  }),
])
