import { describe, expect, it } from 'vitest'
import { lotKey, workDay } from '#shared/domain/lots.ts'

const at = (text: string) => Date.parse(text)

describe('the working day', () => {
  it('is the calendar day of the site, not of Greenwich', () => {
    // Denver is UTC−6 in July: 02:00 UTC is 20:00 of the day before
    expect(workDay(at('2026-07-15T02:00:00Z'), 'America/Denver')).toBe('2026-07-14')
    expect(workDay(at('2026-07-15T18:00:00Z'), 'America/Denver')).toBe('2026-07-15')
  })

  it('lets the hours before the cut belong to the day before', () => {
    expect(workDay(at('2026-07-15T10:59:59Z'), 'America/Denver')).toBe('2026-07-14')
    expect(workDay(at('2026-07-15T11:00:00Z'), 'America/Denver')).toBe('2026-07-15')
    expect(workDay(at('2026-07-15T06:30:00Z'), 'America/Denver', 0)).toBe('2026-07-15')
  })

  it('goes back over the end of a month and a year', () => {
    expect(workDay(at('2026-03-01T04:00:00Z'), 'UTC')).toBe('2026-02-28')
    expect(workDay(at('2027-01-01T01:00:00Z'), 'UTC')).toBe('2026-12-31')
  })

  it('follows the clock on the wall when summer time begins', () => {
    // in Denver 2026-03-08 02:00 becomes 03:00: 11:00 UTC is 05:00 summer time, 10:59 UTC is 04:59
    expect(workDay(at('2026-03-08T10:59:00Z'), 'America/Denver')).toBe('2026-03-07')
    expect(workDay(at('2026-03-08T11:00:00Z'), 'America/Denver')).toBe('2026-03-08')
  })

  it('refuses a name that is no time zone', () => {
    expect(() => workDay(0, 'Nowhere/Else')).toThrow(RangeError)
  })
})

describe('the lot key', () => {
  const parts = { zoneId: 'z', lift: 3, materialId: 'm', day: '2026-07-14' }

  it('holds the day only where the basis is lift and day', () => {
    expect(lotKey('lift-day', parts)).toBe('z|3|m|2026-07-14')
    expect(lotKey('lift', parts)).toBe('z|3|m')
  })

  it('parts two materials on either basis', () => {
    expect(lotKey('lift', parts)).not.toBe(lotKey('lift', { ...parts, materialId: 'n' }))
  })
})
