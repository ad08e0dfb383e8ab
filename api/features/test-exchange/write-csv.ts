import { provenanceHead, type Provenance } from '#api/features/test-exchange/provenance.ts'
import { exchangeSite } from '#api/features/test-exchange/known-tests.ts'
import { csvLine, guardText } from '#shared/exchange/csv-cell.ts'
import type { RowValues } from '#shared/exchange/test-columns.ts'
import { columnsOfFile, headOfColumn } from '#shared/exchange/write-row.ts'

const BOM = '\ufeff'
/** Characters written at a time: a line alone would be a packet alone. */
const CHUNK = 64 * 1024

/** The CSV file of rows (RFC 4180, UTF-8), piece by piece. */
export async function* writeCsv(rows: AsyncIterable<RowValues>, provenance: Provenance): AsyncGenerator<string> {
  const { units, bom } = provenance.query
  const columns = columnsOfFile(units, 'csv')
  const site = exchangeSite(provenance.plan)
  let piece = bom === 'true' ? BOM : ''
  for (const line of provenanceHead(provenance)) piece += csvLine([line])
  piece += csvLine(columns.map((key) => headOfColumn(key, site, units)))
  for await (const values of rows) {
    piece += csvLine(columns.map((key) => cellText(values[key])))
    if (piece.length >= CHUNK) {
      yield piece
      piece = ''
    }
  }
  yield piece
}

/** Numbers in the fewest digits that come back the same; words guarded against being run as a formula. */
function cellText(value: string | number | undefined): string {
  if (value === undefined) return ''
  return typeof value === 'number' ? String(value) : guardText(value)
}
