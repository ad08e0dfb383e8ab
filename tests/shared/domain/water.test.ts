import { describe, expect, it } from 'vitest'
import { planWater, waterToAdd } from '#shared/domain/water.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertMass } from '#shared/units/mass.ts'
import { convertVolume } from '#shared/units/volume.ts'

const pounds = (kilograms: number) => convertMass(kilograms, 'kg', 'lb')

describe('water to bring fill to its target', () => {
  it('is 659 gallons for 50 × 50 ft × 8 in at 110 lb/ft³ and three points (practice, worked example)', () => {
    const input = {
      volumeCm3: convertVolume((50 * 50 * 8) / 12, 'ft3', 'cm3'),
      dryDensityKgM3: convertDensity(110, 'pcf', 'kg/m3'),
      moisturePercent: 9,
      targetPercent: 12,
    }
    // 1,666.67 ft³ × 110 × 0.03 = 5,500 lb
    expect(pounds(waterToAdd(input).kilograms)).toBeCloseTo(5500, 6)
    expect(waterToAdd(input).usGallons).toBeCloseTo(659.08, 2)
  })

  it('is negative where water is to be lost: 17,451,720 lb, 4.2 gallons per yd³ of borrow (answer-site set Q-1, recomputed)', () => {
    const input = {
      volumeCm3: convertVolume(440_000, 'yd3', 'cm3'),
      dryDensityKgM3: convertDensity(113, 'pcf', 'kg/m3'),
      moisturePercent: 7.3,
      targetPercent: 6,
    }
    const water = waterToAdd(input, 8.35)
    expect(pounds(water.kilograms)).toBeCloseTo(-17_451_720, 0)
    expect(water.usGallons / 498_594).toBeCloseTo(-4.19, 2)
  })

  it('is 9.17 kL for 100 m³ at 18 kN/m³ from 10 to 15 % (answer-site set Q-3, recomputed with 9.81)', () => {
    const water = waterToAdd({ volumeCm3: 100e6, dryDensityKgM3: 18_000 / 9.81, moisturePercent: 10, targetPercent: 15 })
    expect(water.litres / 1000).toBeCloseTo(9.174, 3)
  })

  it('is 15,600 lb an hour for 200 yd³ at 2,600 lb/yd³ and three points (answer-site set Q-5, recomputed)', () => {
    const input = {
      volumeCm3: convertVolume(200, 'yd3', 'cm3'),
      dryDensityKgM3: convertDensity(2600, 'lb/yd3', 'kg/m3'),
      moisturePercent: 5,
      targetPercent: 8,
    }
    expect(pounds(waterToAdd(input).kilograms)).toBeCloseTo(15_600, 6)
    expect(waterToAdd(input).usGallons).toBeCloseTo(1869.4, 1)
    expect(waterToAdd(input, 8.34).usGallons).toBeCloseTo(1870.5, 1)
    expect(waterToAdd(input, 8.33).usGallons).toBeCloseTo(1872.7, 1)
  })
})

describe('water over several cells', () => {
  const dry = { volumeCm3: 10e6, dryDensityKgM3: 1800, moisturePercent: 9, targetPercent: 12 }

  it('adds up, and counts tanker loads only for cells that need water', () => {
    // 10 m³ × 1,800 × 3 % = 540 L each; the wet cell has 360 L to lose
    const plan = planWater([{ cell: 1, ...dry }, { cell: 2, ...dry }, { cell: 3, ...dry, moisturePercent: 14 }], { tankerLitres: 540 })
    expect(plan.cells.map((cell) => Math.round(cell.litres))).toEqual([540, 540, -360])
    expect(plan.total.litres).toBeCloseTo(720, 9)
    expect(plan.tankerLoads).toBe(2)
  })

  it('gives no loads without a tanker', () => {
    expect(planWater([{ cell: 1, ...dry }]).tankerLoads).toBeNull()
  })
})
