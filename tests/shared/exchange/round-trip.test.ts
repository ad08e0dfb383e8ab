import { parse } from 'csv-parse/sync'
import fc from 'fast-check'
import Papa from 'papaparse'
import { describe, expect, it } from 'vitest'
import { csvLine, guardText, unguardText } from '#shared/exchange/csv-cell.ts'
import { readRow } from '#shared/exchange/read-row.ts'
import { differingColumns } from '#shared/exchange/same-test.ts'
import { columnOf, COLUMN_KEYS, type ColumnKey, type RowCells } from '#shared/exchange/test-columns.ts'
import { unitOfColumn, writeRow } from '#shared/exchange/write-row.ts'
import { readUnit, type ExchangeUnit } from '#shared/exchange/exchange-units.ts'
import type { ExportUnits, ImportTest } from '#shared/schemas/test-exchange.ts'
import { anyImportTest, EXCHANGE_SITE, readOptions } from '#tests/factories/import-test.ts'

const headUnits = (units: ExportUnits): Partial<Record<ColumnKey, ExchangeUnit>> =>
  Object.fromEntries(
    COLUMN_KEYS.flatMap((key) => {
      const { group } = columnOf(key)
      const unit = unitOfColumn(key, EXCHANGE_SITE, units)
      const read = group === undefined || unit === undefined ? undefined : readUnit(unit, group)
      return read === undefined ? [] : [[key, read]]
    }),
  )

/** A test as a line of CSV. */
function written(test: ImportTest, units: ExportUnits): string {
  const values = writeRow(test, EXCHANGE_SITE, units)
  return csvLine(COLUMN_KEYS.map((key) => (typeof values[key] === 'string' ? guardText(values[key]) : String(values[key] ?? ''))))
}

function readBack(line: string, units: ExportUnits) {
  const [fields = []] = Papa.parse<string[]>(line.replace(/\r\n$/, '')).data
  const cells: RowCells = Object.fromEntries(COLUMN_KEYS.map((key, index) => [key, unguardText(fields[index] ?? '')]))
  return readRow(cells, readOptions({ headUnits: headUnits(units) }), 'unused')
}

describe('a test written to a row and read back', () => {
  it('is the same test to the last digit, of any method and in any units', () => {
    fc.assert(
      fc.property(anyImportTest, (test) => {
        const back = readBack(written(test, 'as-entered'), 'as-entered')
        expect(back.problems).toEqual([])
        expect(back.test).toEqual(test)
        expect(back.identified).toBe(true)
      }),
      { numRuns: 500 },
    )
  })

  it('gives an independent reader of CSV the fields that were written', () => {
    fc.assert(
      fc.property(anyImportTest, (test) => {
        const values = writeRow(test, EXCHANGE_SITE, 'as-entered')
        const [fields = []] = parse(written(test, 'as-entered'), { bom: true }) as string[][]
        expect(fields.map(unguardText)).toEqual(COLUMN_KEYS.map((key) => String(values[key] ?? '')))
      }),
      { numRuns: 300 },
    )
  })

  it('never starts a cell of words as a formula', () => {
    fc.assert(
      fc.property(anyImportTest, (test) => {
        const [fields = []] = parse(written(test, 'as-entered')) as string[][]
        const words = COLUMN_KEYS.filter((key) => columnOf(key).kind === 'text').map((key) => fields[COLUMN_KEYS.indexOf(key)] ?? '')
        expect(words.filter((text) => /^[=+\-@\t\r]/.test(text))).toEqual([])
      }),
      { numRuns: 300 },
    )
  })

  it('is known as the same test when the file carries it in the other units', () => {
    fc.assert(
      fc.property(anyImportTest, fc.constantFrom('us' as const, 'si' as const), (test, units) => {
        const back = readBack(written(test, units), units)
        expect(back.problems).toEqual([])
        expect(differingColumns(back.test as ImportTest, test, EXCHANGE_SITE)).toEqual([])
      }),
      { numRuns: 300 },
    )
  })

  it('is known as another when any figure of its sheet was changed', () => {
    fc.assert(
      fc.property(anyImportTest, (test) => {
        const { sheet } = test
        const changed = { ...test, sheet: { ...sheet, moisture: { method: 'stated' as const, percent: 1 / 3 } } }
        expect(differingColumns(changed, test, EXCHANGE_SITE)).not.toEqual([])
        expect(differingColumns({ ...test, remarks: `${test.remarks}.` }, test, EXCHANGE_SITE)).toEqual(['remarks'])
      }),
      { numRuns: 200 },
    )
  })
})

describe('guarding words against formulas', () => {
  it('is taken back exactly, whatever apostrophes stood there', () => {
    fc.assert(fc.property(fc.string({ unit: fc.constantFrom("'", '=', '+', '-', '@', 'a', '\t', ' ') }), (text) => unguardText(guardText(text)) === text))
  })
})
