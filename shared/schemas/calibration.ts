import { z } from 'zod'
import { finiteSchema, idSchema, instantSchema, nameSchema, personSchema, reasonSchema, remarksSchema } from '#shared/schemas/common.ts'
import { lengthUnitSchema, massUnitSchema, volumeUnitSchema } from '#shared/schemas/field-sheet.ts'

const MOST_TRIALS = 12
const readings = z.array(finiteSchema).max(MOST_TRIALS)

/** As shared/domain/calibration.ts; ranges are the calculation's business, which names the field. */
export const calibrationSheetSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('sand-density'), massUnit: massUnitSchema, volumeUnit: volumeUnitSchema, containerVolume: finiteSchema, container: finiteSchema, filled: readings }),
  z.object({ kind: z.literal('cone'), massUnit: massUnitSchema, trials: z.array(z.object({ before: finiteSchema, after: finiteSchema })).max(MOST_TRIALS) }),
  z.object({ kind: z.literal('cylinder'), lengthUnit: lengthUnitSchema, diameters: readings, heights: readings }),
  z.object({ kind: z.literal('balloon'), volumeUnit: volumeUnitSchema, trials: z.array(z.object({ known: finiteSchema, before: finiteSchema, after: finiteSchema })).max(MOST_TRIALS) }),
])

/** POST …/calibrations */
export const createCalibrationSchema = z.object({
  id: idSchema,
  /** the apparatus, cylinder or batch of sand, such as "Cone 2" */
  apparatus: nameSchema,
  sheet: calibrationSheetSchema,
  performedAt: instantSchema,
  /** the last instant it may be used; null where none is set */
  validUntil: instantSchema.nullable(),
  remarks: remarksSchema,
})
export type CreateCalibration = z.infer<typeof createCalibrationSchema>

export const calibrationSchema = createCalibrationSchema.extend({
  /** kg/m³ of sand, g of sand in the cone, cm³ of the cylinder, or percent error of the balloon's indicator */
  value: z.number(),
  spreadPercent: z.number(),
  flags: z.array(z.object({ code: z.string(), message: z.string() })),
  recordedBy: personSchema,
  recordedAt: instantSchema,
  void: z.object({ at: instantSchema, by: z.string(), reason: z.string() }).nullable(),
})
export type Calibration = z.infer<typeof calibrationSchema>
export const calibrationListSchema = z.object({ calibrations: z.array(calibrationSchema) })
export const voidCalibrationSchema = z.object({ reason: reasonSchema })
