import { describe, expect, it } from 'vitest'
import { makeUnits } from '#web/lib/units.ts'

const us = makeUnits('us', 'America/Los_Angeles')
const si = makeUnits('si', 'Europe/Berlin')
const thin = '\u2009'

describe('figures in the site’s units', () => {
  // exact: 1 yd³ = 764,554.857984 cm³, 1 in = 25,400 µm, 1 ft = 304,800 µm, 1 US gallon = 3.785411784 L, 1 acre = 43,560 ft²
  it('writes what is kept', () => {
    expect(us.volume(3410 * 764_554.857984)).toBe(`3,410${thin}cy`)
    expect(us.thickness(8 * 25_400)).toBe(`8${thin}in`)
    expect(us.elevation(419.25 * 304_800)).toBe(`419.25${thin}ft`)
    expect(us.water(3.785411784 * 5680)).toBe(`5,680${thin}gal`)
    expect(us.siteArea(14.6 * 43_560 * 304.8 ** 2)).toBe(`14.6${thin}ac`)
    expect(si.siteArea(59_100 * 1e6)).toBe(`5.9${thin}ha`)
    expect(si.volume(2607e6)).toBe(`2,607${thin}m³`)
  })

  it.each([
    ['8', 203_200],
    ['8.25', 209_550],
    [' 8.0 ', 203_200],
  ])('reads the thickness %s in as %d µm', (text, um) => {
    expect(us.parse.thicknessUm(text)).toEqual({ ok: true, value: um })
  })

  it('reads numbers as people type them and says why others cannot be taken', () => {
    expect(us.parse.number('1,180')).toEqual({ ok: true, value: 1180 })
    expect(us.parse.number('\u22122.5')).toEqual({ ok: true, value: -2.5 })
    expect(us.parse.number('')).toEqual({ ok: false, reason: 'Give a number' })
    expect(us.parse.number('11,8')).toMatchObject({ ok: false })
    expect(us.parse.number('1e5')).toMatchObject({ ok: false })
    expect(us.parse.number('12 in')).toMatchObject({ ok: false })
  })

  it('gives back what was typed when it fills a field again', () => {
    expect(us.field.thicknessUm(203_200)).toBe('8')
    expect(us.field.elevationUm(419.25 * 304_800)).toBe('419.25')
    expect(si.field.thicknessUm(200_000)).toBe('200')
    const loads = us.parse.volumeCm3('16')
    expect(loads.ok && us.field.volumeCm3(loads.value)).toBe('16')
  })
})

describe('times on the site’s clock', () => {
  it('writes an instant in the site’s zone, whatever the device’s is', () => {
    expect(us.timeWithSeconds('2026-12-01T22:32:07Z')).toBe('14:32:07')
    expect(us.dateTime('2026-12-01T07:05:00Z')).toBe('Nov 30, 23:05')
    expect(si.time('2026-12-01T23:00:00Z')).toBe('00:00')
    expect(us.date('no date')).toBe('–')
  })

  it('reads a typed local time as the instant it names, winter and summer', () => {
    expect(us.parse.instant('2026-12-01T14:32')).toBe('2026-12-01T22:32:00.000Z')
    expect(us.parse.instant('2026-07-01T14:32')).toBe('2026-07-01T21:32:00.000Z')
    expect(us.parse.instant('yesterday')).toBeNull()
    expect(us.field.instant('2026-12-01T22:32:00Z')).toBe('2026-12-01T14:32')
  })
})
