import { z } from 'zod'
import { cellSchema, finiteSchema, idSchema, instantSchema, lineSchema, liftSchema, personSchema, reasonSchema, remarksSchema } from '#shared/schemas/common.ts'

/** Quarters of a cell as bits: 1 upper left, 2 upper right, 4 lower left, 8 lower right; 15 is the whole cell. */
export const quartersSchema = z.number().int().min(1).max(15)

export const createPlacementSchema = z.object({
  id: idSchema,
  zoneId: idSchema,
  lift: liftSchema.min(1, 'Fill goes on lift 1 or higher'),
  cells: z.array(z.object({ cell: cellSchema, quarters: quartersSchema })).min(1, 'Choose at least one cell').max(20_000),
  materialId: idSchema,
  happenedAt: instantSchema,
  loads: z.number().int().min(0).max(20_000),
  /** loose volume of one load, cm³ */
  loadVolumeCm3: z.number().int().min(0).max(1e9),
  looseThicknessUm: z.number().int().min(0).max(5_000_000).nullable(),
  machine: lineSchema,
  passes: z.number().int().min(0).max(200).nullable(),
  remarks: remarksSchema,
  /** why fill goes on ground that is not released; asked for with 409 covered_too_early */
  coverReason: reasonSchema.nullable(),
})
export type CreatePlacement = z.infer<typeof createPlacementSchema>

export const placementSchema = z.object({
  id: z.string(),
  number: z.string(),
  zoneId: z.string(),
  lift: z.number(),
  materialId: z.string(),
  materialName: z.string(),
  happenedAt: instantSchema,
  recordedAt: instantSchema,
  recordedBy: personSchema,
  cells: z.array(z.object({ cell: z.number(), quarters: z.number(), volumeCm3: z.number(), coveredEarly: z.boolean() })),
  loads: z.number(),
  loadVolumeCm3: z.number(),
  looseThicknessUm: z.number().nullable(),
  machine: z.string(),
  passes: z.number().nullable(),
  remarks: z.string(),
  geometryCm3: z.number(),
  loadsCm3: z.number(),
  drivingCm3: z.number(),
  /** loads against geometry, percent; null where no loads were given */
  differencePercent: z.number().nullable(),
  differenceFlagged: z.boolean(),
  coverReason: z.string().nullable(),
  voided: z.object({ at: instantSchema, by: personSchema, reason: z.string() }).nullable(),
})
export type Placement = z.infer<typeof placementSchema>
export const placementListSchema = z.object({ placements: z.array(placementSchema) })

export const voidSchema = z.object({ reason: reasonSchema })

export const createInspectionSchema = z.object({
  id: idSchema,
  cells: z.array(cellSchema).min(1, 'Choose at least one cell').max(20_000),
  happenedAt: instantSchema,
  method: z.enum(['proof-roll', 'visual']),
  outcome: z.enum(['accepted', 'not-accepted']),
  remarks: remarksSchema,
})
export const inspectionSchema = createInspectionSchema.extend({ recordedAt: instantSchema, recordedBy: personSchema })
export type CreateInspection = z.infer<typeof createInspectionSchema>

export const createDispositionSchema = z.object({
  id: idSchema,
  lift: liftSchema,
  cells: z.array(cellSchema).min(1, 'Choose at least one cell').max(20_000),
  reason: reasonSchema,
  engineer: z.string().trim().min(3, "Give the engineer's name").max(80),
  document: z.string().trim().min(3, 'Name the document').max(200),
})
export type CreateDisposition = z.infer<typeof createDispositionSchema>

/** What a write to the Ground answers: the revision it made and what it touched. */
export const groundWriteSchema = z.object({ id: z.string(), number: z.string().nullable(), revision: z.number(), cells: z.number(), volume: finiteSchema })
export type GroundWrite = z.infer<typeof groundWriteSchema>
