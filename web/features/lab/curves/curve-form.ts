import type { CreateCurve } from '#shared/schemas/lab.ts'
import { createCurveSchema } from '#shared/schemas/lab.ts'
import type { Units } from '#web/lib/units.ts'

export type PointRow = { readonly moisture: string; readonly density: string }
export type CurveForm = {
  readonly code: string
  readonly materialId: string
  readonly method: CreateCurve['method']
  readonly procedure: CreateCurve['procedure']
  readonly rows: readonly PointRow[]
  readonly gs: string
  readonly gsMeasured: boolean
  readonly sampledAt: string
  readonly withReported: boolean
  readonly reportedDensity: string
  readonly reportedMoisture: string
  readonly reportedReason: string
  readonly withCoarse: boolean
  readonly coarseGravity: string
  readonly coarseMoisture: string
}

export const EMPTY_ROW: PointRow = { moisture: '', density: '' }

export function emptyCurveForm(materialId: string, sampledAt: string): CurveForm {
  return {
    code: '',
    materialId,
    method: 'D698',
    procedure: 'A',
    rows: Array.from({ length: 5 }, () => EMPTY_ROW),
    gs: '2.70',
    gsMeasured: false,
    sampledAt,
    withReported: false,
    reportedDensity: '',
    reportedMoisture: '',
    reportedReason: '',
    withCoarse: false,
    coarseGravity: '',
    coarseMoisture: '0',
  }
}

const isBlank = ({ moisture, density }: PointRow): boolean => moisture.trim() === '' && density.trim() === ''

export type ReadRows = { readonly points: CreateCurve['points']; readonly errors: readonly (string | undefined)[] }

/** The rows as points, blank ones left out; beside each row what keeps it from being one. */
export function readRows(rows: readonly PointRow[], units: Units): ReadRows {
  const points: { moisture: number; dryDensity: number }[] = []
  const errors = rows.map((row) => {
    if (isBlank(row)) return undefined
    const moisture = units.parse.number(row.moisture)
    const density = units.parse.densityKgM3(row.density)
    if (!moisture.ok) return `Moisture: ${moisture.reason}`
    if (!density.ok) return `Dry unit weight: ${density.reason}`
    points.push({ moisture: moisture.value, dryDensity: density.value })
    return undefined
  })
  return { points, errors }
}

/** Two columns as a spreadsheet gives them: moisture and dry unit weight; lines without two figures, such as heads, are left out. */
export function rowsFromPaste(text: string): PointRow[] {
  return text
    .split(/\r?\n/)
    .map((line) => line.trim().split(/\t|;|\s{1,}|,(?=\s)/).map((part) => part.trim()).filter((part) => part !== ''))
    .flatMap(([moisture = '', density = '']) => (/^[+\-−]?[\d.,]+%?$/.test(moisture) && /^[+\-−]?[\d.,]+$/.test(density) ? [{ moisture: moisture.replace('%', ''), density }] : []))
}

/** Puts pasted rows in from a row on; rows are added as needed. */
export function pasteInto(rows: readonly PointRow[], from: number, pasted: readonly PointRow[]): PointRow[] {
  return [...rows.slice(0, from), ...pasted, ...rows.slice(from + pasted.length)]
}

export type ReadCurve = { readonly ok: true; readonly curve: CreateCurve } | { readonly ok: false; readonly errors: Readonly<Record<string, string>> }

/** What to send, or what is wrong beside each field (by the schema's paths, the first words of each). */
export function readCurveForm(id: string, form: CurveForm, units: Units): ReadCurve {
  const numberOf = (text: string) => {
    const parsed = units.parse.number(text)
    return parsed.ok ? parsed.value : Number.NaN
  }
  const densityOf = (text: string) => {
    const parsed = units.parse.densityKgM3(text)
    return parsed.ok ? parsed.value : Number.NaN
  }
  const rows = readRows(form.rows, units)
  const parsed = createCurveSchema.safeParse({
    id,
    code: form.code,
    materialId: form.materialId,
    method: form.method,
    procedure: form.procedure,
    points: rows.points,
    gs: numberOf(form.gs),
    gsMeasured: form.gsMeasured,
    coarse: form.withCoarse ? { bulkGravity: numberOf(form.coarseGravity), moisture: numberOf(form.coarseMoisture) } : null,
    reported: form.withReported ? { maxDryDensity: densityOf(form.reportedDensity), optimumMoisture: numberOf(form.reportedMoisture), reason: form.reportedReason } : null,
    sampledAt: units.parse.instant(form.sampledAt) ?? '',
  })
  if (parsed.success && rows.errors.every((error) => error === undefined)) return { ok: true, curve: parsed.data }
  const errors: Record<string, string> = {}
  for (const issue of parsed.success ? [] : parsed.error.issues) errors[issue.path.join('.')] ??= issue.message
  if (form.materialId === '') errors.materialId = 'Choose a material'
  return { ok: false, errors }
}
