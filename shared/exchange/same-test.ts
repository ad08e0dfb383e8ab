import { convertSheet } from '#shared/exchange/convert-sheet.ts'
import { INPUT_KEYS, UNIT_COLUMN, type ColumnKey, type RowValues } from '#shared/exchange/test-columns.ts'
import { writeRow, type ExchangeSite, type ExchangeTest } from '#shared/exchange/write-row.ts'

/** A reading that was converted is the same when it agrees to this part: files in other units carry seven digits. */
const AGREES = 2e-6
/** What no instrument shows, g, mm, cm³ or kg/m³: below it nothing is compared. */
const LEAST = 1e-3
const UNIT_COLUMNS: readonly ColumnKey[] = Object.values(UNIT_COLUMN)
/** Whether a lift was asked about is told by its flag, and stands in a file only where it mattered. */
const NOT_COMPARED: readonly ColumnKey[] = ['liftConfirmed']

/**
 * The columns in which a row of a file is another test than the one on record; none where it is the same. Readings in the
 * same unit must be equal, readings in another unit must agree after conversion.
 * @param row with its place as coordinates
 */
export function differingColumns(row: ExchangeTest, record: ExchangeTest, site: ExchangeSite): ColumnKey[] {
  const [theirs, ours] = [writeRow(row, site, 'as-entered'), writeRow(record, site, 'as-entered')]
  const compared = INPUT_KEYS.filter((key) => !NOT_COMPARED.includes(key))
  if (UNIT_COLUMNS.every((key) => theirs[key] === ours[key])) return compared.filter((key) => !isSame(theirs[key], ours[key], 0))
  const [a, b] = [row, record].map((test) => writeRow({ ...test, sheet: convertSheet(test.sheet, 'si') }, site, 'as-entered')) as [RowValues, RowValues]
  return compared.filter((key) => !UNIT_COLUMNS.includes(key) && !isSame(a[key], b[key], AGREES))
}

function isSame(a: string | number | undefined, b: string | number | undefined, part: number): boolean {
  if (typeof a === 'number' && typeof b === 'number') return a === b || Math.abs(a - b) <= part * Math.max(Math.abs(a), Math.abs(b), LEAST)
  if (typeof a === 'string' && typeof b === 'string') return plainLines(a) === plainLines(b)
  return a === b
}

/** Spreadsheets change the ends of lines. */
const plainLines = (text: string): string => text.replace(/\r\n?/g, '\n')
