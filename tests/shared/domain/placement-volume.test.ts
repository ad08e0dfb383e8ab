import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { apportion } from '#shared/domain/apportion.ts'
import type { PlacementVolumeInput } from '#shared/domain/placement-volume.ts'
import { layerVolumeCm3, placementVolume, quarterCount, WHOLE_CELL } from '#shared/domain/placement-volume.ts'
import { convertVolume } from '#shared/units/volume.ts'
import { SEEDED } from './plan-arbitraries.ts'

const CELL_25_FT = 7620 ** 2
const layer = { bottomUm: 0, topUm: 203_200 }
const whole = { areaMm2: CELL_25_FT, layer, quarters: WHOLE_CELL }

function placed(input: Partial<PlacementVolumeInput>, drivenBy: 'geometry' | 'loads' = 'geometry') {
  const result = placementVolume({ cells: [whole], loads: undefined, loadVolumeCm3: 0, looseToCompacted: 0.72, ...input }, drivenBy)
  if (!result.ok) throw new Error(result.reason)
  return result
}

describe('the volume of a layer in a cell', () => {
  // G-1 of the check values: a 50 × 50 ft cell filled 2.15 ft is 199.07 yd³
  it('is area times thickness', () => {
    const cm3 = layerVolumeCm3((50 * 304.8) ** 2, 2.15 * 304_800)
    expect(convertVolume(cm3, 'cm3', 'yd3')).toBeCloseTo(199.07, 2)
  })

  it('counts the quarters that are placed', () => {
    expect(layerVolumeCm3(4_000_000, 250_000)).toBe(1_000_000)
    expect(layerVolumeCm3(4_000_000, 250_000, 0b0101)).toBe(500_000)
    expect(layerVolumeCm3(4_000_000, 250_000, 0b0111)).toBe(750_000)
    expect([1, 2, 4, 8, 3, 7, 15].map(quarterCount)).toEqual([1, 1, 1, 1, 2, 3, 4])
  })
})

describe('the volume of a placement', () => {
  it('comes from geometry, with loads beside it and their difference', () => {
    // 25 ft × 25 ft × 8 in = 416.667 ft³ × 28,316.846592 = 11,798,686.08 cm³
    const result = placed({ loads: 2, loadVolumeCm3: 9_000_000 })
    expect(result).toMatchObject({ geometryCm3: 11_798_686, loadsCm3: 12_960_000, drivingCm3: 11_798_686, flagged: false })
    expect(result.differencePercent).toBeCloseTo(9.84, 2)
    expect(result.perCell).toEqual([11_798_686])
  })

  it('comes from loads where the zone says so, shared by the cells in proportion', () => {
    const half = { ...whole, quarters: 0b0011 }
    const result = placed({ cells: [whole, half], loads: 3, loadVolumeCm3: 9_000_000 }, 'loads')
    expect(result).toMatchObject({ drivenBy: 'loads', drivingCm3: 19_440_000 })
    expect(result.perCell).toEqual([12_960_000, 6_480_000])
  })

  it('falls back on geometry, and says so, when no loads were entered', () => {
    expect(placed({}, 'loads')).toMatchObject({ drivenBy: 'geometry', loadsCm3: undefined, differencePercent: undefined, flagged: false })
  })

  it('flags a difference above 15 percent either way, not one of exactly 15', () => {
    const cells = [{ areaMm2: 100_000_000, layer: { bottomUm: 0, topUm: 100_000 }, quarters: WHOLE_CELL }]
    const flagOf = (loadVolumeCm3: number) => placed({ cells, loads: 1, loadVolumeCm3, looseToCompacted: 1 }).flagged
    expect([11_500_000, 11_500_001, 8_500_000, 8_499_999].map(flagOf)).toEqual([false, true, false, true])
  })

  it('gives a reason where there is no volume', () => {
    const base = { loads: undefined, loadVolumeCm3: 1, looseToCompacted: 1 }
    expect(placementVolume({ ...base, cells: [] }, 'geometry')).toEqual({ ok: false, reason: 'No cells are chosen.' })
    const empty = { ...whole, layer: { bottomUm: 5, topUm: 5 } }
    expect(placementVolume({ ...base, cells: [empty] }, 'geometry')).toMatchObject({ ok: false })
    expect(placementVolume({ ...base, cells: [whole], loads: 0 }, 'loads')).toMatchObject({ ok: false })
  })

  it('shares exactly, for any cells and loads', () => {
    const cell = fc.record({
      areaMm2: fc.integer({ min: 600_000, max: 100_000_000 }),
      layer: fc.integer({ min: 50_000, max: 600_000 }).map((topUm) => ({ bottomUm: 0, topUm })),
      quarters: fc.integer({ min: 1, max: 15 }),
    })
    fc.assert(
      fc.property(fc.array(cell, { minLength: 1, maxLength: 80 }), fc.integer({ min: 1, max: 500 }), (cells, loads) => {
        const result = placed({ cells, loads, loadVolumeCm3: 9_174_658 }, 'loads')
        expect(result.perCell.reduce((a, b) => a + b, 0)).toBe(result.loadsCm3)
        expect(result.perCell.every((cm3) => Number.isInteger(cm3) && cm3 >= 0)).toBe(true)
      }),
      { ...SEEDED, numRuns: 200 },
    )
  })
})

describe('sharing by largest remainder', () => {
  // Hamilton apportionment by hand: quotas 4.7, 3.1, 2.2 of 10 → floors 4, 3, 2, the one left to the largest remainder
  it('gives what is left to the largest remainders, ties to the first', () => {
    expect(apportion(10, [47, 31, 22])).toEqual([5, 3, 2])
    expect(apportion(1, [1, 1, 1])).toEqual([1, 0, 0])
    expect(apportion(0, [1, 2])).toEqual([0, 0])
    expect(apportion(5, [0, 1, 0])).toEqual([0, 5, 0])
  })

  it('keeps every share within one of its exact part, and the sum exact', () => {
    const weights = fc.array(fc.integer({ min: 0, max: 1e9 }), { minLength: 1, maxLength: 60 }).filter((w) => w.some((x) => x > 0))
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1e13 }), weights, (total, given) => {
        const shares = apportion(total, given)
        const sum = given.reduce((a, b) => a + b, 0)
        expect(shares.reduce((a, b) => a + b, 0)).toBe(total)
        shares.forEach((share, i) => expect(Math.abs(share - (total * (given[i] ?? 0)) / sum)).toBeLessThan(1.01))
      }),
      { ...SEEDED, numRuns: 300 },
    )
  })

  it('refuses to share by nothing or to share a part of a whole', () => {
    expect(() => apportion(5, [0, 0])).toThrow(RangeError)
    expect(() => apportion(1.5, [1])).toThrow(RangeError)
  })
})
