import { CONFIRMED, FOLLOW_WORDS, PURPOSE_WORDS, plainWord } from '#shared/exchange/exchange-words.ts'
import { readSheetRow } from '#shared/exchange/read-sheet-row.ts'
import { RowReader, type ReadOptions } from '#shared/exchange/row-reader.ts'
import { readSiteTime } from '#shared/exchange/site-time.ts'
import { COLUMN_KEYS, type ColumnKey, type RowCells } from '#shared/exchange/test-columns.ts'
import { importTestSchema, type ImportTest, type RowProblem } from '#shared/schemas/test-exchange.ts'
import { idSchema } from '#shared/schemas/common.ts'
import { toMicrometres, type LengthUnit } from '#shared/units/length.ts'

export interface ReadRow {
  /** null where something is wrong, which `problems` then says */
  readonly test: ImportTest | null
  readonly problems: readonly RowProblem[]
  /** the file names the record itself */
  readonly identified: boolean
  /** what the source calls it */
  readonly reference: string
}

/**
 * Reads one row of a file as a test. Every cell that is wrong is told, each by its column; whether the test fits the site
 * (its place, lift, curve, arithmetic) is for the server to say.
 * @param cells texts by column
 * @param id of the record, where the file names none
 */
export function readRow(cells: RowCells, options: ReadOptions, id: string): ReadRow {
  const row = new RowReader(cells, options)
  const record = row.text('record')
  const named = record === '' ? null : idSchema.safeParse(record)
  if (named?.success === false) row.fail('record', 'This is no record id. Clear it if this test is new here.')
  const draft = {
    id: named?.success === true ? named.data : id,
    purpose: row.choice('purpose', PURPOSE_WORDS),
    follows: readFollows(row),
    stake: row.text('stake') || null,
    place: readPlace(row),
    lift: row.number('lift'),
    liftConfirmed: readConfirmed(row),
    surfaceUm: readLength(row, 'surface', 'elevation') ?? null,
    depthUm: readLength(row, 'depth', 'depth') ?? 0,
    sampledAt: readTime(row),
    curve: readName(row, 'curve', 'Give the reference curve it is judged by.'),
    oversizePercent: row.optional('oversizePercent') ?? null,
    sheet: readSheetRow(row),
    gauge: row.text('gauge') || null,
    moistureGauge: row.text('moistureGauge') || null,
    calibrations: readCalibrations(row),
    remarks: row.text('remarks'),
  }
  if (row.has('voidedAt') || row.has('voidReason')) row.fail('voidedAt', 'It was void where it comes from. Set it aside; a void test is not recorded again.')
  const found = { identified: named !== null, reference: row.text('number').slice(0, 80) }
  if (row.problems.length > 0) return { ...found, test: null, problems: row.problems }
  const test = importTestSchema.safeParse(draft)
  if (test.success) return { ...found, test: test.data, problems: [] }
  return { ...found, test: null, problems: test.error.issues.map(({ path, message }) => ({ column: columnOfPath(path.map(String)), message })) }
}

function readName(row: RowReader, key: ColumnKey, missing: string): string {
  const text = row.text(key)
  if (text === '') row.fail(key, missing)
  return text
}

function readConfirmed(row: RowReader): boolean {
  const text = row.text('liftConfirmed')
  const said = plainWord(text)
  if (said === '' || said === 'no' || said === 'false' || said === '0') return false
  if (![plainWord(CONFIRMED), 'y', 'true', '1'].includes(said)) row.fail('liftConfirmed', 'Write Yes, or leave it empty.')
  return true
}

function readFollows(row: RowReader): ImportTest['follows'] {
  const record = row.text('followsRecord')
  const number = row.text('follows')
  if (record === '' && number === '') {
    if (row.text('followKind') !== '') row.fail('follows', 'Say which test it follows.')
    return null
  }
  const kind = row.choice('followKind', FOLLOW_WORDS)
  const id = record === '' ? null : idSchema.safeParse(record)
  if (id?.success === false) row.fail('followsRecord', 'This is no record id. Name the test it follows by its number instead.')
  return kind === undefined ? null : { kind, record: id?.success === true ? id.data : null, number: number.slice(0, 40) || null }
}

