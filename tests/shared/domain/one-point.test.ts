import { describe, expect, it } from 'vitest'
import { reduceOnePoint } from '#shared/domain/one-point.ts'
import type { OnePointSheet } from '#shared/domain/one-point.ts'
import { convertDensity } from '#shared/units/density.ts'

const stated = (percent: number) => ({ method: 'stated', percent }) as const
const MOULD: OnePointSheet = { kind: 'mould', massUnit: 'lb', mouldAndSoil: 14.13, mould: 10, mouldVolume: 1 / 30, volumeUnit: 'ft3', moisture: stated(10.4) }

describe('reduceOnePoint', () => {
  it('works dry density out of mould, volume and moisture', () => {
    // 4.13 lb in 1/30 ft³: 123.9 pcf wet; over 1.104 112.2 pcf dry (T 99 calculation)
    const reduced = reduceOnePoint(MOULD)
    if (!reduced.ok) throw new Error(reduced.problems[0]?.message)
    expect(convertDensity(reduced.wetDensity, 'kg/m3', 'pcf')).toBeCloseTo(123.9, 6)
    expect(convertDensity(reduced.dryDensity, 'kg/m3', 'pcf')).toBeCloseTo(123.9 / 1.104, 6)
  })

  it('gives the same from the wet density', () => {
    const direct = reduceOnePoint({ kind: 'density', densityUnit: 'pcf', wetDensity: 123.9, moisture: stated(10.4) })
    const weighed = reduceOnePoint(MOULD)
    if (!direct.ok || !weighed.ok) throw new Error('Both are ordinary sheets')
    expect(direct.dryDensity).toBeCloseTo(weighed.dryDensity, 6)
    expect(direct.moisture).toBe(weighed.moisture)
  })

  it('names the field that is wrong', () => {
    const fields = (sheet: OnePointSheet) => {
      const reduced = reduceOnePoint(sheet)
      return reduced.ok ? [] : reduced.problems.map((problem) => problem.field)
    }
    expect(fields({ ...MOULD, mould: 20 })).toEqual(['mouldAndSoil'])
    expect(fields({ ...MOULD, mouldVolume: 0, mould: Number.NaN })).toEqual(['mould', 'mouldVolume'])
    expect(fields({ ...MOULD, mouldVolume: 1 })).toEqual(['mouldAndSoil'])
    expect(fields({ kind: 'density', densityUnit: 'pcf', wetDensity: 1200, moisture: stated(10) })).toEqual(['wetDensity'])
    expect(fields({ ...MOULD, moisture: { method: 'oven', massUnit: 'g', wetAndTin: 100, dryAndTin: 110, tin: 20 } })).toEqual(['moisture.dryAndTin'])
    expect(fields({ ...MOULD, moisture: { method: 'carbide', readingPercent: Number.NaN } })).toEqual(['moisture.readingPercent'])
  })
})
