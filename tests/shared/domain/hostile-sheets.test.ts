import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import type { FieldMethod, MoistureMethod, RawSheet } from '#shared/domain/field-sheets.ts'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import { DEFAULT_REPEATABILITY, judge } from '#shared/domain/verdict.ts'
import type { JudgedAgainst } from '#shared/domain/verdict.ts'
import { hostileSheet, likelySheet, numbersOf } from '#tests/factories/hostile-sheet.ts'
import { naiveOutcome, naiveReduction } from '#tests/factories/naive-judge.ts'

const RUNS = { seed: 20261201, numRuns: 4000 }

/** Numbers anywhere in an answer that are none. */
const notFinite = (value: object): string[] => numbersOf(value).filter((path) => !Number.isFinite(path.split('.').reduce<unknown>((inner, step) => (inner as Record<string, unknown>)[step], value)))

const AGAINST: JudgedAgainst = {
  curve: { maxDryDensity: 1884, optimumMoisture: 12.6, gs: 2.68, gsMeasured: true },
  criteria: [
    { kind: 'rc-min', text: '95' },
    { kind: 'rc-max', text: '105' },
    { kind: 'moisture-band', lowText: '-2', highText: '3' },
    { kind: 'saturation-max', text: '97' },
    { kind: 'air-voids-max', text: '12' },
  ],
  rounding: { method: 'absolute' },
  repeatability: DEFAULT_REPEATABILITY,
  waterDensity: 1000,
}
const LIMITS = { max: 1884, optimum: 12.6, gs: 2.68, rcMin: 95, rcMax: 105, drier: 2, wetter: 3, saturationMax: 97, airVoidsMax: 12 }

/** A count so far off that its drift overflows. */
const COUNTED_FAR: RawSheet = {
  method: 'nuclear-gauge', mode: 'direct-transmission', lengthUnit: 'in', rodDepth: 6, densityUnit: 'pcf', wetDensity: 130,
  standardCounts: { density: Number.MAX_VALUE, moisture: 640, referenceDensity: 2870, referenceMoisture: 643 },
  moisture: { method: 'stated', percent: 12 },
}

/** Every field that a problem may name, by method. */
const FIELDS: Readonly<Record<FieldMethod, readonly string[]>> = {
  'sand-cone': ['apparatusBefore', 'apparatusAfter', 'coneAndPlate', 'sandDensity', 'moistSoil', 'largestParticle'],
  'rubber-balloon': ['volumeBefore', 'volumeAfter', 'moistSoil', 'largestParticle'],
  'drive-cylinder': ['cylinderAndSoil', 'cylinder', 'volume', 'diameter', 'height', 'largestParticle'],
  'nuclear-gauge': ['rodDepth', 'wetDensity', 'secondWetDensity', 'standardCounts.density', 'standardCounts.moisture', 'standardCounts.referenceDensity', 'standardCounts.referenceMoisture'],
  plain: ['density'],
}
const MOISTURE_FIELDS: Readonly<Record<MoistureMethod, readonly string[]>> = {
  oven: ['wetAndTin', 'dryAndTin', 'tin', 'earlier'],
  microwave: ['wetAndTin', 'dryAndTin', 'tin', 'earlier'],
  carbide: ['readingPercent'],
  gauge: ['moistureDensity', 'correctionK', 'wall.offset'],
  stated: ['percent'],
}
const namesField = (sheet: RawSheet, field: string): boolean =>
  FIELDS[sheet.method].includes(field) || MOISTURE_FIELDS[sheet.moisture.method].some((name) => `moisture.${name}` === field || field.startsWith(`moisture.${name}.`))

const close = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-9 * Math.max(1, Math.abs(a), Math.abs(b))

