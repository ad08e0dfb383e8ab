import fc from 'fast-check'
import type { RawSheet } from '#shared/domain/field-sheets.ts'
import { usesGauge } from '#shared/domain/gauge-check.ts'
import { usualUnits } from '#shared/exchange/exchange-units.ts'
import type { ReadOptions } from '#shared/exchange/row-reader.ts'
import type { ExchangeSite } from '#shared/exchange/write-row.ts'
import { importTestSchema, type ImportTest } from '#shared/schemas/test-exchange.ts'
import { likelySheet } from '#tests/factories/hostile-sheet.ts'

export const EXCHANGE_SITE: ExchangeSite = { timeZone: 'America/Los_Angeles', system: 'us', planUnit: 'us-ft' }

export const readOptions = (overrides: Partial<ReadOptions> = {}): ReadOptions => ({
  headUnits: {},
  groupUnits: usualUnits('us', 'us-ft'),
  decimal: '.',
  dateOrder: 'ymd',
  timeZone: EXCHANGE_SITE.timeZone,
  planUnit: 'us-ft',
  ...overrides,
})

/** Words as people write them, and those that files stumble over. */
const STUMBLING = ['=1+1', '+1', '-1', '@x', "'=1", "''=1", "'", 'a, b; c', 'say "so"', 'first\nsecond', 'first\r\nsecond', '# no comment', 'Tölz – 95 % ≥', ' ', '_x000D_', '\u0001', '<&>', '𝛾', '1,234', 'NULL', '😀']
const line = (maxLength: number) => fc.oneof(fc.string({ unit: 'grapheme', maxLength }), fc.constantFrom(...STUMBLING)).map((text) => text.slice(0, maxLength).replace(/\p{Surrogate}/gu, '').trim())
const name = (maxLength: number) => line(maxLength).map((text) => text.replace(/ @ |[\r\n]/g, '').trim() || 'RB-3')

const instant = fc.date({ min: new Date('2020-01-01T00:00:00Z'), max: new Date('2030-01-01T00:00:00Z'), noInvalidDate: true }).map((date) => date.toISOString())
const figure = (min: number, max: number) => fc.double({ min, max, noNaN: true }).map((value) => (value === 0 ? 0 : value))

const hasApparatus = ({ method }: RawSheet): boolean => method === 'sand-cone' || method === 'rubber-balloon' || method === 'drive-cylinder'
/** JSON keeps no negative zero, so none is on record. */
const asStored = <T>(value: T): T => JSON.parse(JSON.stringify(value)) as T

/** Any test that can stand on record, of every field and moisture method. */
export const anyImportTest: fc.Arbitrary<ImportTest> = fc
  .record({
    id: fc.uuid(),
    purpose: fc.constantFrom('required' as const, 'judgement' as const, 'verification' as const, 'referee' as const),
    follows: fc.option(fc.record({ kind: fc.constantFrom('retest' as const, 'rerun' as const), record: fc.uuid(), number: fc.constant(null) })),
    stake: fc.option(name(12)),
    place: fc.record({ easting: figure(-1e7, 1e7), northing: figure(-1e7, 1e7) }),
    lift: fc.integer({ min: 1, max: 500 }),
    liftConfirmed: fc.boolean(),
    surfaceUm: fc.option(fc.integer({ min: -5e8, max: 9e9 })),
    depthUm: fc.integer({ min: 0, max: 3_000_000 }),
    sampledAt: instant,
    curve: name(80),
    oversizePercent: fc.option(figure(0, 100)),
    sheet: likelySheet,
    gauge: fc.option(name(80)),
    moistureGauge: fc.option(name(80)),
    calibrations: fc.array(fc.record({ apparatus: name(80), performedAt: instant }), { maxLength: 4 }),
    remarks: line(2000),
  })
  .map((test) =>
    importTestSchema.parse(
      asStored({
        ...test,
        gauge: usesGauge(test.sheet) ? test.gauge : null,
        moistureGauge: test.sheet.moisture.method === 'gauge' ? test.moistureGauge : null,
        calibrations: hasApparatus(test.sheet) ? test.calibrations : [],
      }),
    ),
  )
