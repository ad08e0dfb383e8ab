import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import type { MoistureSheet, RawSheet } from '#shared/domain/field-sheets.ts'
import type { Criterion } from '#shared/domain/limits.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import type { RoundingRule } from '#shared/domain/rounding.ts'
import { DEFAULT_REPEATABILITY, judge } from '#shared/domain/verdict.ts'
import type { JudgedAgainst, Verdict } from '#shared/domain/verdict.ts'
import { convertDensity } from '#shared/units/density.ts'
import type { DensityUnit } from '#shared/units/density.ts'
import { convertMass } from '#shared/units/mass.ts'

const seeded = { seed: 20261201, numRuns: 300 }

const rounding = fc.constantFrom<RoundingRule>({ method: 'absolute' }, { method: 'rounding', ties: 'even' }, { method: 'rounding', ties: 'up' })
const criteria: Criterion[] = [
  { kind: 'rc-min', text: '95' }, { kind: 'rc-max', text: '103.0' }, { kind: 'moisture-band', lowText: '-2', highText: '+2.0' },
  { kind: 'saturation-max', text: '95' }, { kind: 'air-voids-max', text: '10' }, { kind: 'dry-density-min', text: '110.0', unit: 'pcf' },
]

function by(rule: RoundingRule, change: Partial<JudgedAgainst['curve']> = {}): JudgedAgainst {
  return {
    curve: { maxDryDensity: convertDensity(117.6, 'pcf', 'kg/m3'), optimumMoisture: 12.6, gs: 2.68, gsMeasured: true, ...change },
    criteria,
    rounding: rule,
    repeatability: DEFAULT_REPEATABILITY,
    waterDensity: 1000,
  }
}

function verdictOf(sheet: RawSheet, against: JudgedAgainst): Verdict {
  const reduced = reduceSheet(sheet)
  if (!reduced.ok) throw new Error(reduced.problems[0]?.message)
  const result = judge(reduced, against)
  if (!result.ok) throw new Error(result.problems[0]?.message)
  return result.verdict
}

const told = (verdict: Verdict) => ({
  outcome: verdict.outcome,
  treatedAsFail: verdict.treatedAsFail,
  near: verdict.near,
  headline: verdict.headline,
  reasons: verdict.reasons.map((r) => r.code),
  suspicions: verdict.suspicions.map((s) => s.code),
  advice: verdict.advice.map((a) => a.code),
})

/** Tenths of a pcf and of a percent: on and around every limit, where a careless conversion would flip a verdict. */
const tenths = (low: number, high: number) => fc.integer({ min: low * 10, max: high * 10 }).map((n) => n / 10)

describe('no change of unit can flip a verdict', () => {
  test('the same report in pcf, kN/m³, g/cm³ or kg/m³, entered wet or dry', () => {
    const unit = fc.constantFrom<DensityUnit>('kN/m3', 'g/cm3', 'kg/m3')
    fc.assert(
      fc.property(tenths(105, 130), tenths(8, 20), unit, rounding, (pcf, w, other, rule) => {
        const moisture: MoistureSheet = { method: 'stated', percent: w }
        const entered = (densityUnit: DensityUnit, densityIs: 'wet' | 'dry', density: number) =>
          told(verdictOf({ method: 'plain', densityUnit, densityIs, density, moisture }, by(rule)))
        const first = entered('pcf', 'dry', pcf)
        expect(entered(other, 'dry', convertDensity(pcf, 'pcf', other))).toEqual(first)
        expect(entered(other, 'wet', convertDensity(pcf * (1 + w / 100), 'pcf', other))).toEqual(first)
      }),
      seeded,
    )
  })

  test('the same sand cone in grams or pounds', () => {
    const lb = (g: number) => convertMass(g, 'g', 'lb')
    fc.assert(
      fc.property(fc.integer({ min: 3900, max: 5000 }), fc.integer({ min: 3650, max: 3850 }), rounding, (soil, dryTenths, rule) => {
        const dry = dryTenths / 10
        const shared = { method: 'sand-cone' as const, moistSoil: soil }
        const metric: RawSheet = {
          ...shared, massUnit: 'g', apparatusBefore: 7612, apparatusAfter: 3004, coneAndPlate: 1548, densityUnit: 'g/cm3', sandDensity: 1.418,
          moisture: { method: 'oven', massUnit: 'g', wetAndTin: 412.6, dryAndTin: dry, tin: 78.4 },
        }
        const customary: RawSheet = {
          method: 'sand-cone', massUnit: 'lb', apparatusBefore: lb(7612), apparatusAfter: lb(3004), coneAndPlate: lb(1548), moistSoil: lb(soil),
          densityUnit: 'pcf', sandDensity: convertDensity(1.418, 'g/cm3', 'pcf'),
          moisture: { method: 'oven', massUnit: 'lb', wetAndTin: lb(412.6), dryAndTin: lb(dry), tin: lb(78.4) },
        }
        expect(told(verdictOf(customary, by(rule)))).toEqual(told(verdictOf(metric, by(rule))))
      }),
      seeded,
    )
  })
})

