import { z } from 'zod'
import { idSchema, instantSchema, lineSchema, sitePointSchema, TEXT_LIMITS } from '#shared/schemas/common.ts'
import { SHEET_LIMITS } from '#shared/schemas/field-sheet.ts'
import { createTestSchema, outcomeSchema, recordTestAnswerSchema } from '#shared/schemas/field-test.ts'
import { testQuerySchema } from '#shared/schemas/test-register.ts'

/** What one file, one batch of it and one look at it may hold. */
export const EXCHANGE_LIMITS = { fileBytes: 5 * 1024 * 1024, inflatedBytes: 60 * 1024 * 1024, rows: 5_000, columns: 200, batchRows: 100, previewRows: 50, contextRows: 50 } as const

const nameSchema = z.string().trim().min(1).max(TEXT_LIMITS.name)

/** A test as a file tells it: people's names for curve, gauge, stake and calibrations in place of this site's ids. */
export const importTestSchema = createTestSchema.omit({ at: true, stakeId: true, curveId: true, follows: true }).extend({
  /** coordinates in the site's unit, or the middle of a cell */
  place: z.union([sitePointSchema, z.object({ cell: z.string().trim().min(1).max(12) })]),
  stake: z.string().trim().min(1).max(12).nullable(),
  curve: nameSchema,
  /** by its record, or by its number on this site */
  follows: z.object({ kind: z.enum(['retest', 'rerun']), record: idSchema.nullable(), number: z.string().trim().max(40).nullable() }).nullable(),
  gauge: nameSchema.nullable(),
  moistureGauge: nameSchema.nullable(),
  calibrations: z.array(z.object({ apparatus: nameSchema, performedAt: instantSchema })).max(SHEET_LIMITS.calibrations),
})
export type ImportTest = z.infer<typeof importTestSchema>

const importRowSchema = z.object({
  /** line of the file, counted from 1 */
  line: z.number().int().min(1).max(1e6),
  /** what the source calls it; kept with the import, not on the test */
  reference: z.string().max(80),
  /** the file itself names the record, so that it is known again wherever it comes from */
  identified: z.boolean(),
  /** a person says that it is another test than the one recorded at the same place and time */
  another: z.boolean(),
  test: importTestSchema,
})
export type ImportRow = z.infer<typeof importRowSchema>

/** POST /api/sites/:siteId/tests/import/preview. Rows of `context` are looked at for those that follow them, and not reported. */
export const importPreviewSchema = z.object({
  rows: z.array(importRowSchema).min(1).max(EXCHANGE_LIMITS.previewRows),
  context: z.array(importRowSchema).max(EXCHANGE_LIMITS.contextRows),
})
export type ImportPreview = z.infer<typeof importPreviewSchema>

export const rowProblemSchema = z.object({ column: z.string(), message: z.string() })
export type RowProblem = z.infer<typeof rowProblemSchema>

export const previewedRowSchema = z.object({
  line: z.number(),
  id: z.string(),
  /** `recorded`: stands on this site already, the same; `differs`: stands here otherwise; `attention`: something needs a look */
  state: z.enum(['ready', 'attention', 'recorded', 'differs']),
  problems: z.array(rowProblemSchema),
  /** the number of the test on record: the same record's, or that at the same place and time */
  number: z.string().nullable(),
  /** it may be the test of `number`: a person says whether it is another */
  twin: z.boolean(),
  cell: z.number().nullable(),
  verdict: z.object({ outcome: outcomeSchema, treatedAsFail: z.boolean(), near: z.boolean(), headline: z.string(), rc: z.number(), dryDensity: z.number(), moisture: z.number() }).nullable(),
  flags: z.array(z.string()),
})
export type PreviewedRow = z.infer<typeof previewedRowSchema>
export const importPreviewAnswerSchema = z.object({ rows: z.array(previewedRowSchema) })

/** POST /api/sites/:siteId/tests/import: one batch, taken in whole or not at all. */
export const importTestsSchema = z.object({
  /** of the batch; sending it again gets the same answer */
  id: idSchema,
  file: z.object({ name: lineSchema, sha256: z.string().regex(/^[0-9a-f]{64}$/), rows: z.number().int().min(1).max(EXCHANGE_LIMITS.rows) }),
  rows: z.array(importRowSchema).min(1).max(EXCHANGE_LIMITS.batchRows),
  /** lines of the file, in this batch's part of it, that a person set aside */
  setAside: z.array(z.object({ line: z.number().int().min(1).max(1e6), reason: lineSchema })).max(EXCHANGE_LIMITS.rows),
})
export type ImportTests = z.infer<typeof importTestsSchema>

export const importTestsAnswerSchema = z.object({
  id: z.string(),
  revision: z.number(),
  recorded: z.array(recordTestAnswerSchema.pick({ id: true, number: true, outcome: true, headline: true, orderNumber: true }).extend({ line: z.number(), reference: z.string() })),
  /** lines that stood here already and were left as they are */
  already: z.array(z.number()),
})
export type ImportTestsAnswer = z.infer<typeof importTestsAnswerSchema>

export const exportUnitsSchema = z.enum(['as-entered', 'us', 'si'])
export type ExportUnits = z.infer<typeof exportUnitsSchema>

/** GET /api/sites/:siteId/tests/export: the register's own filter and order, and the form of the file. */
export const testExportSchema = testQuerySchema.safeExtend({
  format: z.enum(['csv', 'xlsx']),
  units: exportUnitsSchema.default('as-entered'),
  /** a mark of UTF-8 at the head of a CSV file, without which some spreadsheets misread accents */
  bom: z.enum(['true', 'false']).default('true'),
})
export type TestExport = z.infer<typeof testExportSchema>
