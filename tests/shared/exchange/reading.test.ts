import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readUnit } from '#shared/exchange/exchange-units.ts'
import { inHappenedOrder } from '#shared/exchange/happened-order.ts'
import { findHeadLine, matchHead } from '#shared/exchange/match-heads.ts'
import { guessDecimalMark, readNumber } from '#shared/exchange/read-number.ts'
import { readRow } from '#shared/exchange/read-row.ts'
import { guessDateOrder, readSiteTime, writeSiteTime } from '#shared/exchange/site-time.ts'
import type { RowCells } from '#shared/exchange/test-columns.ts'
import { readOptions } from '#tests/factories/import-test.ts'

const timeZone = 'America/Los_Angeles'
const read = (text: string, more: { order?: 'ymd' | 'mdy' | 'dmy'; time?: string; offset?: string } = {}) => readSiteTime(text, { timeZone, order: 'mdy', ...more })
const instant = (text: string, more = {}) => {
  const found = read(text, more)
  return found.ok ? found.instant : found.message
}

describe('a time of a file', () => {
  // Pacific time: UTC-8 in winter, UTC-7 from 2026-03-08 10:00Z to 2026-11-01 09:00Z (IANA time zone database, from memory)
  it('is read with its offset, or on the site’s clock, in the order of its file', () => {
    expect(instant('2026-12-01T14:32:00-08:00')).toBe('2026-12-01T22:32:00.000Z')
    expect(instant('2026-12-01 14:32')).toBe('2026-12-01T22:32:00.000Z')
    expect(instant('7/1/2026 2:32 pm')).toBe('2026-07-01T21:32:00.000Z')
    expect(instant('7/1/2026 14:32', { order: 'dmy' })).toBe('2026-01-07T22:32:00.000Z')
    expect(instant('1.12.2026', { order: 'dmy', time: '12:05 am' })).toBe('2026-12-01T08:05:00.000Z')
    expect(instant('2026-12-01T00:00:00', { time: '1899-12-30T09:15:00' })).toBe('2026-12-01T17:15:00.000Z')
    expect(instant('2026-12-01T14:32:00', { offset: '+01:00' })).toBe('2026-12-01T13:32:00.000Z')
  })

  it('that the clock showed twice, or not at all, is asked about', () => {
    expect(instant('2026-11-01 01:30')).toContain('twice that day')
    expect(instant('2026-03-08 02:30')).toContain('put forward')
    expect(instant('2026-11-01 01:30', { offset: '-07:00' })).toBe('2026-11-01T08:30:00.000Z')
  })

  it('that is none is refused with what to write', () => {
    expect(instant('soon')).toContain('Write the date as')
    expect(instant('12/1/26 9:00')).toContain('whole year')
    expect(instant('2026-12-01')).toContain('time of day')
    expect(instant('2026-02-30 9:00')).toContain('There is no day 30')
    expect(instant('2026-12-01 25:00')).toContain('14:32')
  })

  it('comes back exactly from how it is written', () => {
    const dates = fc.date({ min: new Date('1970-01-01T00:00:00Z'), max: new Date('2100-01-01T00:00:00Z'), noInvalidDate: true })
    fc.assert(fc.property(dates, fc.constantFrom('America/Los_Angeles', 'Asia/Kathmandu', 'Europe/Berlin', 'UTC', 'Australia/Lord_Howe'), (date, zone) => {
      expect(readSiteTime(writeSiteTime(date.toISOString(), zone), { timeZone: zone, order: 'ymd' })).toEqual({ ok: true, instant: date.toISOString() })
    }))
  })

  it('tells the order of day and month where a day is past the twelfth', () => {
    expect(guessDateOrder(['12/1/2026', '12/13/2026'])).toBe('mdy')
    expect(guessDateOrder(['1/12/2026', '13/12/2026'])).toBe('dmy')
    expect(guessDateOrder(['1/12/2026'])).toBeNull()
    expect(guessDateOrder(['1.12.2026'])).toBe('dmy')
    expect(guessDateOrder(['2026-12-01'])).toBe('ymd')
  })
})

