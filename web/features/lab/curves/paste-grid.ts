import Papa from 'papaparse'
import { columnsOf, type EntryColumn, type EntryForm, type EntryRow } from './entry-columns.ts'

/** Lines and places that are read at most: a laboratory's sheet has a few dozen. */
export const MOST_LINES = 200
const MOST_PLACES = 24

export type Grid = { readonly heads: readonly string[] | null; readonly lines: readonly (readonly string[])[]; /** more lines stand there than are read */ readonly more: boolean }

const looksNumeric = (text: string): boolean => /^[+\-−]?[\d.,' ]*\d[\d.,' ]*%?$/.test(text)

/** A block copied from a spreadsheet or a CSV file: its heads, where the first line holds words, and its lines. */
export function readGrid(text: string): Grid {
  const parsed = Papa.parse<string[]>(text.replace(/^\uFEFF/, ''), { skipEmptyLines: 'greedy', preview: MOST_LINES + 2, ...delimiterOf(text) })
  const lines = parsed.data.map((line) => line.slice(0, MOST_PLACES).map((place) => place.trim()))
  const first = lines[0] ?? []
  const hasHeads = first.some((place) => place !== '') && !first.some(looksNumeric)
  const figures = hasHeads ? lines.slice(1) : lines
  return { heads: hasHeads ? first : null, lines: figures.slice(0, MOST_LINES), more: figures.length > MOST_LINES }
}

/** Tabs as spreadsheets copy them, semicolons where commas are decimal; runs of blanks where nothing else parts the figures. */
function delimiterOf(text: string): { delimiter?: string } {
  if (text.includes('\t')) return { delimiter: '\t' }
  if (text.includes(';')) return { delimiter: ';' }
  if (!text.includes(',') || /\d,\d+\s+\S/.test(text)) return { delimiter: ' ' }
  return { delimiter: ',' }
}

/** Which column each place of the block is: by its head where there is one, else in the order of the sheet from a column on. */
export function guessColumns(grid: Grid, form: EntryForm, from?: EntryColumn): (EntryColumn | null)[] {
  const columns = columnsOf(form)
  const width = Math.max(0, ...grid.lines.map((line) => line.length))
  if (grid.heads === null) {
    const start = Math.max(0, columns.findIndex((column) => column.key === from))
    return Array.from({ length: width }, (_, place) => columns[start + place]?.key ?? null)
  }
  const free = new Set(columns)
  return Array.from({ length: width }, (_, place) => {
    const head = grid.heads?.[place] ?? ''
    const found = [...free].find((column) => column.known.test(head))
    if (found !== undefined) free.delete(found)
    return found?.key ?? null
  })
}

const DECIMAL_COMMA = /^[+\-−]?\d+,\d+$/

/** The block as rows of the sheet. A comma is decimal where no other figure of the block has a point. */
export function rowsOf({ lines }: Grid, columns: readonly (EntryColumn | null)[]): EntryRow[] {
  const figures = lines.flat()
  const commas = figures.some((text) => DECIMAL_COMMA.test(text)) && !figures.some((text) => text.includes('.'))
  const plain = (text: string) => (commas && DECIMAL_COMMA.test(text) ? text.replace(',', '.') : text)
  return lines.map((line) => Object.fromEntries(columns.flatMap((column, place) => (column === null ? [] : [[column, plain(line[place] ?? '')]]))))
}

/** Puts rows in from a row on, each over what stands there; rows are added as needed. */
export function pasteInto(rows: readonly EntryRow[], from: number, pasted: readonly EntryRow[]): EntryRow[] {
  const merged = pasted.map((row, i) => ({ ...rows[from + i], ...row }))
  return [...rows.slice(0, from), ...merged, ...rows.slice(from + pasted.length)]
}
