import { z } from 'zod'
import { fieldMethodSchema, moistureSheetSchema } from '#shared/schemas/field-sheet.ts'
import { outcomeSchema, purposeSchema, testSummarySchema } from '#shared/schemas/field-test.ts'
import { instantSchema, personSchema } from '#shared/schemas/common.ts'

/** What the register can show and be sorted by; the columns' names on screen, in addresses and in saved views. */
export const REGISTER_KEYS = [
  'number',
  'sampled',
  'zone',
  'lift',
  'cell',
  'lot',
  'purpose',
  'method',
  'moistureMethod',
  'wetDensity',
  'dryDensity',
  'moisture',
  'optimum',
  'deviation',
  'maxDryDensity',
  'curve',
  'material',
  'oversize',
  'rc',
  'rcLimit',
  'saturation',
  'airVoids',
  'outcome',
  'flags',
  'technician',
  'recorded',
] as const
export const registerKeySchema = z.enum(REGISTER_KEYS)
export type RegisterKey = z.infer<typeof registerKeySchema>
export const directionSchema = z.enum(['asc', 'desc'])
export const registerSortSchema = z.strictObject({ key: registerKeySchema, direction: directionSchema })
export type RegisterSort = z.infer<typeof registerSortSchema>
/** Newest first. */
export const USUAL_SORT: RegisterSort = { key: 'sampled', direction: 'desc' }

export const MOISTURE_METHODS = moistureSheetSchema.options.map((option) => option.shape.method.value)
export const moistureMethodSchema = z.enum(MOISTURE_METHODS)

/** Several of a kind: "fail,suspect" in an address, a list in a body. */
const several = <T extends z.ZodType>(one: T) => z.preprocess((value) => (typeof value === 'string' ? value.split(',') : value), z.array(one).min(1).max(20))
/** A whole number of an address; an empty text is none. */
const whole = (highest: number) => z.preprocess((value) => (typeof value === 'string' && /^\d{1,9}$/.test(value) ? Number(value) : value), z.number('Give a whole number').int().min(0).max(highest))
const flagSchema = z.enum(['true', 'false'])
const wordSchema = z.string().min(1).max(80)
/** A working day of the site, as its lots count them (time zone and hour of the cut). */
const daySchema = z.iso.date('Give a day as 2026-12-01')

const filterShape = {
  zoneId: wordSchema,
  lift: whole(500),
  cell: whole(2_000_000),
  lotId: wordSchema,
  outcome: several(outcomeSchema),
  purpose: several(purposeSchema),
  method: fieldMethodSchema,
  moistureMethod: moistureMethodSchema,
  materialId: wordSchema,
  curveId: wordSchema,
  /** who recorded it */
  technicianId: wordSchema,
  /** first and last working day it was sampled on */
  from: daySchema,
  to: daySchema,
  current: flagSchema,
  voided: flagSchema,
  /** by its sheet, or by a gauge that was not good */
  flagged: flagSchema,
  near: flagSchema,
  superseded: flagSchema,
  /** taken after rework of a failing test */
  retest: flagSchema,
  search: z.string().max(40),
}

const daysInOrder = ({ from, to }: { from?: string | undefined; to?: string | undefined }): boolean => from === undefined || to === undefined || from <= to
const DAYS_REVERSED = { path: ['to'], message: 'The last day is before the first' }

const filterObject = z.strictObject(filterShape).partial()
/** What narrows the register; a filter that is not named here is refused, since ignored it would show too much. */
export const testFilterSchema = filterObject.refine(daysInOrder, DAYS_REVERSED)
export type TestFilter = z.infer<typeof testFilterSchema>

export const testQuerySchema = filterObject
  .extend({
    sort: registerKeySchema.default(USUAL_SORT.key),
    direction: directionSchema.default(USUAL_SORT.direction),
    offset: z.coerce.number().int().min(0).max(1e6).default(0),
    limit: z.coerce.number().int().min(1).max(5_000).default(100),
  })
  .refine(daysInOrder, DAYS_REVERSED)
export type TestQuery = z.infer<typeof testQuerySchema>

/** A line of the register: the test with everything a column can show. Densities kg/m³, the rest percent. */
export const registerTestSchema = testSummarySchema.extend({
  followKind: z.enum(['retest', 'rerun']).nullable(),
  lotName: z.string().nullable(),
  moistureMethod: moistureMethodSchema,
  materialId: z.string(),
  materialName: z.string(),
  wetDensity: z.number(),
  /** reference after the oversize correction, as the verdict used it */
  optimum: z.number(),
  maxDryDensity: z.number(),
  oversizePercent: z.number().nullable(),
  oversizeCorrected: z.boolean(),
  /** the minimum compaction it was judged by, as written; null where there is none */
  rcLimit: z.string().nullable(),
  saturation: z.number().nullable(),
  airVoids: z.number(),
  flags: z.array(z.object({ code: z.string(), message: z.string() })),
  recordedAt: instantSchema,
})
export type RegisterTest = z.infer<typeof registerTestSchema>

/** GET /api/sites/:siteId/tests */
export const registerPageSchema = z.object({
  tests: z.array(registerTestSchema),
  /** tests that fit the filter */
  total: z.number(),
  /** tests that fit everything of the filter but its outcomes, by outcome */
  counts: z.object({ pass: z.number(), fail: z.number(), suspect: z.number() }),
})
export type RegisterPage = z.infer<typeof registerPageSchema>

/** GET /api/sites/:siteId/tests/recorders: everybody who recorded a test here, by name. */
export const recorderListSchema = z.object({ people: z.array(personSchema) })
