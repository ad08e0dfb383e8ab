import { readRow, type ReadRow } from '#shared/exchange/read-row.ts'
import type { ReadOptions } from '#shared/exchange/row-reader.ts'
import type { ColumnKey, RowCells } from '#shared/exchange/test-columns.ts'
import type { ImportRow, PreviewedRow, RowProblem } from '#shared/schemas/test-exchange.ts'
import { cellsOf, type FileSettings, type TableRows } from './file-settings.ts'

/** What a person did to the lines of a file, by line. */
export interface LineWork {
  readonly edits: Readonly<Record<number, RowCells>>
  /** why it was set aside */
  readonly aside: Readonly<Record<number, string>>
  /** lines that are another test than the one they look like */
  readonly another: readonly number[]
}
export const NO_WORK: LineWork = { edits: {}, aside: {}, another: [] }

export type LineState = 'ready' | 'attention' | 'differs' | 'recorded' | 'aside' | 'waiting'

/** A line of a file with everything known about it. */
export interface ImportLine {
  readonly line: number
  readonly fields: readonly string[]
  readonly cells: RowCells
  readonly reference: string
  /** as it would be sent; null while something in it cannot be read */
  readonly row: ImportRow | null
  readonly problems: readonly RowProblem[]
  readonly edited: readonly ColumnKey[]
  readonly aside: string | null
}

type Known = Map<string, ReadRow>

/** Lines of a file below its heads, blank ones left out; `known` keeps what was read, so that a change reads one line anew. */
export function readLines(rows: TableRows, ids: readonly string[], settings: FileSettings, options: ReadOptions, work: LineWork, known: Known): ImportLine[] {
  const lines = rows.flatMap((fields, index): ImportLine[] => {
    if (index <= settings.headLine || fields.every((field) => field.trim() === '')) return []
    const line = index + 1
    const edits = work.edits[line] ?? {}
    const cells = { ...cellsOf(fields, settings), ...edits }
    const key = `${line} ${JSON.stringify([cells, options])}`
    const read = known.get(key) ?? readRow(cells, options, ids[index] ?? '')
    known.set(key, read)
    const row = read.test === null ? null : { line, reference: read.reference, identified: read.identified, another: work.another.includes(line), test: read.test }
    return [{ line, fields, cells, reference: read.reference, row, problems: read.problems, edited: Object.keys(edits) as ColumnKey[], aside: work.aside[line] ?? null }]
  })
  return joinFollowers(lines)
}

/** A test that follows another of the same file by its number follows that record. */
function joinFollowers(lines: readonly ImportLine[]): ImportLine[] {
  const byReference = new Map<string, string>()
  for (const { reference, row, aside } of lines) if (reference !== '' && row !== null && aside === null && !byReference.has(reference)) byReference.set(reference, row.test.id)
  return lines.map((line) => {
    const follows = line.row?.test.follows
    if (line.row === null || !follows || follows.record !== null) return line
    const record = byReference.get(follows.number ?? '')
    return record === undefined ? line : { ...line, row: { ...line.row, test: { ...line.row.test, follows: { ...follows, record } } } }
  })
}

/** Rows that a row follows, directly or through others. */
export function followedBy(row: ImportRow, byId: ReadonlyMap<string, ImportRow>): ImportRow[] {
  const found: ImportRow[] = []
  for (let next = byId.get(row.test.follows?.record ?? ''); next !== undefined && next !== row && !found.includes(next); next = byId.get(next.test.follows?.record ?? '')) found.push(next)
  return found
}

/** How a line stands, with what the server said of it where it was asked. */
export function stateOf({ aside, row }: ImportLine, previewed: PreviewedRow | undefined): LineState {
  if (aside !== null) return 'aside'
  if (row === null) return 'attention'
  return previewed?.state ?? 'waiting'
}

export function problemsOf(line: ImportLine, previewed: PreviewedRow | undefined): readonly RowProblem[] {
  if (line.aside !== null) return []
  return line.row === null ? line.problems : (previewed?.problems ?? [])
}