describe('verdicts', () => {
  test('suspect, fail and pass exclude each other and follow from suspicions and reasons alone', () => {
    fc.assert(
      fc.property(tenths(80, 160), tenths(0, 40), fc.boolean(), rounding, (pcf, moisture, gsMeasured, rule) => {
        const result = judge({ dryDensity: convertDensity(pcf, 'pcf', 'kg/m3'), moisture }, by(rule, { gsMeasured }))
        if (!result.ok) throw new Error(result.problems[0]?.message)
        const { outcome, reasons, suspicions, treatedAsFail } = result.verdict
        expect(outcome).toBe(suspicions.length > 0 ? 'suspect' : reasons.length > 0 ? 'fail' : 'pass')
        expect(treatedAsFail).toBe(outcome === 'suspect' && reasons.some((r) => r.code === 'too-loose'))
      }),
      seeded,
    )
  })

  test('denser never becomes too loose, wetter never too dry', () => {
    fc.assert(
      fc.property(tenths(100, 122), tenths(6, 18), tenths(0, 5), rounding, (pcf, moisture, more, rule) => {
        const codes = (dryPcf: number, w: number) => {
          const result = judge({ dryDensity: convertDensity(dryPcf, 'pcf', 'kg/m3'), moisture: w }, by(rule))
          return result.ok ? result.verdict.reasons.map((r) => r.code) : []
        }
        if (!codes(pcf, moisture).includes('too-loose')) expect(codes(pcf + more, moisture)).not.toContain('too-loose')
        if (!codes(pcf, moisture).includes('too-dry')) expect(codes(pcf, moisture + more)).not.toContain('too-dry')
      }),
      seeded,
    )
  })

  test('a value exactly on a limit meets it, whatever the maximum and the way there', () => {
    fc.assert(
      fc.property(tenths(90, 140), fc.integer({ min: 880, max: 1040 }), rounding, (maxPcf, limitTenths, rule) => {
        const text = (limitTenths / 10).toFixed(1)
        const maxDryDensity = convertDensity(maxPcf, 'pcf', 'kg/m3')
        const against = { ...by(rule, { maxDryDensity, gs: 3.5 }), criteria: [{ kind: 'rc-min', text }, { kind: 'rc-max', text }] as Criterion[] }
        const density = convertDensity((maxPcf * limitTenths) / 1000, 'pcf', 'kg/m3')
        expect(judge({ dryDensity: density, moisture: 8 }, against)).toMatchObject({ ok: true, verdict: { outcome: 'pass', near: true } })
      }),
      seeded,
    )
  })
})

