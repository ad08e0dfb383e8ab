import { reduceEntry, type CurveEntry, type SpecimenMoisture } from '#shared/domain/compaction-specimen.ts'
import type { LabPoint } from '#shared/domain/curve-points.ts'
import { parseNumber } from '#web/lib/units.ts'
import { columnsOf, type EntryColumn, type EntryForm, type EntryRow } from './entry-columns.ts'

export const EMPTY_ROW: EntryRow = {}
/** Specimens a curve takes at most, as the API does. */
export const MOST_ROWS = 40

const number = (text: string | undefined): number => {
  const typed = parseNumber(text ?? '')
  return typed.ok ? typed.value : Number.NaN
}
export const isBlank = (row: EntryRow): boolean => Object.values(row).every((text) => text.trim() === '')

function moistureOf({ moistureBy, tinUnit }: EntryForm, row: EntryRow): SpecimenMoisture {
  if (moistureBy === 'stated') return { percent: number(row.moisture?.replace('%', '')) }
  const first = { wetAndTin: number(row.wet1), dryAndTin: number(row.dry1), tin: number(row.tin1) }
  const second = { wetAndTin: number(row.wet2), dryAndTin: number(row.dry2), tin: number(row.tin2) }
  return { massUnit: tinUnit, tins: moistureBy === 'one-tin' ? [first] : [first, second] }
}

/** Rows as they would be sent; what cannot be read is NaN, which the reduction names. */
function entryOf(form: EntryForm, rows: readonly EntryRow[]): CurveEntry {
  switch (form.kind) {
    case 'dry':
      return {
        kind: 'dry',
        densityUnit: form.densityUnit,
        specimens: rows.map((row) => ({ density: number(row.density), moisture: moistureOf(form, row), ...((row.wetDensity ?? '').trim() === '' ? {} : { wetDensity: number(row.wetDensity) }) })),
      }
    case 'wet':
      return { kind: 'wet', densityUnit: form.densityUnit, specimens: rows.map((row) => ({ density: number(row.density), moisture: moistureOf(form, row) })) }
    case 'masses':
      return { kind: 'masses', massUnit: form.massUnit, volumeUnit: form.volumeUnit, mould: number(form.mould), mouldVolume: number(form.mouldVolume), specimens: rows.map((row) => ({ mouldAndSoil: number(row.soil), moisture: moistureOf(form, row) })) }
  }
}

/** The column a field of the reduction is typed in. */
function columnAt(field: string): EntryColumn | null {
  const [, index = '', part = ''] = /tins\.(\d)\.(\w+)$/.exec(field) ?? []
  if (part !== '') return `${{ wetAndTin: 'wet', dryAndTin: 'dry', tin: 'tin' }[part] ?? 'tin'}${Number(index) + 1}` as EntryColumn
  if (field.endsWith('.percent')) return 'moisture'
  if (field.endsWith('.mouldAndSoil')) return 'soil'
  if (field.endsWith('.wetDensity')) return 'wetDensity'
  return field.endsWith('.density') ? 'density' : null
}

export type RowProblem = { readonly column: EntryColumn | null; readonly message: string }

export type ReadEntry = {
  /** blank rows left out */
  readonly entry: CurveEntry
  /** of the rows that can be worked out */
  readonly points: readonly LabPoint[]
  /** what each row comes to; undefined where it is blank or cannot be worked out yet */
  readonly worked: readonly (LabPoint | undefined)[]
  /** beside each row, what keeps it from being a point */
  readonly errors: readonly (RowProblem | undefined)[]
  readonly mouldError: string | undefined
  readonly mouldVolumeError: string | undefined
  readonly flags: readonly string[]
  readonly whole: boolean
}

/** The sheet as typed: what can be worked out of it already, and what is wrong where. */
export function readEntry(form: EntryForm): ReadEntry {
  const filled = form.rows.filter((row) => !isBlank(row))
  const words = new Map(columnsOf(form).map((column) => [column.key, column]))
  const worked: (LabPoint | undefined)[] = []
  const errors = form.rows.map((row): RowProblem | undefined => {
    const one = isBlank(row) ? null : reduceEntry(entryOf(form, [row]))
    worked.push(one?.ok ? one.points[0] : undefined)
    if (one === null || one.ok) return undefined
    const problem = one.problems.find(({ field }) => field.startsWith('specimens.'))
    if (problem === undefined) return undefined
    const column = columnAt(problem.field)
    const unreadable = column !== null && (row[column] ?? '').trim() !== '' && problem.code === 'missing'
    const head = column === null ? '' : `${words.get(column)?.head ?? ''}: `
    const typed = parseNumber(column === null ? '' : (row[column] ?? ''))
    return { column, message: unreadable && !typed.ok ? `${head}${typed.reason}` : problem.message }
  })
  const entry = entryOf(form, filled)
  const all = reduceEntry(entry)
  const at = (field: string) => (all.ok ? undefined : all.problems.find((problem) => problem.field === field)?.message)
  const points = worked.filter((point) => point !== undefined)
  return { entry, points, worked, errors, mouldError: at('mould'), mouldVolumeError: at('mouldVolume'), flags: all.ok ? all.flags.map((flag) => flag.message) : [], whole: all.ok }
}
