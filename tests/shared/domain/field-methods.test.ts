import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { CONSTANT_MASS_PERCENT, judgeDrying } from '#shared/domain/constant-mass.ts'
import { cylinderVolumeCm3 } from '#shared/domain/drive-cylinder.ts'
import type { DriveCylinderSheet, MoistureSheet, RawSheet, RubberBalloonSheet } from '#shared/domain/field-sheets.ts'
import { moistureFromTin } from '#shared/domain/moisture.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import { convertDensity } from '#shared/units/density.ts'

const stated = (percent: number): MoistureSheet => ({ method: 'stated', percent })
const BALLOON: RubberBalloonSheet = { method: 'rubber-balloon', volumeUnit: 'cm3', volumeBefore: 580, volumeAfter: 2210, massUnit: 'g', moistSoil: 3240, lengthUnit: 'mm', moisture: stated(12) }
const CYLINDER: DriveCylinderSheet = { method: 'drive-cylinder', massUnit: 'g', cylinderAndSoil: 2765, cylinder: 845, volumeBy: 'stated', volumeUnit: 'cm3', volume: 944, lengthUnit: 'in', moisture: stated(14) }

function reduced(sheet: RawSheet) {
  const result = reduceSheet(sheet)
  if (!result.ok) throw new Error(result.problems.map((problem) => `${problem.field}: ${problem.message}`).join('; '))
  return result
}
const problems = (sheet: RawSheet) => {
  const result = reduceSheet(sheet)
  return result.ok ? [] : result.problems.map(({ field, code }) => `${field} ${code}`)
}
const flags = (sheet: RawSheet) => reduced(sheet).flags.map((flag) => flag.code)

describe('rubber balloon', () => {
  // scribd.com 748964270, data sheet of the rubber balloon: V = final − initial reading; kN/m³ = 9.81 × g/cm³ there, dry = wet/(w+100)×100
  it('takes the volume between the two readings, and the dry density by wet/(w + 100)·100', () => {
    const result = reduced(BALLOON)
    expect(result.holeVolumeCm3).toBe(1630)
    expect(result.wetDensity).toBeCloseTo((1000 * 3240) / 1630, 9)
    expect(result.dryDensity).toBeCloseTo((result.wetDensity / 112) * 100, 9)
    // the exact 9.80665 m/s² lies 0.03 % under the sheet's 9.81
    expect(convertDensity(result.wetDensity, 'kg/m3', 'kN/m3')).toBeCloseTo((9.80665 * 3240) / 1630, 9)
  })

  it('flags a hole too small for its stones (least volumes from memory of D2167) and stones beyond 1½ in', () => {
    expect(flags(BALLOON)).toEqual([])
    expect(flags({ ...BALLOON, largestParticle: 1, lengthUnit: 'in' })).toEqual(['hole-small'])
    expect(flags({ ...BALLOON, largestParticle: 50 })).toEqual(['particle-large', 'hole-small'])
    expect(flags({ ...BALLOON, volumeAfter: 580 + 2900, moistSoil: 5764, largestParticle: 38 })).toEqual([])
  })

  it('refuses what cannot be, with its field', () => {
    expect(problems({ ...BALLOON, volumeAfter: 580 })).toEqual(['volumeAfter no-hole'])
    expect(problems({ ...BALLOON, volumeBefore: -1, moistSoil: 0 })).toEqual(['volumeBefore negative', 'moistSoil not-positive'])
    expect(problems({ ...BALLOON, moistSoil: 32_400 })).toEqual(['moistSoil density-absurd'])
    expect(problems({ ...BALLOON, largestParticle: Number.NaN })).toEqual(['largestParticle negative'])
  })
})