function readPlace(row: RowReader): ImportTest['place'] {
  const cell = row.text('cell')
  if (!row.has('easting') && !row.has('northing')) {
    if (cell === '') row.fail('cell', 'Say where it was taken: easting and northing, or a cell such as N4.')
    return { cell }
  }
  const unit = row.unit<LengthUnit>('plan', ['easting', 'northing'])
  const { planUnit } = row.options
  if (unit !== planUnit) row.fail('easting', `The file gives coordinates in ${unit}; those of this site are in ${planUnit}.`)
  return { easting: row.number('easting'), northing: row.number('northing') }
}

function readLength(row: RowReader, key: 'surface' | 'depth', group: 'elevation' | 'depth'): number | undefined {
  const value = row.optional(key)
  return value === undefined || Number.isNaN(value) ? undefined : toMicrometres(value, row.unit<LengthUnit>(group, [key]))
}

function readTime(row: RowReader): string {
  const { timeZone, dateOrder } = row.options
  const text = row.text('sampledAt')
  const [time, offset] = [row.text('sampledTime'), row.text('utcOffset')]
  if (text === '') {
    row.fail('sampledAt', 'Give the date and time it was sampled.')
    return ''
  }
  const read = readSiteTime(text, { timeZone, order: dateOrder, time, offset })
  if (!read.ok) row.fail('sampledAt', read.message)
  return read.ok ? read.instant : ''
}

const CALIBRATION = /(.*?) @ (\d{4}-\d{2}-\d{2}T[\d:.]+Z)(?:; |$)/gsy

function readCalibrations(row: RowReader): ImportTest['calibrations'] {
  const text = row.text('calibrations')
  const found = [...text.matchAll(CALIBRATION)]
  if (found.reduce((sum, [whole]) => sum + whole.length, 0) !== text.length) {
    row.fail('calibrations', 'Write each calibration as its apparatus, @ and the time it was performed: Sand, batch 4 @ 2026-11-02T16:00:00.000Z.')
    return []
  }
  return found.map(([, apparatus = '', performedAt = '']) => ({ apparatus, performedAt }))
}

const SHEET_COLUMN: Readonly<Record<string, ColumnKey>> = {
  volume: 'cylinderVolume',
  diameter: 'cylinderDiameter',
  height: 'cylinderHeight',
  density: 'dryDensity',
  gaugeId: 'gauge',
  calibrationIds: 'calibrations',
  mode: 'gaugeMode',
  'standardCounts.density': 'standardDensity',
  'standardCounts.moisture': 'standardMoisture',
  'standardCounts.referenceDensity': 'referenceDensity',
  'standardCounts.referenceMoisture': 'referenceMoisture',
  'moisture.percent': 'moisturePercent',
  'moisture.readingPercent': 'carbideReading',
  'moisture.massUnit': 'tinUnit',
  'moisture.densityUnit': 'waterUnit',
  'moisture.wall.offset': 'wallOffset',
  'moisture.wall.convention': 'wallConvention',
  'moisture.wall.appliedBy': 'wallAppliedBy',
  'moisture.gaugeId': 'gauge',
}
const TEST_COLUMN: Readonly<Record<string, ColumnKey>> = { id: 'record', at: 'easting', place: 'easting', stakeId: 'stake', surfaceUm: 'surface', depthUm: 'depth', curveId: 'curve' }

/**
 * The column that a field of a test stands in.
 * @param path of the field: ['sheet', 'moisture', 'tin'], ['depthUm']
 */
export function columnOfPath(path: readonly string[]): ColumnKey {
  const [top = '', ...rest] = path
  const inner = rest.join('.').replace(/^moisture\.earlier.*/, 'moisture.earlier').replace(/^calibrationIds.*/, 'calibrationIds')
  const key = top === 'sheet' ? (SHEET_COLUMN[inner] ?? rest.at(-1) ?? 'method') : (TEST_COLUMN[top] ?? top)
  return COLUMN_KEYS.find((column) => column === key) ?? (top === 'sheet' ? 'method' : 'record')
}
