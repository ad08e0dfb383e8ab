import { z } from 'zod'
import { curveApparatusSchema, curveEntrySchema } from '#shared/schemas/curve-entry.ts'
import { finiteSchema, idSchema, instantSchema, lineSchema, nameSchema, percentSchema, reasonSchema } from '#shared/schemas/common.ts'

export const specificGravitySchema = finiteSchema.min(1.5, 'Specific gravity is between 1.5 and 5.5').max(5.5, 'Specific gravity is between 1.5 and 5.5')

export const createMaterialSchema = z.object({
  id: idSchema,
  name: nameSchema,
  source: lineSchema,
  classification: lineSchema,
  /** percent of bank volume */
  swellPercent: finiteSchema.min(0).max(150),
  /** percent of bank volume lost when compacted; negative where it grows */
  shrinkPercent: finiteSchema.min(-60).max(60),
  /** specific gravity of the solids, where it is known; new curves begin with it */
  gs: specificGravitySchema.nullish(),
  gsMeasured: z.boolean().optional(),
})
/** PATCH …/materials/:id: what is left out stays. */
export const updateMaterialSchema = createMaterialSchema.omit({ id: true }).partial()
export type UpdateMaterial = z.infer<typeof updateMaterialSchema>
export const materialSchema = createMaterialSchema.extend({
  gs: z.number().nullable(),
  gsMeasured: z.boolean(),
  /** loose to compacted volume, from swell and shrink */
  looseToCompacted: z.number(),
})
export type CreateMaterial = z.infer<typeof createMaterialSchema>
export const materialListSchema = z.object({ materials: z.array(materialSchema) })
export type Material = z.infer<typeof materialSchema>

/** Compaction curve points: densities kg/m³ (dry), moisture % of dry mass. */
export const curvePointSchema = z.object({
  moisture: finiteSchema.min(0, 'Moisture is not below 0 %').max(200),
  dryDensity: finiteSchema.positive('Dry density is above 0').max(5_000),
})
/** The stones that the mould left out, for the correction of D4718; the sieve follows the curve's method and letter. */
export const coarsePartSchema = z.object({
  /** bulk specific gravity, Gm */
  bulkGravity: finiteSchema.min(1.5, 'Bulk specific gravity is between 1.5 and 6').max(6, 'Bulk specific gravity is between 1.5 and 6'),
  /** moisture of the stones, %; 0 where it is not known */
  moisture: percentSchema,
})
export type CoarsePart = z.infer<typeof coarsePartSchema>

export const createCurveSchema = z.object({
  id: idSchema,
  code: nameSchema,
  materialId: idSchema,
  method: z.enum(['D698', 'T 99', 'D1557', 'T 180']),
  procedure: z.enum(['A', 'B', 'C', 'D']),
  /** taken from `entry` where that is given */
  points: z.array(curvePointSchema).max(40),
  /** the specimens as they were written down */
  entry: curveEntrySchema.nullish(),
  apparatus: curveApparatusSchema.nullish(),
  gs: specificGravitySchema,
  gsMeasured: z.boolean(),
  /** null where the stones are not known: a test with oversize is then refused */
  coarse: coarsePartSchema.nullable().default(null),
  /** the pair the laboratory reported; used only with a reason */
  reported: z
    .object({ maxDryDensity: finiteSchema.positive().max(5_000), optimumMoisture: percentSchema, reason: reasonSchema })
    .nullable(),
  sampledAt: instantSchema,
})
export type CreateCurve = z.infer<typeof createCurveSchema>
/** PUT …/curves/:id: a draft put right, as a whole. */
export const correctCurveSchema = createCurveSchema.omit({ id: true })
export type CorrectCurve = z.infer<typeof correctCurveSchema>
export const withdrawCurveSchema = z.object({ reason: reasonSchema })
export const approveCurveSchema = z.object({
  /** the pair the lead confirms, reported to 0.1 and used so */
  use: z.enum(['spline', 'quadratic', 'cubic', 'reported']),
})
export type CurveUse = z.infer<typeof approveCurveSchema>['use']

export const pairSchema = z.object({ maxDryDensity: z.number(), optimumMoisture: z.number() })
export const curveSchema = createCurveSchema.extend({
  materialName: z.string(),
  status: z.enum(['draft', 'approved', 'superseded', 'withdrawn']),
  entry: curveEntrySchema.nullable(),
  apparatus: curveApparatusSchema.nullable(),
  /** where it departs from its method, or states what does not belong together */
  flags: z.array(z.object({ code: z.string(), message: z.string() })),
  /** why a draft was taken back */
  withdrawReason: z.string().nullable(),
  fit: z.object({
    spline: pairSchema.nullable(),
    quadratic: pairSchema.nullable(),
    cubic: pairSchema.nullable(),
    refusal: z.string().nullable(),
    warnings: z.array(z.object({ code: z.string(), message: z.string() })),
    /** the drawn curve: moisture %, dry density kg/m³ */
    drawn: z.array(z.tuple([z.number(), z.number()])),
  }),
  /** the pair in force: the approved one, or what would be proposed */
  pair: pairSchema.nullable(),
  pairFrom: z.enum(['spline', 'quadratic', 'cubic', 'reported']).nullable(),
  approvedBy: z.string().nullable(),
  approvedAt: instantSchema.nullable(),
  recordedBy: z.string(),
  testsJudged: z.number(),
  /** what took its place, when, who said so and why; null while it is in force */
  superseded: z.object({ by: z.object({ id: z.string(), code: z.string() }), at: instantSchema, who: z.string(), reason: z.string() }).nullable(),
})
export const curveListSchema = z.object({ curves: z.array(curveSchema) })
export type Curve = z.infer<typeof curveSchema>
