import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { owedRunning, requiredTests, shareMinimum, spokenVolume } from '#shared/domain/frequency.ts'
import { wholeRuleAmount, type FrequencyRule } from '#shared/domain/frequency-rule.ts'
import { convertVolume, toCubicCentimetres } from '#shared/units/volume.ts'

// 1 ft² = 304.8² mm² = 92,903.04 mm² exactly
const squareFeet = (count: number) => Math.round(count * 92_903.04)
const yards = (count: number) => toCubicCentimetres(count, 'yd3')
const per2000SquareFeet: FrequencyRule = { kind: 'area', perMm2: squareFeet(2000) }
const per500Yards: FrequencyRule = { kind: 'volume', scope: 'lot', perCm3: yards(500) }
const layer = (feet2: number) => ({ areaMm2: squareFeet(feet2), volumeCm3: yards(100) })
const fill = (volumeCm3: number) => ({ volumeCm3, areaMm2: squareFeet(10_000) })

describe('tests required', () => {
  it('counts one per 2,000 ft² or fraction thereof (UFGS 31 00 00)', () => {
    expect(requiredTests([per2000SquareFeet], layer(10_000))).toBe(5)
    expect(requiredTests([per2000SquareFeet], layer(10_001))).toBe(6)
  })

  it('doubles for hand-operated machines (UFGS 31 00 00)', () => {
    expect(requiredTests([per2000SquareFeet], layer(10_000), { multiplier: 2 })).toBe(10)
  })

  it('counts one per 500 yd³ (UFGS 31 00 00), and no third test for exactly 1,000 yd³', () => {
    expect(requiredTests([per500Yards], fill(yards(1200)))).toBe(3)
    expect(requiredTests([per500Yards], fill(2 * yards(500)))).toBe(2)
    expect(requiredTests([per500Yards], fill(2 * yards(500) + 1))).toBe(3)
  })

  it('takes the largest of several rules: one per 1,000 yd³ or three per lift, whichever is more (practice 3.1)', () => {
    const rules: FrequencyRule[] = [{ kind: 'volume', scope: 'lot', perCm3: yards(1000) }, { kind: 'per-lot', atLeast: 3 }]
    expect(requiredTests(rules, fill(yards(1500)))).toBe(3)
    expect(requiredTests(rules, fill(yards(3500)))).toBe(4)
  })

  it('forgives a remainder inside the tolerance, but never the only test', () => {
    const options = { remainderTolerancePercent: 5 }
    expect(requiredTests([per500Yards], fill(2 * yards(500) + yards(25)), options)).toBe(2)
    expect(requiredTests([per500Yards], fill(2 * yards(500) + yards(25) + 1), options)).toBe(3)
    expect(requiredTests([per500Yards], fill(yards(10)), options)).toBe(1)
  })

  it('asks four tests of 1,000 yd³ at one per 250 yd³, though neither is a whole number of cm³', () => {
    const perCm3 = wholeRuleAmount(convertVolume(250, 'yd3', 'cm3'))
    expect(perCm3).toBe(191_138_715)
    expect(requiredTests([{ kind: 'volume', scope: 'lot', perCm3 }], fill(yards(1000)))).toBe(4)
  })

  it('counts per length, and asks nothing of an empty lot or of a running rule in one lot', () => {
    const perLength: FrequencyRule = { kind: 'length', perMm: 60_960 }
    expect(requiredTests([perLength], { ...fill(yards(40)), lengthMm: 152_400 })).toBe(3)
    expect(requiredTests([per500Yards], { volumeCm3: 0, areaMm2: 0 })).toBe(0)
    expect(requiredTests([{ kind: 'volume', scope: 'running', perCm3: yards(500) }], fill(yards(5000)))).toBe(0)
  })
})

