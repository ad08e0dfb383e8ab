import { deflateRawSync } from 'node:zlib'
import ExcelJS from 'exceljs'
import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import { csvLine, guardText } from '#shared/exchange/csv-cell.ts'
import { matchHeads } from '#shared/exchange/match-heads.ts'
import { readRow } from '#shared/exchange/read-row.ts'
import { columnOf, type ColumnKey, type RowCells } from '#shared/exchange/test-columns.ts'
import { workbookText } from '#shared/exchange/workbook-text.ts'
import { columnsOfFile, headOfColumn, writeRow } from '#shared/exchange/write-row.ts'
import type { ImportTest } from '#shared/schemas/test-exchange.ts'
import { anyImportTest, EXCHANGE_SITE, readOptions } from '#tests/factories/import-test.ts'
import { readTable, type ReadTable } from '#web/features/tests/exchange/read/read-table.ts'

// hundreds of files are written and read
vi.setConfig({ testTimeout: 60_000 })

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text)
const utf16 = (text: string): Uint8Array => new Uint8Array(Buffer.from(`\ufeff${text}`, 'utf16le'))
const rowsOf = (table: ReadTable) => (table.ok ? table.rows : table.message)
const refusal = async (data: Uint8Array): Promise<string> => {
  const table = await readTable(data, 'tests.csv')
  return table.ok ? `it was read: ${JSON.stringify(table.rows).slice(0, 80)}` : table.message
}

async function workbookOf(fill: (sheet: ExcelJS.Worksheet, book: ExcelJS.Workbook) => void): Promise<Uint8Array> {
  const book = new ExcelJS.Workbook()
  fill(book.addWorksheet('Tests'), book)
  return new Uint8Array(await book.xlsx.writeBuffer())
}

/** A zip of one part, as its format has it; `claims` is what the directory says the part unpacks to. */
function zipOf(name: string, packed: Buffer, claims: number): Uint8Array {
  const local = Buffer.alloc(30 + name.length)
  local.writeUInt32LE(0x04034b50, 0)
  local.writeUInt16LE(8, 8)
  local.writeUInt32LE(packed.length, 18)
  local.writeUInt32LE(claims, 22)
  local.writeUInt16LE(name.length, 26)
  local.write(name, 30)
  const entry = Buffer.alloc(46 + name.length)
  entry.writeUInt32LE(0x02014b50, 0)
  entry.writeUInt16LE(8, 10)
  entry.writeUInt32LE(packed.length, 20)
  entry.writeUInt32LE(claims, 24)
  entry.writeUInt16LE(name.length, 28)
  entry.write(name, 46)
  const end = Buffer.alloc(22)
  end.writeUInt32LE(0x06054b50, 0)
  end.writeUInt16LE(1, 8)
  end.writeUInt16LE(1, 10)
  end.writeUInt32LE(entry.length, 12)
  end.writeUInt32LE(local.length + packed.length, 16)
  return new Uint8Array(Buffer.concat([local, packed, entry, end]))
}

function backFrom(rows: readonly (readonly string[])[]): ImportTest | null {
  const [heads = [], fields = []] = rows
  const matched = matchHeads(heads)
  const headUnits = Object.fromEntries(matched.flatMap(({ key, unit }) => (key !== null && unit !== null ? [[key, unit] as const] : [])))
  const cells: RowCells = Object.fromEntries(matched.flatMap(({ key }, index) => (key === null ? [] : [[key, fields[index] ?? '']])))
  const read = readRow(cells, readOptions({ headUnits }), 'unused')
  expect(read.problems).toEqual([])
  return read.test
}

