import { parse } from 'csv-parse/sync'
import { matchHeads } from '#shared/exchange/match-heads.ts'
import { provenanceLines, unguardText } from '#shared/exchange/csv-cell.ts'
import { readRow } from '#shared/exchange/read-row.ts'
import type { RowCells } from '#shared/exchange/test-columns.ts'
import type { ImportRow } from '#shared/schemas/test-exchange.ts'
import { readOptions } from '#tests/factories/import-test.ts'

export interface ReadFile {
  readonly provenance: readonly string[]
  readonly heads: readonly string[]
  readonly records: readonly Readonly<Record<string, string>>[]
  /** the rows as they would be imported */
  readonly rows: ImportRow[]
}

/** A CSV file of tests as an independent reader (csv-parse) sees it, and as the product would import it. */
export function readExchangeFile(text: string): ReadFile {
  const lines = parse(text, { bom: true, relax_column_count: true }) as string[][]
  const above = provenanceLines(lines)
  const heads = lines[above] ?? []
  const body = lines.slice(above + 1).map((fields) => fields.map(unguardText))
  const matched = matchHeads(heads)
  const headUnits = Object.fromEntries(matched.flatMap(({ key, unit }) => (key !== null && unit !== null ? [[key, unit] as const] : [])))
  const rows = body.map((fields, index): ImportRow => {
    const cells: RowCells = Object.fromEntries(matched.flatMap(({ key }, column) => (key === null ? [] : [[key, fields[column] ?? '']])))
    const line = above + 2 + index
    const read = readRow(cells, readOptions({ headUnits }), `00000000-0000-4000-8000-${String(line).padStart(12, '0')}`)
    if (read.test === null) throw new Error(`Line ${line} cannot be read: ${JSON.stringify(read.problems)}`)
    return { line, reference: read.reference, identified: read.identified, another: false, test: read.test }
  })
  return { provenance: lines.slice(0, above).map(([first = '']) => first), heads, records: body.map((fields) => Object.fromEntries(heads.map((head, column) => [head, fields[column] ?? '']))), rows }
}
