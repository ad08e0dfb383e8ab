import type { Cell, CellValue, Worksheet } from 'exceljs'
import { EXCHANGE_LIMITS } from '#shared/schemas/test-exchange.ts'
import type { ReadRows } from './read-table.ts'
import { zipProblem } from './zip-bounds.ts'

/** The sheet that an export of tests stands in. */
const TESTS = 'Tests'

/** Lines of a workbook's sheet of tests: that named Tests, else the first that holds anything. Of a formula its last result counts. */
export async function readWorkbook(bytes: Uint8Array): Promise<ReadRows> {
  const problem = await zipProblem(bytes, EXCHANGE_LIMITS.inflatedBytes)
  if (problem !== undefined) return { ok: false, message: problem }
  const { default: ExcelJS } = await import('exceljs')
  const book = new ExcelJS.Workbook()
  try {
    await book.xlsx.load(new Uint8Array(bytes).buffer)
  } catch {
    return { ok: false, message: 'This workbook cannot be read. Open it in a spreadsheet, save it as .xlsx or CSV, and choose it again.' }
  }
  const sheets = book.worksheets.filter((sheet) => sheet.actualRowCount > 0)
  const sheet = sheets.find(({ name }) => name === TESTS) ?? sheets[0]
  if (!sheet) return { ok: false, message: 'There is nothing in this workbook.' }
  const read = readSheet(sheet)
  return read.ok && sheets.length > 1 && sheet.name !== TESTS ? { ...read, notices: [`Of its ${sheets.length} sheets, “${sheet.name}” was read.`] } : read
}

function readSheet(sheet: Worksheet): ReadRows {
  if (sheet.actualColumnCount > EXCHANGE_LIMITS.columns) return { ok: false, message: `This sheet has more than ${EXCHANGE_LIMITS.columns} columns, which is no table of tests.` }
  const rows: string[][] = []
  const empty: string[] = []
  sheet.eachRow({ includeEmpty: false }, (row, number) => {
    // a line keeps its number: what is wrong is told by it
    if (number > EXCHANGE_LIMITS.rows + 40) return
    while (rows.length < number - 1) rows.push([])
    const fields: string[] = []
    row.eachCell({ includeEmpty: false }, (cell, column) => {
      if (column > EXCHANGE_LIMITS.columns) return
      while (fields.length < column - 1) fields.push('')
      const text = textOf(cell)
      if (text === null) empty.push(cell.address)
      fields.push(text ?? '')
    })
    rows.push(fields)
  })
  if (sheet.rowCount > EXCHANGE_LIMITS.rows + 40) return { ok: false, message: `There are more than ${EXCHANGE_LIMITS.rows.toLocaleString('en-US')} lines in this. Split it and take the parts in one after another.` }
  if (empty.length > 0) return { ok: false, message: `Cell ${empty.slice(0, 5).join(', ')} holds a formula without its result. Open the workbook in a spreadsheet, save it, and choose it again.` }
  return { ok: true, rows, notices: [] }
}

/** What a cell says; null for a formula that was never worked out. */
function textOf(cell: Cell): string | null {
  const { value } = cell
  if (typeof value === 'object' && value !== null && ('formula' in value || 'sharedFormula' in value)) {
    const { result } = value as { result?: CellValue }
    return result === undefined || result === null ? null : plainValue(result, cell.numFmt)
  }
  return plainValue(value, cell.numFmt)
}

function plainValue(value: CellValue, format: string | undefined): string {
  if (value === null || value === undefined) return ''
  if (typeof value === 'number') return format?.includes('%') === true ? `${Number((value * 100).toPrecision(15))}%` : String(value)
  if (typeof value === 'string') return value
  if (typeof value === 'boolean') return value ? 'Yes' : 'No'
  // a workbook's time has no zone: it stands as on the clock of who wrote it
  if (value instanceof Date) return value.toISOString().slice(0, -1).replace('.000', '')
  if ('richText' in value) return value.richText.map((part) => part.text).join('')
  if ('error' in value) return value.error
  return 'text' in value ? plainValue(value.text as CellValue, format) : ''
}