/** The definitions that an accepted sheet obeys, each by its own words. */
function brokenDefinitions(sheet: RawSheet): string[] {
  const result = reduceSheet(sheet)
  if (!result.ok) return []
  const naive = naiveReduction(sheet)
  const { moisture } = sheet
  const dried = moisture.method === 'oven' || moisture.method === 'microwave'
  const rules: readonly (readonly [name: string, holds: boolean])[] = [
    ['every number is one', notFinite(result).length === 0],
    ['no reading is none', notFinite(sheet).length === 0],
    ['moisture is not below zero', result.moisture >= 0],
    ['dry is no heavier than wet', !dried || (moisture.dryAndTin <= moisture.wetAndTin && moisture.tin < moisture.dryAndTin && moisture.tin >= 0)],
    ['the soil weighs something', result.wetDensity >= 400 && result.wetDensity <= 3500],
    ['wet density by its definition', close(result.wetDensity, naive.wet)],
    ['moisture by its definition', close(result.moisture, naive.w)],
    ['dry density by its definition', close(result.dryDensity, naive.dry)],
    ['wet is dry and its water', close(result.wetDensity, result.dryDensity * (1 + result.moisture / 100))],
    ['its flags are words', result.flags.every(({ message }) => !/NaN|Infinity|undefined/.test(message))],
  ]
  return rules.filter(([, holds]) => !holds).map(([name]) => name)
}

describe('thousands of sheets, careful and careless', () => {
  test('are reduced by their definitions or refused with a field named; never NaN, infinite or thrown', () => {
    const counted = { accepted: 0, refused: 0 }
    fc.assert(
      fc.property(hostileSheet, (sheet) => {
        const result = reduceSheet(sheet)
        if (result.ok) {
          counted.accepted++
          expect(brokenDefinitions(sheet)).toEqual([])
          return
        }
        counted.refused++
        expect(result.problems.length).toBeGreaterThan(0)
        for (const { field, message } of result.problems) {
          expect(namesField(sheet, field), `${field}: ${message}`).toBe(true)
          expect(message).not.toMatch(/NaN|Infinity|undefined/)
        }
      }),
      { ...RUNS, examples: [[COUNTED_FAR]] },
    )
    // neither branch is empty: the sample holds good sheets and bad ones
    expect(counted.accepted).toBeGreaterThan(1000)
    expect(counted.refused).toBeGreaterThan(1000)
  })

  test('are judged as a judge judges who only knows the definitions', () => {
    const seen = { pass: 0, fail: 0, suspect: 0, close: 0 }
    fc.assert(
      fc.property(hostileSheet, (sheet) => {
        const reduced = reduceSheet(sheet)
        if (!reduced.ok) return
        const judgement = judge({ dryDensity: reduced.dryDensity, moisture: reduced.moisture }, AGAINST)
        if (!judgement.ok) throw new Error(`An accepted sheet is not judged: ${judgement.problems.map((problem) => problem.message).join(' ')}`)
        expect(notFinite(judgement.verdict)).toEqual([])
        expect(JSON.stringify(judgement.verdict)).not.toMatch(/NaN|Infinity/)
        const naive = naiveOutcome(naiveReduction(sheet), LIMITS)
        if (naive.margin < 1e-6) seen.close++
        else expect(judgement.verdict.outcome).toBe(naive.outcome)
        seen[judgement.verdict.outcome]++
      }),
      RUNS,
    )
    expect(Math.min(seen.pass, seen.fail, seen.suspect)).toBeGreaterThan(20)
    expect(seen.close).toBeLessThan(10)
  })

  test('a careful sheet is taken, whatever its method and units, unless gauge water or density goes past what soil has', () => {
    const methods = new Set<string>()
    fc.assert(
      fc.property(likelySheet, (sheet) => {
        const result = reduceSheet(sheet)
        if (result.ok) methods.add(`${sheet.method} ${sheet.moisture.method}`)
        else expect(result.problems.map((problem) => problem.code).filter((code) => !['density-absurd', 'moisture-range', 'water-heavier'].includes(code))).toEqual([])
      }),
      RUNS,
    )
    // five field methods by five moisture methods
    expect(methods.size).toBe(25)
  })
})