describe('the volume one test speaks for', () => {
  it('is the V of a volume rule itself, also where the lot is smaller', () => {
    expect(spokenVolume([per500Yards], fill(yards(1200)))).toBe(yards(500))
    expect(spokenVolume([per500Yards], fill(yards(90)))).toBe(yards(500))
    expect(spokenVolume([per500Yards], fill(yards(1200)), { multiplier: 2 })).toBe(Math.ceil(yards(500) / 2))
  })

  it('is the area times the thickness of the lot under an area rule', () => {
    // five tests cover 10,000 ft² whatever its thickness: each speaks for a fifth of 8 in over it
    const volumeCm3 = Math.round((squareFeet(10_000) * 203_200) / 1e6)
    expect(spokenVolume([per2000SquareFeet], { areaMm2: squareFeet(10_000), volumeCm3 })).toBe(Math.ceil(volumeCm3 / 5))
  })

  it('is a part of the lot under a minimum per lot, and the smallest of all rules', () => {
    expect(spokenVolume([{ kind: 'per-lot', atLeast: 3 }, per500Yards], fill(900))).toBe(300)
  })

  it('stretches just enough where a remainder is forgiven', () => {
    const volume = 2 * yards(500) + yards(20)
    expect(spokenVolume([per500Yards], fill(volume), { remainderTolerancePercent: 5 })).toBe(Math.ceil(volume / 2))
  })

  it('is the V of the running rule, or the whole lot, where no rule counts in the lot', () => {
    expect(spokenVolume([{ kind: 'volume', scope: 'running', perCm3: yards(500) }], fill(yards(90)))).toBe(yards(500))
    expect(spokenVolume([{ kind: 'per-lift-day', atLeast: 2 }], fill(1234))).toBe(1234)
    expect(spokenVolume([per500Yards], { volumeCm3: 0, areaMm2: 0 })).toBe(0)
  })

  it('covers the lot with as many tests as are required, and never with one less', () => {
    const rule = fc.oneof(
      fc.record({ kind: fc.constant('volume' as const), scope: fc.constant('lot' as const), perCm3: fc.integer({ min: 1_000_000, max: 500_000_000 }) }),
      fc.record({ kind: fc.constant('area' as const), perMm2: fc.integer({ min: 10_000_000, max: 1_000_000_000 }) }),
      fc.record({ kind: fc.constant('per-lot' as const), atLeast: fc.integer({ min: 1, max: 9 }) }),
    )
    const options = fc.record({ remainderTolerancePercent: fc.constantFrom(0, 0, 5, 12.5), multiplier: fc.constantFrom(1, 1, 2, 1.5) })
    const lot = fc.record({ volumeCm3: fc.integer({ min: 10_000_000, max: 2_000_000_000 }), areaMm2: fc.integer({ min: 10_000_000, max: 20_000_000_000 }) })
    fc.assert(
      fc.property(fc.array(rule, { minLength: 1, maxLength: 3 }), lot, options, (rules, measure, chosen) => {
        const tests = requiredTests(rules, measure, chosen)
        // whole cm³ can tell m tests from m − 1 only in a lot of more cm³ than m²
        fc.pre(measure.volumeCm3 > tests * tests)
        const f = spokenVolume(rules, measure, chosen)
        expect(tests * f).toBeGreaterThanOrEqual(measure.volumeCm3)
        expect((tests - 1) * f).toBeLessThan(measure.volumeCm3)
      }),
      { seed: 20261201, numRuns: 500 },
    )
  })
})

describe('minimum per lift and day', () => {
  it('is shared over the lots by volume, largest remainder', () => {
    // 5 tests over 50, 30 and 20: 2.5, 1.5 and 1.0; the first of the equal remainders gets the fifth
    expect(shareMinimum(5, [50, 30, 20])).toEqual([3, 1, 1])
    expect(shareMinimum(2, [10, 500, 490])).toEqual([0, 1, 1])
    expect(shareMinimum(3, [0, 0])).toEqual([0, 0])
  })
})

describe('running rules', () => {
  it('round up over all volume together and take off what was taken', () => {
    expect(owedRunning([yards(300), yards(300), yards(300)], yards(500), 0)).toBe(2)
    expect(owedRunning([yards(500), yards(500)], yards(500), 2)).toBe(0)
    expect(owedRunning([yards(500)], yards(500), 4)).toBe(0)
  })
})
