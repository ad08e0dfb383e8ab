import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { calibrate } from '#shared/domain/calibration.ts'
import type { CalibrationSheet } from '#shared/domain/calibration.ts'
import { convertDensity } from '#shared/units/density.ts'

function valueOf(sheet: CalibrationSheet) {
  const result = calibrate(sheet)
  if (!result.ok) throw new Error(result.problems.map((problem) => problem.message).join(' '))
  return result
}
const codes = (sheet: CalibrationSheet) => valueOf(sheet).flags.map((flag) => flag.code)
const problems = (sheet: CalibrationSheet) => {
  const result = calibrate(sheet)
  return result.ok ? [] : result.problems.map(({ field, code }) => `${field} ${code}`)
}

const SAND: CalibrationSheet = { kind: 'sand-density', massUnit: 'kg', volumeUnit: 'cm3', containerVolume: 3816.1086, container: 2.04, filled: [8.45] }
const CONE: CalibrationSheet = { kind: 'cone', massUnit: 'kg', trials: [{ before: 8.45, after: 6.77 }] }

describe('calibrate', () => {
  it('S-2: 8.45 kg of jar and sand, 2.04 kg empty, in 3,816.1 cm³ is 1.6797 g/cm³; the cone takes 1.68 kg (ja.scribd.com 241276469)', () => {
    expect(valueOf(SAND).value / 1000).toBeCloseTo(1.6797, 4)
    expect(valueOf(CONE).value).toBeCloseTo(1680, 6)
  })

  it('S-1: 3.30 lb of sand fills 1/30 ft³, 99 pcf (civilengineering-softstudies.com ?p=21)', () => {
    const { value } = valueOf({ kind: 'sand-density', massUnit: 'lb', volumeUnit: 'ft3', containerVolume: 1 / 30, container: 0, filled: [3.3] })
    expect(convertDensity(value, 'kg/m3', 'pcf')).toBeCloseTo(99, 9)
  })

  it('S-4: 5 lb of sand in 60 in³ is 144 pcf (transtutors.com 9333153)', () => {
    const { value } = valueOf({ kind: 'sand-density', massUnit: 'lb', volumeUnit: 'in3', containerVolume: 60, container: 0, filled: [5] })
    expect(convertDensity(value, 'kg/m3', 'pcf')).toBeCloseTo(144, 9)
  })

  it('takes the volume of a cylinder as π·D²·L/4 (D2937): 4.000 in by 4.584 in is 944 cm³', () => {
    const { value } = valueOf({ kind: 'cylinder', lengthUnit: 'in', diameters: [4, 4.002, 3.998], heights: [4.584, 4.584] })
    expect(value).toBeCloseTo(943.95, 1)
  })

  it('averages the trials and flags what lies more than 1 % away (the limit from memory of D1556)', () => {
    expect(valueOf({ ...SAND, filled: [8.45, 8.47, 8.43] }).value).toBeCloseTo(valueOf(SAND).value, 9)
    expect(codes({ ...SAND, filled: [8.45, 8.47, 8.43] })).toEqual([])
    expect(codes({ ...SAND, filled: [8.45, 8.47, 8.6] })).toEqual(['trials-spread'])
    expect(codes(SAND)).toEqual(['few-trials'])
  })

  it('gives a balloon’s mean error and flags more than 1 % (the limit from memory of D2167)', () => {
    const trial = (after: number) => ({ known: 2000, before: 500, after })
    expect(valueOf({ kind: 'balloon', volumeUnit: 'cm3', trials: [trial(2510), trial(2510), trial(2510)] })).toMatchObject({ value: 0.5, spreadPercent: 0.5, flags: [] })
    expect(codes({ kind: 'balloon', volumeUnit: 'cm3', trials: [trial(2510), trial(2530), trial(2500)] })).toEqual(['indicator-off'])
  })

  it('names what cannot be', () => {
    expect(problems({ ...SAND, filled: [] })).toEqual(['filled.0 missing'])
    expect(problems({ ...SAND, filled: [8.45, 2.04] })).toEqual(['filled.1 no-sand'])
    expect(problems({ ...SAND, containerVolume: 0 })).toEqual(['containerVolume not-positive'])
    expect(problems({ ...CONE, trials: [{ before: 6, after: 7 }] })).toEqual(['trials.0.after no-sand'])
    expect(problems({ kind: 'cylinder', lengthUnit: 'in', diameters: [-4], heights: [] })).toEqual(['diameters.0 negative', 'heights.0 missing'])
    expect(problems({ kind: 'balloon', volumeUnit: 'cm3', trials: [{ known: 2000, before: 2500, after: 500 }] })).toEqual(['trials.0.after no-hole'])
  })

  // property: the mean does not depend on the order of the trials, and lies among them
  it('keeps the mean among the trials, in any order', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 3, max: 20, noNaN: true }), { minLength: 1, maxLength: 6 }), (filled) => {
        const sheet = { ...SAND, filled } as CalibrationSheet
        const { value } = valueOf(sheet)
        const alone = filled.map((one) => valueOf({ ...SAND, filled: [one] } as CalibrationSheet).value)
        expect(value).toBeGreaterThanOrEqual(Math.min(...alone) * (1 - 1e-12))
        expect(value).toBeLessThanOrEqual(Math.max(...alone) * (1 + 1e-12))
        expect(valueOf({ ...SAND, filled: [...filled].reverse() } as CalibrationSheet).value).toBeCloseTo(value, 6)
      }),
    )
  })
})
