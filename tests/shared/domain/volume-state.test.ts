import { describe, expect, expectTypeOf, it } from 'vitest'
import type { Volume } from '#shared/domain/volume-state.ts'
import { addVolumes, bankFromCompacted, compactedFromLoose, loadFactor, looseFromBank, looseToCompactedFactor, volumeOf } from '#shared/domain/volume-state.ts'
import { convertVolume } from '#shared/units/volume.ts'

const cm3 = (value: number, unit: 'm3' | 'yd3' | 'ft3') => convertVolume(value, unit, 'cm3')
const inUnit = (value: number, unit: 'm3' | 'yd3') => convertVolume(value, 'cm3', unit)

describe('bank, loose and compacted volumes', () => {
  // published swell table: swell % → load factor
  it.each([
    [5, 0.952],
    [10, 0.909],
    [15, 0.87],
    [20, 0.833],
    [25, 0.8],
    [30, 0.769],
    [35, 0.741],
  ])('give the load factor of the table for a swell of %d %%', (swellPercent, factor) => {
    expect(loadFactor({ swellPercent })).toBeCloseTo(factor, 3)
  })

  // V-1: 200 × 20 × 2 at 40 % swell; the page truncates 414.81 to 414
  it('swell from the cut to the truck', () => {
    expect(inUnit(looseFromBank(volumeOf('bank', cm3(8000, 'm3')), { swellPercent: 40 }).cm3, 'm3')).toBeCloseTo(11_200, 6)
    expect(inUnit(looseFromBank(volumeOf('bank', cm3(8000, 'ft3')), { swellPercent: 40 }).cm3, 'yd3')).toBeCloseTo(414.81, 2)
  })

  // V-2: 200 bank yd³ at 40 % → 280 loose; 90 compacted at 10 % shrink ← 100 bank; the other 100 → 140 loose
  it('shrink into the fill', () => {
    expect(inUnit(looseFromBank(volumeOf('bank', cm3(200, 'yd3')), { swellPercent: 40 }).cm3, 'yd3')).toBeCloseTo(280, 6)
    const needed = bankFromCompacted(volumeOf('compacted', cm3(90, 'yd3')), { shrinkPercent: 10 })
    expect(inUnit(needed.cm3, 'yd3')).toBeCloseTo(100, 6)
    expect(inUnit(looseFromBank(needed, { swellPercent: 40 }).cm3, 'yd3')).toBeCloseTo(140, 6)
  })

  // V-3: basalt 4950 lb per bank yd³, swell 67 % → load factor 0.599, 2964.07 lb per loose yd³ unrounded
  it('give the loose weight of blasted basalt', () => {
    expect(loadFactor({ swellPercent: 67 })).toBeCloseTo(0.599, 3)
    expect(4950 * loadFactor({ swellPercent: 67 })).toBeCloseTo(2964.07, 2)
  })

  // extra data (answer sites, by their computed values): V-4, V-5, V-7; shrink = 1 − (1 + e fill)/(1 + e pit)
  it.each([
    [150_000, 0.8, 1.4, 200_000],
    [5000, 0.7, 0.85, 5441.18],
    [5000, 0.7, 0.95, 5735.29],
    [5000, 0.7, 1.1, 6176.47],
    [7500, 0.7, 0.85, 8161.8],
  ])('give the borrow for %d m³ of fill at void ratio %f from a pit at %f', (fill, eFill, ePit, borrow) => {
    const shrinkPercent = 100 * (1 - (1 + eFill) / (1 + ePit))
    const bank = bankFromCompacted(volumeOf('compacted', cm3(fill, 'm3')), { shrinkPercent })
    expect(Math.abs(inUnit(bank.cm3, 'm3') - borrow)).toBeLessThan(0.04)
  })

  // extra data, V-8: in place 105 pcf at 18 %, fill 10,000 yd³ at 103.5 pcf dry → 11,631.4 yd³
  it('give the borrow from dry densities', () => {
    const shrinkPercent = 100 * (1 - 105 / 1.18 / 103.5)
    const bank = bankFromCompacted(volumeOf('compacted', cm3(10_000, 'yd3')), { shrinkPercent })
    expect(inUnit(bank.cm3, 'yd3')).toBeCloseTo(11_631.4, 1)
  })

  it('go from truck to fill by one factor, the same as by way of the bank', () => {
    const material = { swellPercent: 25, shrinkPercent: 10 }
    expect(looseToCompactedFactor(material)).toBeCloseTo(0.72, 12)
    const fill = compactedFromLoose(volumeOf('loose', 1_000_000), looseToCompactedFactor(material))
    expect(looseFromBank(bankFromCompacted(fill, material), material).cm3).toBeCloseTo(1_000_000, 6)
  })

  it('add within a kind and never across kinds', () => {
    expect(addVolumes(volumeOf('loose', 2), volumeOf('loose', 3))).toEqual({ kind: 'loose', cm3: 5 })
    expectTypeOf<Volume<'compacted'>>().not.toExtend<Volume<'loose'>>()
    expectTypeOf(addVolumes<'loose'>).parameter(1).toEqualTypeOf<Volume<'loose'>>()
    const mixed: Volume<'loose' | 'compacted'> = volumeOf('compacted', 3)
    expect(() => addVolumes<'loose' | 'compacted'>(volumeOf('loose', 2), mixed)).toThrow('can not be added')
  })
})
