import { z } from 'zod'
import { finiteSchema, idSchema, instantSchema, personSchema, reasonSchema, remarksSchema } from '#shared/schemas/common.ts'
import { createCurveSchema, pairSchema } from '#shared/schemas/lab.ts'

const massUnit = z.enum(['g', 'kg', 'lb'])

/** Moisture of a moulded specimen; a gauge has no say in it. */
const onePointMoistureSchema = z.discriminatedUnion('method', [
  z.object({ method: z.enum(['oven', 'microwave']), massUnit, wetAndTin: finiteSchema, dryAndTin: finiteSchema, tin: finiteSchema }),
  z.object({ method: z.literal('carbide'), readingPercent: finiteSchema }),
  z.object({ method: z.literal('stated'), percent: finiteSchema }),
])

/** As shared/domain/one-point.ts; ranges are the reduction's business, which names the field. */
export const onePointSheetSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('mould'),
    massUnit,
    mouldAndSoil: finiteSchema,
    mould: finiteSchema,
    mouldVolume: finiteSchema,
    volumeUnit: z.enum(['cm3', 'ft3', 'm3']),
    moisture: onePointMoistureSchema,
  }),
  z.object({ kind: z.literal('density'), densityUnit: z.enum(['kg/m3', 'g/cm3', 'pcf', 'kN/m3']), wetDensity: finiteSchema, moisture: onePointMoistureSchema }),
])

/** POST …/one-point-checks */
export const createOnePointSchema = z.object({
  id: idSchema,
  /** the curve in use, that is checked */
  curveId: idSchema,
  /** how the specimen was compacted */
  method: createCurveSchema.shape.method,
  procedure: createCurveSchema.shape.procedure,
  /** the field test the soil was taken at, if any; judged by that curve */
  testId: idSchema.nullable(),
  sheet: onePointSheetSchema,
  sampledAt: instantSchema,
  remarks: remarksSchema,
})
export type CreateOnePoint = z.infer<typeof createOnePointSchema>

const noteSchema = z.object({ code: z.string(), message: z.string() })
const labPointSchema = z.object({ moisture: z.number(), dryDensity: z.number() })

/** As shared/domain/family-of-curves.ts */
export const familyFitSchema = z.discriminatedUnion('ok', [
  z.object({
    ok: z.literal(true),
    on: z.enum(['curve', 'between']),
    members: z.array(z.string()),
    pair: pairSchema,
    shareOfOptimum: z.number(),
    usable: z.boolean(),
    unusable: noteSchema.nullable(),
    warnings: z.array(noteSchema),
    drawn: z.array(labPointSchema),
  }),
  z.object({ ok: z.literal(false), reason: noteSchema, warnings: z.array(noteSchema) }),
])

/** What a check came to, as it was frozen. */
export const onePointResultSchema = z.object({
  family: z.array(z.object({ id: z.string(), code: z.string(), pair: pairSchema })),
  inUse: z.object({ id: z.string(), code: z.string(), pair: pairSchema }),
  fit: familyFitSchema,
  off: z.object({ dryDensity: z.number(), moisture: z.number(), off: z.boolean() }).nullable(),
})
export type OnePointResult = z.infer<typeof onePointResultSchema>

export const onePointCheckSchema = createOnePointSchema.extend({
  number: z.string(),
  materialId: z.string(),
  materialName: z.string(),
  wetDensity: z.number(),
  dryDensity: z.number(),
  moisture: z.number(),
  result: onePointResultSchema,
  test: z.object({ id: z.string(), number: z.string() }).nullable(),
  recordedBy: personSchema,
  recordedAt: instantSchema,
  void: z.object({ at: instantSchema, by: z.string(), reason: z.string() }).nullable(),
})
export type OnePointCheck = z.infer<typeof onePointCheckSchema>
export const onePointListSchema = z.object({ checks: z.array(onePointCheckSchema) })
export const voidOnePointSchema = z.object({ reason: reasonSchema })