describe('a file of tests', () => {
  it('as CSV gives back every test to the last digit', async () => {
    await fc.assert(
      fc.asyncProperty(anyImportTest, async (test) => {
        const columns = columnsOfFile('as-entered', 'csv')
        const values = writeRow(test, EXCHANGE_SITE, 'as-entered')
        const text = csvLine(columns.map((key) => headOfColumn(key, EXCHANGE_SITE, 'as-entered'))) + csvLine(columns.map((key) => (typeof values[key] === 'string' ? guardText(values[key]) : String(values[key] ?? ''))))
        const table = await readTable(bytes(`\ufeff${text}`), 'tests.csv')
        expect(backFrom(table.ok ? table.rows : [])).toEqual(test)
      }),
      { numRuns: 80 },
    )
  })

  it('as a workbook gives back every test to the last digit', async () => {
    await fc.assert(
      fc.asyncProperty(anyImportTest, async (test) => {
        const columns = columnsOfFile('as-entered', 'xlsx')
        const values = writeRow(test, EXCHANGE_SITE, 'as-entered')
        const cell = (key: ColumnKey) => {
          const value = values[key]
          if (key === 'utcOffset') return String(values.sampledAt).slice(-6)
          if (typeof value !== 'string') return value ?? null
          return columnOf(key).kind === 'instant' ? new Date(`${value.slice(0, -6)}Z`) : workbookText(value)
        }
        const file = await workbookOf((sheet) => {
          sheet.addRow(columns.map((key) => headOfColumn(key, EXCHANGE_SITE, 'as-entered')))
          sheet.addRow(columns.map(cell))
        })
        const table = await readTable(file, 'tests.xlsx')
        expect(backFrom(table.ok ? table.rows : [])).toEqual(test)
      }),
      { numRuns: 40 },
    )
  })

  it('is read with commas, semicolons or tabs, quoted line ends and UTF-16', async () => {
    const rows = [['Lift', 'Remarks', 'Depth'], ['1', 'first\nsecond; "third"', '6,5']]
    for (const mark of [';', '\t']) expect(rowsOf(await readTable(bytes(`Lift${mark}Remarks${mark}Depth\r\n1${mark}"first\nsecond; ""third"""${mark}6,5\r\n\r\n`), 'x'))).toEqual(rows)
    expect(rowsOf(await readTable(bytes('Lift,Remarks,Depth\n1,"first\nsecond; ""third""","6,5"'), 'x'))).toEqual(rows)
    expect(rowsOf(await readTable(utf16('Lift\tTechnician\r\n1\tŻółw'), 'x'))).toEqual([['Lift', 'Technician'], ['1', 'Żółw']])
  })

  it('that is not UTF-8 is read as Western European, and said to be', async () => {
    const table = await readTable(new Uint8Array(Buffer.from('Lift,Remarks\n1,T\xf6lz 20 \xb0C', 'latin1')), 'x')
    expect(table).toMatchObject({ ok: true, rows: [['Lift', 'Remarks'], ['1', 'Tölz 20 °C']], notices: [expect.stringContaining('not UTF-8')] })
  })

  it('takes a percentage, a time and the result of a formula from a workbook', async () => {
    const file = await workbookOf((sheet) => {
      sheet.addRow(['Moisture', 'Sampled at', 'Depth', 'Remarks'])
      const row = sheet.addRow([0.125, new Date('2026-12-01T14:32:00Z'), { formula: '2*3', result: 6 }, { richText: [{ text: 'two ' }, { text: 'parts' }] }])
      row.getCell(1).numFmt = '0.0%'
    })
    expect(rowsOf(await readTable(file, 'x'))).toEqual([['Moisture', 'Sampled at', 'Depth', 'Remarks'], ['12.5%', '2026-12-01T14:32:00', '6', 'two parts']])
  })
})

describe('what is no table of tests', () => {
  it('is refused in plain words, and soon', async () => {
    const started = Date.now()
    const noise = (size: number) => new Uint8Array(Array.from({ length: size }, (_, index) => (index * 7919 + (index >> 3)) % 256))
    expect(await refusal(new Uint8Array(0))).toBe('There is nothing in this file.')
    expect(await refusal(new Uint8Array(10 * 1024 * 1024).fill(65))).toContain('larger than 5 MB')
    expect(await refusal(noise(200_000))).toContain('no text file')
    expect(await refusal(bytes('Lift,Depth\n1,\u00006'))).toContain('no text file')
    expect(await refusal(new Uint8Array(Buffer.from('Lift,Depth\n1,6', 'utf16le')))).toContain('UTF-16')
    expect(await refusal(bytes(`${'a,'.repeat(100_000)}\n${'1,'.repeat(100_000)}`))).toContain('more than 200 fields')
    expect(await refusal(bytes(`a,b\n${'1,2\n'.repeat(6_000)}`))).toContain('more than 5,000 lines')
    expect(await refusal(bytes('a,b\n"1,2\n3,4'))).toContain('never closed')
    expect(await refusal(bytes('only heads,here'))).toContain('only one line')
    expect(await refusal(bytes('%PDF-1.7 …'))).toContain('PDF')
    expect(await refusal(new Uint8Array([0xd0, 0xcf, 0x11, 0xe0, 1, 2]))).toContain('.xls')
    expect(Date.now() - started).toBeLessThan(10_000)
  })

  it('is refused as a zip that is no workbook, is damaged, or unpacks without end, whatever it claims', async () => {
    const small = deflateRawSync(Buffer.from('hello'))
    expect(await refusal(zipOf('readme.txt', small, 5))).toContain('no workbook')
    expect(await refusal(bytes('PK and nothing more'))).toContain('damaged')
    expect(await refusal(zipOf('xl/workbook.xml', Buffer.from([1, 2, 3, 255]), 5))).toContain('damaged')
    const bomb = deflateRawSync(Buffer.alloc(200 * 1024 * 1024))
    expect(await refusal(zipOf('xl/workbook.xml', bomb, 10))).toContain('far too large')
  })

  it('is refused as a workbook with a formula that was never worked out', async () => {
    const file = await workbookOf((sheet) => {
      sheet.addRow(['Lift', 'Depth'])
      sheet.addRow([1, { formula: 'A1', result: undefined } as ExcelJS.CellFormulaValue])
    })
    expect(await refusal(file)).toContain('Cell B2 holds a formula')
  })
})