describe('a number of a file', () => {
  it('is read by the file’s decimal mark, with its thousands', () => {
    expect([readNumber('1,234.5', '.'), readNumber('1.234,5', ','), readNumber('1 234,5', ','), readNumber('\u22120.5', '.'), readNumber('1e-7', '.'), readNumber('.5', '.')]).toEqual([1234.5, 1234.5, 1234.5, -0.5, 1e-7, 0.5])
    expect([readNumber('1,5', '.'), readNumber('12.5', ','), readNumber('NaN', '.'), readNumber('0x10', '.'), readNumber('1e999', '.'), readNumber('', '.'), readNumber('4%', '.'), readNumber('1-2', '.')].filter((value) => value !== undefined)).toEqual([])
  })

  it('comes back from its shortest text', () => {
    fc.assert(fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => readNumber(String(value), '.') === value))
  })

  it('tells its decimal mark where it can', () => {
    expect(guessDecimalMark(['112,5', '13,1'])).toBe(',')
    expect(guessDecimalMark(['112.5', '1,112.5'])).toBe('.')
    expect(guessDecimalMark(['1,234', '2,100'])).toBeNull()
    expect(guessDecimalMark(['10', '6'])).toBe('.')
  })
})

describe('the head of a column', () => {
  it('is known by its name and other names, with its unit', () => {
    expect(matchHead('Wet density (pcf)')).toEqual({ key: 'wetDensity', unit: 'pcf', isResult: false })
    expect(matchHead('wet unit weight [lb/ft³]')).toEqual({ key: 'wetDensity', unit: 'pcf', isResult: false })
    expect(matchHead('Proctor No.')).toMatchObject({ key: 'curve' })
    expect(matchHead('Result, dry density (pcf)')).toEqual({ key: null, unit: null, isResult: true })
    expect(matchHead('Colour')).toEqual({ key: null, unit: null, isResult: false })
    expect([readUnit('lbs', 'mass'), readUnit('g/cc', 'density'), readUnit('pcf', 'mass'), readUnit('cu.ft', 'volume')]).toEqual(['lb', 'g/cm3', undefined, 'ft3'])
  })

  it('is found beneath the titles of a laboratory', () => {
    expect(findHeadLine([['Field density report'], ['Project', 'North'], ['Date', 'Lift', 'Wet density', 'Remarks'], ['2026-12-01', '1', '128', '']])).toBe(2)
  })
})

describe('a row', () => {
  const cells: RowCells = { purpose: 'required', sampledAt: '2026-12-01 09:15', cell: 'N4', lift: '3', curve: 'RB-3', method: 'plain', wetDensity: '128.4', moisturePercent: '13.1 %' }
  const columns = (more: RowCells) => readRow({ ...cells, ...more }, readOptions(), '00000000-0000-4000-8000-000000000001').problems.map(({ column }) => column)

  it('is told every cell that is wrong at once', () => {
    expect(columns({})).toEqual([])
    expect(columns({ purpose: 'fun', lift: 'three', curve: '', wetDensity: 'heavy' })).toEqual(['purpose', 'lift', 'curve', 'wetDensity'])
  })

  it('loses no reading: one that its method has no place for is told', () => {
    expect(columns({ rodDepth: '6' })).toEqual(['rodDepth'])
    expect(columns({ dryDensity: '113.5' })).toEqual(['wetDensity'])
    expect(columns({ wetAndTin: '200' })).toContain('moistureMethod')
  })

  it('weighs one sheet in one unit', () => {
    const cone: RowCells = { method: 'Sand cone', wetDensity: '', apparatusBefore: '15', apparatusAfter: '6', coneAndPlate: '3', sandDensity: '90', moistSoil: '8' }
    expect(columns(cone)).toEqual([])
    const read = readRow({ ...cells, ...cone }, readOptions({ headUnits: { moistSoil: 'g' } }), '00000000-0000-4000-8000-000000000001')
    expect(read.problems).toEqual([{ column: 'moistSoil', message: expect.stringContaining('One sheet has one unit') }])
  })

  it('that was void where it comes from is not recorded again', () => {
    expect(columns({ voidReason: 'Wrong sheet' })).toEqual(['voidedAt'])
  })
})

describe('the order of rows', () => {
  const row = (line: number, hour: number, follows: string | null = null) => ({ line, test: { id: `r${line}`, sampledAt: `2026-12-01T0${hour}:00:00Z`, follows: follows === null ? null : { record: follows } } })

  it('is that in which they happened, each behind the one it follows, and a ring of them ends', () => {
    expect(inHappenedOrder([row(1, 3), row(2, 1), row(3, 2)]).map(({ line }) => line)).toEqual([2, 3, 1])
    expect(inHappenedOrder([row(1, 1, 'r2'), row(2, 1), row(3, 1)]).map(({ line }) => line)).toEqual([2, 1, 3])
    expect(inHappenedOrder([row(1, 1, 'r2'), row(2, 2, 'r1')]).map(({ line }) => line).sort()).toEqual([1, 2])
  })
})
