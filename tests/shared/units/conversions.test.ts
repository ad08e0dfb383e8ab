import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { convertArea } from '#shared/units/area.ts'
import { convertDensity } from '#shared/units/density.ts'
import { convertLength, fromMicrometres, toMicrometres } from '#shared/units/length.ts'
import { convertMass } from '#shared/units/mass.ts'
import { convertVolume, toCubicCentimetres } from '#shared/units/volume.ts'

const seeded = { seed: 20261201, numRuns: 200 }

describe('exact constants', () => {
  test('a pound is 453.59237 g and an inch 25.4 mm (international yard and pound agreement, 1959)', () => {
    expect(convertMass(1, 'lb', 'g')).toBe(453.59237)
    expect(convertLength(1, 'in', 'mm')).toBeCloseTo(25.4, 12)
    expect(toMicrometres(1, 'in')).toBe(25_400)
    expect(toMicrometres(1, 'ft')).toBe(304_800)
  })

  test('1 international foot is 0.999998 US survey foot exactly (C-3: 0.3048·3937/1200; Federal Register 2020-21902)', () => {
    expect(convertLength(1, 'ft', 'us-ft')).toBeCloseTo(0.999998, 12)
    // C-3: easting 2,963,503.91 US ft is 2,963,509.84 international ft.
    expect(convertLength(2_963_503.91, 'us-ft', 'ft')).toBeCloseTo(2_963_509.84, 2)
  })

  test('1 g/cm³ is 62.43 pcf and 9.807 kN/m³ (domain section 1; 1 kg/m³ = 0.06242796 pcf, checks preamble)', () => {
    expect(convertDensity(1, 'g/cm3', 'pcf')).toBeCloseTo(62.42796, 5)
    expect(convertDensity(1, 'g/cm3', 'kN/m3')).toBeCloseTo(9.80665, 12)
    expect(convertDensity(1, 'pcf', 'kg/m3')).toBeCloseTo(16.01846, 5)
    expect(convertDensity(1, 'pcf', 'lb/yd3')).toBeCloseTo(27, 12)
  })

  test('a cubic foot is 28,316.847 cm³ (checks preamble), a cubic yard 27 of them, a US gallon 231 in³', () => {
    expect(convertVolume(1, 'ft3', 'cm3')).toBeCloseTo(28_316.847, 3)
    expect(convertVolume(1, 'yd3', 'ft3')).toBeCloseTo(27, 12)
    expect(convertVolume(1, 'gal', 'in3')).toBeCloseTo(231, 10)
    expect(toCubicCentimetres(1, 'yd3')).toBe(764_555)
  })

  test('mould volumes: 4.000 in and 6.000 in by 4.584 in are 944 and 2,124 cm³ (dimensions from memory)', () => {
    const cylinder = (diameter: number, height: number) => (Math.PI / 4) * diameter ** 2 * height
    expect(convertVolume(cylinder(4, 4.584), 'in3', 'ft3')).toBeCloseTo(0.033336, 5)
    expect(convertVolume(cylinder(4, 4.584), 'in3', 'cm3')).toBeCloseTo(944, 0)
    expect(convertVolume(cylinder(6, 4.584), 'in3', 'ft3')).toBeCloseTo(0.075006, 5)
    expect(convertVolume(cylinder(6, 4.584), 'in3', 'cm3')).toBeCloseTo(2124, 0)
  })

  test('FM 5-472 p. 4: the 4-in mould of 0.0333 ft³ is 943 cm³ and the 6-in of 0.075 ft³ 2,124 cm³', () => {
    expect(convertVolume(0.0333, 'ft3', 'cm3')).toBeCloseTo(943, 0)
    expect(convertVolume(0.075, 'ft3', 'cm3')).toBeCloseTo(2124, 0)
  })

  test('an acre is 43,560 ft² and a hectare 10,000 m² (their definitions)', () => {
    expect(convertArea(1, 'ac', 'ft2')).toBeCloseTo(43_560, 8)
    expect(convertArea(1, 'ha', 'm2')).toBe(10_000)
    expect(convertArea(1, 'ft2', 'mm2')).toBeCloseTo(92_903.04, 8)
  })
})

describe('round trips', () => {
  const value = fc.double({ min: 1e-3, max: 1e7, noNaN: true })
  const lengths = ['µm', 'mm', 'cm', 'm', 'km', 'in', 'ft', 'us-ft', 'yd'] as const
  const masses = ['g', 'kg', 'lb'] as const
  const densities = ['kg/m3', 'g/cm3', 'pcf', 'kN/m3', 'lb/yd3'] as const
  const areas = ['mm2', 'm2', 'ha', 'ft2', 'us-ft2', 'yd2', 'ac'] as const
  const volumes = ['cm3', 'L', 'm3', 'in3', 'ft3', 'yd3', 'gal'] as const

  function roundTrips<U>(units: readonly U[], convert: (value: number, from: U, to: U) => number) {
    const unit = fc.constantFrom(...units)
    fc.assert(
      fc.property(value, unit, unit, unit, (x, a, b, c) => {
        expect(convert(convert(x, a, b), b, a) / x).toBeCloseTo(1, 12)
        expect(convert(convert(x, a, b), b, c) / convert(x, a, c)).toBeCloseTo(1, 12)
        expect(convert(2 * x, a, b)).toBeGreaterThan(convert(x, a, b))
      }),
      seeded,
    )
  }

  test('every length, by any path', () => roundTrips(lengths, convertLength))
  test('every mass, by any path', () => roundTrips(masses, convertMass))
  test('every density, by any path', () => roundTrips(densities, convertDensity))
  test('every area, by any path', () => roundTrips(areas, convertArea))
  test('every volume, by any path', () => roundTrips(volumes, convertVolume))

  test('an elevation in hundredths of a foot comes back from whole micrometres as it was typed', () => {
    fc.assert(
      fc.property(fc.integer({ min: -200_000, max: 2_000_000 }), (hundredths) => {
        const micrometres = toMicrometres(hundredths / 100, 'ft')
        expect(Number.isSafeInteger(micrometres)).toBe(true)
        expect(Math.round(fromMicrometres(micrometres, 'ft') * 100)).toBe(hundredths)
      }),
      seeded,
    )
  })
})
