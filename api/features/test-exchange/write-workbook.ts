import type { Writable } from 'node:stream'
import ExcelJS from 'exceljs'
import { exchangeSite } from '#api/features/test-exchange/known-tests.ts'
import { provenanceOf, type Provenance } from '#api/features/test-exchange/provenance.ts'
import { GROUP_WORDS, UNIT_GROUPS } from '#shared/exchange/exchange-units.ts'
import { columnOf, UNIT_COLUMN, type ColumnKey, type RowValues } from '#shared/exchange/test-columns.ts'
import { workbookText } from '#shared/exchange/workbook-text.ts'
import { columnsOfFile, headOfColumn, unitOfColumn } from '#shared/exchange/write-row.ts'

/** Rows between two looks at whether the reader keeps up, others served meanwhile. */
const AT_ONCE = 50
const TIME_FORMAT = 'yyyy-mm-dd hh:mm:ss'

/** Writes the workbook of rows as it goes: typed numbers and times, a head that stays, what the units are, where it comes from. */
export async function writeWorkbook(out: Writable, rows: AsyncIterable<RowValues>, provenance: Provenance): Promise<void> {
  const { units } = provenance.query
  const columns = columnsOfFile(units, 'xlsx')
  const site = exchangeSite(provenance.plan)
  // strings in a table of their own, as spreadsheets write them: readers undo their escapes there only
  const book = new ExcelJS.stream.xlsx.WorkbookWriter({ stream: out, useStyles: true, useSharedStrings: true })
  const sheet = book.addWorksheet('Tests', { views: [{ state: 'frozen', ySplit: 1, xSplit: 2 }] })
  sheet.columns = columns.map((key) => ({ key, header: headOfColumn(key, site, units), width: widthOf(key), style: styleOf(key) }))
  sheet.getRow(1).font = { bold: true }
  sheet.getRow(1).commit()
  let count = 0
  for await (const values of rows) {
    sheet.addRow(columns.map((key) => cellValue(key, values))).commit()
    if (++count % AT_ONCE === 0) await keepUp(out)
  }
  sheet.commit()
  writeList(book, 'Units', ['Column', 'Unit'], columns.flatMap((key) => {
    const unit = unitOfColumn(key, site, units) ?? besideWords(key)
    return unit === undefined ? [] : [[columnOf(key).label, unit] as const]
  }))
  writeList(book, 'Provenance', ['About', 'Words'], provenanceOf(provenance))
  await book.commit()
}

function besideWords(key: ColumnKey): string | undefined {
  const { group } = columnOf(key)
  const beside = UNIT_GROUPS.find((each) => each === group)
  const column = beside === undefined ? undefined : UNIT_COLUMN[beside]
  return beside === undefined || column === undefined ? undefined : `${GROUP_WORDS[beside]}: see ${columnOf(column).label}`
}

function writeList(book: ExcelJS.stream.xlsx.WorkbookWriter, name: string, heads: readonly string[], lines: readonly (readonly [string, string])[]): void {
  const sheet = book.addWorksheet(name, { views: [{ state: 'frozen', ySplit: 1 }] })
  sheet.columns = [{ width: 30 }, { width: 110 }]
  const head = sheet.addRow([...heads])
  head.font = { bold: true }
  head.commit()
  for (const line of lines) sheet.addRow(line.map(workbookText)).commit()
  sheet.commit()
}

/** A slow reader must not make the server hold the whole file. */
async function keepUp(out: Writable): Promise<void> {
  if (out.destroyed) throw new Error('The reader of a workbook went away')
  if (out.writableNeedDrain) await new Promise<void>((resolve) => { out.once('drain', resolve); out.once('close', resolve) })
  else await new Promise<void>((resolve) => setImmediate(resolve))
}

const OFFSET = /(Z|[+-]\d{2}:\d{2})$/

/** A workbook knows no offsets: times stand as on the site's clock, the offset beside. */
function cellValue(key: ColumnKey, values: RowValues): string | number | Date | null {
  if (key === 'utcOffset') return OFFSET.exec(String(values.sampledAt ?? ''))?.[1] ?? null
  const value = values[key]
  if (value === undefined || value === '') return null
  if (typeof value === 'number') return value
  return columnOf(key).kind === 'instant' ? new Date(`${value.replace(OFFSET, '')}Z`) : workbookText(value)
}

function styleOf(key: ColumnKey): Partial<ExcelJS.Style> {
  const { kind, decimals } = columnOf(key)
  if (kind === 'instant') return { numFmt: TIME_FORMAT }
  return kind === 'number' && decimals !== undefined ? { numFmt: `0.${'0'.repeat(decimals)}` } : {}
}

function widthOf(key: ColumnKey): number {
  const { kind, label } = columnOf(key)
  if (key === 'remarks' || key === 'flags' || key === 'headline') return 40
  return kind === 'instant' ? 20 : Math.min(Math.max(label.length + 2, 10), 24)
}
