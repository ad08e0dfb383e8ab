import { z } from 'zod'
import { GAUGE_STATES } from '#shared/domain/gauge-check.ts'
import { STABILITY_COUNTS } from '#shared/domain/standard-count.ts'
import { finiteSchema, idSchema, instantSchema, lineSchema, nameSchema, reasonSchema, remarksSchema } from '#shared/schemas/common.ts'

const daySchema = z.iso.date('Give a date')
const countValueSchema = finiteSchema.positive('A count is above 0').max(10_000_000, 'A count is below 10 million')
export const countPairSchema = z.object({ density: countValueSchema, moisture: countValueSchema })

const calibrationFieldsSchema = countPairSchema.extend({
  id: idSchema,
  calibratedOn: daySchema,
  /** the last day it may be used; null where none is set */
  dueOn: daySchema.nullable(),
})
const dueAfter = ({ calibratedOn, dueOn }: { calibratedOn: string; dueOn: string | null }): boolean => dueOn === null || dueOn >= calibratedOn
export const addCalibrationSchema = calibrationFieldsSchema.refine(dueAfter, { path: ['dueOn'], message: 'Due is not before the calibration itself' })
export type AddCalibration = z.infer<typeof addCalibrationSchema>

export const createGaugeSchema = z.object({
  id: idSchema,
  /** serial number or name, as painted on it */
  serial: nameSchema,
  model: lineSchema,
  leakTestedOn: daySchema.nullable(),
  calibration: addCalibrationSchema,
})
export type CreateGauge = z.infer<typeof createGaugeSchema>

/** undefined leaves, null clears */
export const editGaugeSchema = z.object({ model: lineSchema.optional(), leakTestedOn: daySchema.nullable().optional() })
export type EditGauge = z.infer<typeof editGaugeSchema>

export const recordCountSchema = countPairSchema.extend({
  id: idSchema,
  countedAt: instantSchema,
  /** the five counts of a stability check, where one was made */
  stability: z.array(countPairSchema).length(STABILITY_COUNTS, `A stability check takes ${STABILITY_COUNTS} counts`).nullable(),
  remarks: remarksSchema,
})
export type RecordCount = z.infer<typeof recordCountSchema>
export const voidCountSchema = z.object({ reason: reasonSchema })

export const takeOutSchema = z.object({ id: idSchema, happenedAt: instantSchema, reason: reasonSchema })
export type TakeOut = z.infer<typeof takeOutSchema>
export const putBackSchema = z.object({ happenedAt: instantSchema, remarks: remarksSchema })
export type PutBack = z.infer<typeof putBackSchema>

const moisturePercentSchema = finiteSchema.min(0, 'Moisture is not below 0 %').max(500, 'Moisture is at most 500 %')
export const recordCorrectionSchema = z.object({
  id: idSchema,
  materialId: idSchema,
  /** oven and uncorrected gauge moisture of one place each, percent of dry mass */
  pairs: z.array(z.object({ oven: moisturePercentSchema, gauge: moisturePercentSchema })).min(1, 'Give at least one pair').max(40, 'At most 40 pairs'),
  inForceFrom: instantSchema,
  remarks: remarksSchema,
})
export type RecordCorrection = z.infer<typeof recordCorrectionSchema>
export const withdrawCorrectionSchema = z.object({ reason: reasonSchema })

const withdrawnSchema = z.object({ at: instantSchema, by: z.string(), reason: z.string() })

const referenceSchema = z.object({ from: z.enum(['calibration', 'average']), density: z.number(), moisture: z.number(), days: z.array(z.string()) })
export type CountReferenceView = z.infer<typeof referenceSchema>

export const judgedCountSchema = z.object({
  id: z.string(),
  /** the working day */
  day: z.string(),
  countedAt: instantSchema,
  countedBy: z.string(),
  density: z.number(),
  moisture: z.number(),
  reference: referenceSchema.nullable(),
  good: z.boolean(),
  /** percent of the reference; null where there was none */
  densityPercent: z.number().nullable(),
  moisturePercent: z.number().nullable(),
  densityGood: z.boolean(),
  moistureGood: z.boolean(),
  reasons: z.array(z.string()),
  /** the one that counts for its day */
  stands: z.boolean(),
  stability: z.array(countPairSchema).nullable(),
  remarks: z.string(),
  void: withdrawnSchema.nullable(),
})
export type JudgedCountView = z.infer<typeof judgedCountSchema>

export const gaugeCheckSchema = z.object({
  state: z.enum(GAUGE_STATES),
  message: z.string(),
  day: z.string(),
  reference: referenceSchema.nullable(),
  count: judgedCountSchema.nullable(),
})

/** What is said of the gauge behind a test, worked out as things stand now. */
export const testGaugeSchema = z.object({
  gaugeId: z.string().nullable(),
  serial: z.string().nullable(),
  state: z.enum([...GAUGE_STATES, 'not-named']),
  message: z.string(),
})
export type TestGauge = z.infer<typeof testGaugeSchema>

export const calibrationSchema = calibrationFieldsSchema.extend({ recordedBy: z.string() })
export const outageSchema = z.object({
  id: z.string(),
  from: instantSchema,
  reason: z.string(),
  takenOutBy: z.string(),
  until: instantSchema.nullable(),
  returnedBy: z.string().nullable(),
  returnRemarks: z.string().nullable(),
})
export const correctionSchema = z.object({
  id: z.string(),
  materialId: z.string(),
  materialName: z.string(),
  pairs: z.array(z.object({ oven: z.number(), gauge: z.number(), k: z.number() })),
  k: z.number(),
  least: z.number(),
  greatest: z.number(),
  inForceFrom: instantSchema,
  recordedBy: z.string(),
  remarks: z.string(),
  /** the last of its material that is neither withdrawn nor later than the moment asked about */
  inForce: z.boolean(),
  withdrawn: withdrawnSchema.nullable(),
})
export type GaugeCorrection = z.infer<typeof correctionSchema>

/** A gauge as it stands at a moment. */
export const gaugeSchema = z.object({
  id: z.string(),
  serial: z.string(),
  model: z.string(),
  leakTestedOn: z.string().nullable(),
  /** in force on that day */
  calibration: calibrationSchema.nullable(),
  /** open at that moment */
  outage: outageSchema.nullable(),
  check: gaugeCheckSchema,
  /** in force then, one a material */
  corrections: z.array(correctionSchema),
})
export type Gauge = z.infer<typeof gaugeSchema>
export const gaugeListSchema = z.object({ gauges: z.array(gaugeSchema) })
export const gaugeQuerySchema = z.object({ at: instantSchema.optional() })

export const gaugeDetailSchema = gaugeSchema.extend({
  calibrations: z.array(calibrationSchema),
  outages: z.array(outageSchema),
  /** oldest first */
  counts: z.array(judgedCountSchema),
  /** withdrawn ones too, newest first */
  corrections: z.array(correctionSchema),
})
export type GaugeDetail = z.infer<typeof gaugeDetailSchema>
