import { usualUnits, UNIT_GROUPS, type ExchangeUnit, type GroupUnits, type UnitGroup } from '#shared/exchange/exchange-units.ts'
import { provenanceLines } from '#shared/exchange/csv-cell.ts'
import { plainWord } from '#shared/exchange/exchange-words.ts'
import { findHeadLine, matchHeads } from '#shared/exchange/match-heads.ts'
import { guessDecimalMark, type DecimalMark } from '#shared/exchange/read-number.ts'
import type { ReadOptions } from '#shared/exchange/row-reader.ts'
import { guessDateOrder, type DateOrder } from '#shared/exchange/site-time.ts'
import { columnOf, UNIT_COLUMN, type ColumnKey, type RowCells } from '#shared/exchange/test-columns.ts'
import type { Site } from '#shared/schemas/site.ts'
import type { FileHabits } from './keep-import.ts'

export type TableRows = readonly (readonly string[])[]

/** How a file is to be read: chosen by what it says, and by the person. */
export interface FileSettings {
  /** index of the line that heads the columns */
  readonly headLine: number
  /** what each column of the file is, null for one that is not read */
  readonly columns: readonly (ColumnKey | null)[]
  readonly groupUnits: GroupUnits
  readonly decimal: DecimalMark
  readonly dateOrder: DateOrder
  /** what the file does not tell, the same for every row */
  readonly fixed: RowCells
  /** whether the file told its decimal mark and its dates' order */
  readonly sure: { readonly decimal: boolean; readonly dateOrder: boolean }
}

/** Rows looked at to tell how numbers and dates are written. */
const LOOKED_AT = 200

/** Settings for a file as it says itself, with what the person chose for such heads before. */
export function openSettings(rows: TableRows, site: Site, habits: FileHabits, headLine = provenanceLines(rows) + findHeadLine(rows.slice(provenanceLines(rows)))): FileSettings {
  const heads = rows[headLine] ?? []
  const matched = matchHeads(heads)
  const columns = withHabits(heads, matched.map(({ key }) => key), habits)
  const below = rows.slice(headLine + 1, headLine + 1 + LOOKED_AT)
  const textsOf = (kind: 'number' | 'instant') => below.flatMap((row) => row.filter((_, index) => isKind(columns[index] ?? null, kind)))
  const decimal = guessDecimalMark(textsOf('number').filter((text) => text.trim() !== ''))
  const dateOrder = guessDateOrder(textsOf('instant'))
  return {
    headLine,
    columns,
    groupUnits: { ...usualUnits(site.unitSystem, site.grid.unit), ...habits.units },
    decimal: decimal ?? '.',
    dateOrder: dateOrder ?? (site.unitSystem === 'us' ? 'mdy' : 'dmy'),
    fixed: habits.fixed,
    sure: { decimal: decimal !== null, dateOrder: dateOrder !== null },
  }
}

const isKind = (key: ColumnKey | null, kind: string): boolean => key !== null && columnOf(key).kind === kind

/** A head that was given another meaning before keeps it, where no other head of the file has that meaning by itself. */
function withHabits(heads: readonly string[], matched: readonly (ColumnKey | null)[], { heads: known }: FileHabits): (ColumnKey | null)[] {
  const taken = new Set<ColumnKey>()
  return heads.map((head, index) => {
    const kept = known[plainWord(head)]
    const key = kept === undefined ? (matched[index] ?? null) : kept
    if (key === null || taken.has(key)) return null
    taken.add(key)
    return key
  })
}

/** Units that the heads themselves name. */
export function headUnitsOf(rows: TableRows, { headLine, columns }: Pick<FileSettings, 'headLine' | 'columns'>): Partial<Record<ColumnKey, ExchangeUnit>> {
  const heads = rows[headLine] ?? []
  return Object.fromEntries(
    columns.flatMap((key, index) => {
      if (key === null || columnOf(key).group === undefined) return []
      const unit = unitInHead(heads[index] ?? '', key)
      return unit === null ? [] : [[key, unit]]
    }),
  )
}

function unitInHead(head: string, key: ColumnKey): ExchangeUnit | null {
  const bracket = /[([]([^)\]]*)[)\]]\s*$/.exec(head)?.[1]
  if (bracket === undefined) return null
  const [found] = matchHeads([`${columnOf(key).label} (${bracket})`])
  return found?.unit ?? null
}

/** The groups whose unit neither heads nor a column of units tell, so that it is chosen for the file. */
export function groupsToChoose(rows: TableRows, settings: FileSettings): UnitGroup[] {
  const told = headUnitsOf(rows, settings)
  const read = settings.columns.filter((key) => key !== null)
  return UNIT_GROUPS.filter((group) => {
    const beside = UNIT_COLUMN[group]
    if (group === 'plan' || (beside !== undefined && read.includes(beside))) return false
    const keys = [...read, ...(settings.fixed.depth ? (['depth'] as const) : [])].filter((key) => columnOf(key).group === group)
    return keys.some((key) => told[key] === undefined)
  })
}

export function readOptionsOf(rows: TableRows, settings: FileSettings, site: Site): ReadOptions {
  const { groupUnits, decimal, dateOrder } = settings
  return { headUnits: headUnitsOf(rows, settings), groupUnits, decimal, dateOrder, timeZone: site.timeZone, planUnit: site.grid.unit }
}

/** A line of the file by column: its own fields, and what stands for every row where it has none. */
export function cellsOf(fields: readonly string[], { columns, fixed }: FileSettings): RowCells {
  const own = Object.fromEntries(columns.flatMap((key, index) => (key === null ? [] : [[key, fields[index] ?? '']]))) as RowCells
  const missing = Object.entries(fixed).filter(([key]) => (own[key as ColumnKey] ?? '').trim() === '')
  return { ...own, ...Object.fromEntries(missing) }
}
