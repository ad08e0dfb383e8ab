import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { gaugeCorrectionK, moistureFromCarbide, moistureFromGauge, moistureFromTin, moistureFromTins, tinProblems } from '#shared/domain/moisture.ts'

describe('moisture from tins', () => {
  test('M-1: 53.12 wet, 43.27 dry, can 4.21 g is 25.217 % (blog.monacivil.com; the page cuts 25.2176 off)', () => {
    expect(moistureFromTin({ wetAndTin: 53.12, dryAndTin: 43.27, tin: 4.21 })).toBeCloseTo(25.2176, 4)
  })

  test('M-2: three cans give 16.231, 15.964, 16.451, mean 16.215 % (scribd.com 532149593, recomputed)', () => {
    const tins = [
      { tin: 17.31, wetAndTin: 43.52, dryAndTin: 39.86 },
      { tin: 18.92, wetAndTin: 52.19, dryAndTin: 47.61 },
      { tin: 16.07, wetAndTin: 39.43, dryAndTin: 36.13 },
    ]
    const [first, second, third] = tins.map(moistureFromTin)
    expect(first).toBeCloseTo(16.231, 3)
    expect(second).toBeCloseTo(15.964, 3)
    expect(third).toBeCloseTo(16.451, 3)
    expect(moistureFromTins(tins)).toBeCloseTo(16.215, 3)
  })

  test('S-2: can 27.3, wet 47.0, dry 42.9 g is 26.28 % (ja.scribd.com 241276469)', () => {
    expect(moistureFromTin({ wetAndTin: 47, dryAndTin: 42.9, tin: 27.3 })).toBeCloseTo(26.28, 2)
  })

  test.each([
    [{ wetAndTin: 412.6, dryAndTin: 430, tin: 78.4 }, 'dryAndTin', 'Dry is heavier than wet (412.6\u2009g). Check which is which.'],
    [{ wetAndTin: 412.6, dryAndTin: 382.9, tin: 382.9 }, 'tin', 'The tin is as heavy as dry soil and tin (382.9\u2009g). Check which is which.'],
    [{ wetAndTin: Number.NaN, dryAndTin: 382.9, tin: 78.4 }, 'wetAndTin', 'Enter the mass of wet soil and tin.'],
    [{ wetAndTin: 412.6, dryAndTin: Number.NaN, tin: 78.4 }, 'dryAndTin', 'Enter the mass of dry soil and tin.'],
    [{ wetAndTin: 412.6, dryAndTin: 382.9, tin: Number.POSITIVE_INFINITY }, 'tin', 'Enter the mass of the tin.'],
    [{ wetAndTin: 412.6, dryAndTin: 382.9, tin: -1 }, 'tin', 'A mass cannot be below zero.'],
    [{ wetAndTin: 900, dryAndTin: 80, tin: 79 }, 'dryAndTin', 'Moisture comes to more than 500 %. Check the three masses.'],
  ])('names the field and the mistake in %j', (tin, field, message) => {
    expect(tinProblems(tin, 'moisture', 'g')).toEqual([expect.objectContaining({ field: `moisture.${field}`, message })])
  })

  test('accepts soil that lost nothing in drying', () => {
    expect(tinProblems({ wetAndTin: 100, dryAndTin: 100, tin: 20 }, 'moisture', 'g')).toEqual([])
  })
})

describe('carbide and gauge', () => {
  test.each([
    // Check row, computed from w = 100·r/(100 − r) (kenkidryer.com, 2017-06-19).
    [5, 5.26], [10, 11.11], [12, 13.64], [15, 17.65], [20, 25],
  ])('a carbide reading of %d %% of wet mass is %d %% of dry mass', (reading, moisture) => {
    expect(moistureFromCarbide(reading)).toBeCloseTo(moisture, 2)
  })

  test('gauge 10 %, oven 12 % makes K +18.18 (form from memory, arithmetic computed)', () => {
    expect(gaugeCorrectionK(12, 10)).toBeCloseTo(18.18, 2)
  })

  test('the K of a pair takes the gauge back to its oven', () => {
    const percent = fc.double({ min: 1, max: 40, noNaN: true })
    fc.assert(
      fc.property(fc.double({ min: 1500, max: 2300, noNaN: true }), percent, percent, (wet, gauge, oven) => {
        const water = wet - wet / (1 + gauge / 100)
        expect(moistureFromGauge(wet, water, 0)).toBeCloseTo(gauge, 8)
        expect(moistureFromGauge(wet, water, gaugeCorrectionK(oven, gauge))).toBeCloseTo(oven, 8)
      }),
      { seed: 20261201, numRuns: 200 },
    )
  })
})