describe('hostile input', () => {
  const number = fc.oneof(
    fc.double(), fc.constantFrom(Number.NaN, Number.POSITIVE_INFINITY, -0, 0, 1e308, -1e308, 5e-324), fc.double({ min: 0, max: 10_000, noNaN: true }),
    fc.double({ min: 1, max: 200, noNaN: true }),
  )
  const massUnit = fc.constantFrom('g' as const, 'kg' as const, 'lb' as const)
  const densityUnit = fc.constantFrom<DensityUnit>('kg/m3', 'g/cm3', 'pcf', 'kN/m3', 'lb/yd3')
  const moisture: fc.Arbitrary<MoistureSheet> = fc.oneof(
    fc.record({ method: fc.constantFrom('oven' as const, 'microwave' as const), massUnit, wetAndTin: number, dryAndTin: number, tin: number }),
    fc.record({ method: fc.constant('carbide' as const), readingPercent: number }),
    fc.record({ method: fc.constant('gauge' as const), densityUnit, moistureDensity: number, correctionK: number }),
    fc.record({ method: fc.constant('stated' as const), percent: number }),
  )
  const optional = fc.option(number, { nil: undefined })
  const sheet: fc.Arbitrary<RawSheet> = fc.oneof(
    fc.record({
      method: fc.constant('sand-cone' as const), massUnit, apparatusBefore: number, apparatusAfter: number, coneAndPlate: number, densityUnit,
      sandDensity: number, moistSoil: number, largestParticle: optional, lengthUnit: fc.constant('mm' as const), moisture,
    }),
    fc.record({
      method: fc.constant('nuclear-gauge' as const), mode: fc.constantFrom('direct-transmission' as const, 'backscatter' as const),
      lengthUnit: fc.constant('in' as const), rodDepth: number, densityUnit, wetDensity: number, secondWetDensity: optional,
      standardCounts: fc.option(fc.record({ density: number, moisture: number, referenceDensity: optional, referenceMoisture: optional }), { nil: undefined }),
      moisture,
    }),
    fc.record({ method: fc.constant('plain' as const), densityUnit, densityIs: fc.constantFrom('wet' as const, 'dry' as const), density: number, moisture }),
  )

  function numbersIn(value: unknown): number[] {
    if (typeof value === 'number') return [value]
    return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : []
  }

  test('1,000 random and hostile sheets: finite numbers or named problems, never NaN, never a throw', () => {
    let accepted = 0
    fc.assert(
      fc.property(sheet, optional, number, (raw, oversizeShare, gs) => {
        const reduced = reduceSheet(raw)
        if (!reduced.ok) {
          expect(reduced.problems.length).toBeGreaterThan(0)
          for (const problem of reduced.problems) expect(problem.message).not.toMatch(/NaN|Infinity|undefined/)
          return
        }
        accepted += 1
        expect(numbersIn(reduced).every(Number.isFinite)).toBe(true)
        for (const g of [gs, 2.68]) {
          const result = judge({ ...reduced, oversizeShare }, by({ method: 'rounding', ties: 'even' }, { gs: g }))
          if (!result.ok) expect(result.problems.length).toBeGreaterThan(0)
          else expect(numbersIn({ ...result.verdict, test: null }).every(Number.isFinite)).toBe(true)
        }
      }),
      { seed: 20261201, numRuns: 1000 },
    )
    expect(accepted).toBeGreaterThan(5)
  })

  test('judge answers any numbers at all', () => {
    fc.assert(
      fc.property(number, number, optional, number, number, rounding, (dryDensity, w, oversizeShare, maxDryDensity, optimumMoisture, rule) => {
        const result = judge({ dryDensity, moisture: w, oversizeShare }, by(rule, { maxDryDensity, optimumMoisture }))
        if (result.ok) expect(numbersIn({ ...result.verdict, test: null }).every(Number.isFinite)).toBe(true)
        else expect(result.problems[0]?.field.length).toBeGreaterThan(0)
      }),
      { seed: 20261201, numRuns: 1000 },
    )
  })
})