describe('drive cylinder', () => {
  // harbun.me/soil-density-test: V = πD²L/4, ρ = M/V, ρd = ρ/(1 + w)
  it('takes mass over volume, stated or by diameter and height alike', () => {
    const result = reduced(CYLINDER)
    expect(result.wetDensity).toBeCloseTo((1000 * 1920) / 944, 9)
    expect(result.dryDensity).toBeCloseTo((1000 * 1920) / 944 / 1.14, 9)
    const measured = reduced({ ...CYLINDER, volumeBy: 'measured', volume: undefined, diameter: 4, height: 4.584 })
    expect(measured.holeVolumeCm3).toBeCloseTo(cylinderVolumeCm3(101.6, 116.4336), 9)
    // 4.000 in by 4.584 in: 944 cm³, recomputed from the mould's dimensions
    expect(measured.holeVolumeCm3).toBeCloseTo(944, 0)
  })

  it('flags gravelly soil: above 4.75 mm is outside the method (D2937 scope, scribd.com 233505500)', () => {
    expect(flags(CYLINDER)).toEqual([])
    expect(flags({ ...CYLINDER, largestParticle: 4.75, lengthUnit: 'mm' })).toEqual([])
    expect(flags({ ...CYLINDER, largestParticle: 0.25 })).toEqual(['cylinder-gravel'])
  })

  it('refuses what cannot be, with its field', () => {
    expect(problems({ ...CYLINDER, cylinder: 2765 })).toEqual(['cylinder no-soil'])
    expect(problems({ ...CYLINDER, volume: undefined })).toEqual(['volume missing'])
    expect(problems({ ...CYLINDER, volumeBy: 'measured', diameter: 0, height: undefined })).toEqual(['diameter not-positive', 'height missing'])
    expect(problems({ ...CYLINDER, volume: 94 })).toEqual(['cylinderAndSoil density-absurd'])
  })
})

describe('microwave drying', () => {
  const tin = { wetAndTin: 212.4, dryAndTin: 196.1, tin: 61.2 }
  const sheet = (earlier?: number[]): RawSheet => ({ method: 'plain', densityUnit: 'pcf', densityIs: 'wet', density: 125, moisture: { method: 'microwave', massUnit: 'g', ...tin, earlier } })

  it('is constant when the last interval took at most 0.1 % of the wet soil (D4643; the figure from memory)', () => {
    // 0.1 % of 151.2 g is 0.1512 g
    expect(judgeDrying({ ...tin, earlier: [203, 196.25] })).toMatchObject({ constant: true })
    expect(judgeDrying({ ...tin, earlier: [203, 196.26] })).toMatchObject({ constant: false })
    expect(judgeDrying({ ...tin, dryAndTin: 199, wetAndTin: 261.2, earlier: [199.2] })).toMatchObject({ constant: true, lastChangePercent: expect.closeTo(CONSTANT_MASS_PERCENT, 9) as number })
    expect(judgeDrying(tin)).toEqual({ constant: null, lastChangePercent: null })
  })

  it('does not move the moisture, which is the last weighing’s', () => {
    expect(reduced(sheet([203, 197])).moisture).toBe(moistureFromTin(tin))
    expect(flags(sheet([203, 197]))).toEqual(['not-constant-mass'])
    expect(flags(sheet([203, 196.2]))).toEqual([])
    expect(flags(sheet())).toEqual([])
  })

  it('refuses weighings that cannot be', () => {
    expect(problems(sheet([213, 196.2]))).toEqual(['moisture.earlier.0 dry-heavier'])
    expect(problems(sheet([203, 61.2]))).toEqual(['moisture.earlier.1 no-soil'])
    expect(problems(sheet([Number.NaN]))).toEqual(['moisture.earlier.0 missing'])
  })
})

// property: a hole and a cylinder of the same volume and soil give the same density, in any unit
describe('the three volumes', () => {
  it('agree with one another', () => {
    fc.assert(
      fc.property(fc.double({ min: 500, max: 2800, noNaN: true }), fc.double({ min: 1.2, max: 2.4, noNaN: true }), (volume, density) => {
        const moistSoil = volume * density
        const balloon = reduced({ ...BALLOON, volumeBefore: 100, volumeAfter: 100 + volume, moistSoil })
        const cylinder = reduced({ ...CYLINDER, volume, cylinder: 500, cylinderAndSoil: 500 + moistSoil, moisture: stated(12) })
        const cone = reduced({ method: 'sand-cone', massUnit: 'g', apparatusBefore: 9000, apparatusAfter: 9000 - 1500 - volume * 1.4, coneAndPlate: 1500, densityUnit: 'g/cm3', sandDensity: 1.4, moistSoil, moisture: stated(12) })
        expect(balloon.dryDensity / cylinder.dryDensity).toBeCloseTo(1, 9)
        expect(cone.dryDensity / cylinder.dryDensity).toBeCloseTo(1, 9)
      }),
    )
  })
})
