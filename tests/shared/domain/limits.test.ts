import { describe, expect, test } from 'vitest'
import { criterionProblems, describeCriterion, readingOf, stepFor } from '#shared/domain/limits.ts'
import type { CompactionStep, Criterion } from '#shared/domain/limits.ts'
import type { RoundingRule } from '#shared/domain/rounding.ts'
import { convertDensity } from '#shared/units/density.ts'

const even: RoundingRule = { method: 'rounding', ties: 'even' }
const up: RoundingRule = { method: 'rounding', ties: 'up' }
const absolute: RoundingRule = { method: 'absolute' }
// Ohio 203.07 as read in practice 3.3: 102 % to 104.9 lb/ft³, 100 % to 119.9, 98 % from 120.
const OHIO: CompactionStep[] = [{ belowMaxDryPcf: 105, text: '102' }, { belowMaxDryPcf: 120, text: '100' }, { text: '98' }]
const band = (lowText: string, highText: string): Criterion => ({ kind: 'moisture-band', lowText, highText })

describe('readings', () => {
  test.each([
    ['95', even, '"95" admits 94.6, not 94.5.'],
    ['95', up, '"95" admits 94.5, not 94.4.'],
    ['95.0', even, '"95.0" admits 94.95, not 94.94.'],
    ['96', even, '"96" admits 95.5, not 95.4.'],
    ['95', absolute, '"95" is compared exactly, with the unrounded value.'],
  ])('a minimum compaction of "%s"', (text, rule, reading) => {
    expect(readingOf({ kind: 'rc-min', text }, rule)).toBe(reading)
  })

  test('a band of "±2" admits 2.4 (domain section Verdict), 2.5 too where ties go to even, only 2.0 exactly', () => {
    expect(readingOf(band('-2', '+2'), up)).toBe('Admits \u22122.4 to +2.4 points.')
    expect(readingOf(band('-2', '+2'), even)).toBe('Admits \u22122.5 to +2.5 points.')
    expect(readingOf(band('-2.0', '+2.0'), up)).toBe('Admits \u22122.04 to +2.04 points.')
    expect(readingOf(band('-2', '+2'), absolute)).toBe('Admits \u22122 to +2 points.')
    expect(readingOf(band('0', '4'), up)).toBe('Admits \u22120.4 to +4.4 points.')
  })

  test('a maximum and steps', () => {
    expect(readingOf({ kind: 'air-voids-max', text: '10' }, up)).toBe('"10" admits 10.4, not 10.5.')
    expect(readingOf({ kind: 'rc-min-steps', steps: OHIO }, up)).toBe('"102" admits 101.5, not 101.4. "100" admits 99.5, not 99.4. "98" admits 97.5, not 97.4.')
  })
})

describe('descriptions', () => {
  test.each<[Criterion, string]>([
    [{ kind: 'rc-min', text: '95' }, 'At least 95 % of maximum dry unit weight'],
    [{ kind: 'rc-max', text: '103.0' }, 'At most 103.0 % of maximum dry unit weight'],
    [{ kind: 'rc-min-steps', steps: OHIO }, 'At least, by maximum dry unit weight: 102 % below 105 pcf, 100 % below 120 pcf, 98 % otherwise'],
    [band('-2', '+2'), 'Moisture ±2 points of optimum'],
    [band('-1', '3'), 'Moisture \u22121 to +3 points of optimum'],
    [band('0', '+4'), 'Moisture 0 to +4 points of optimum'],
    [{ kind: 'saturation-min', text: '80' }, 'Saturation at least 80 %'],
    [{ kind: 'saturation-max', text: '95' }, 'Saturation at most 95 %'],
    [{ kind: 'air-voids-max', text: '10' }, 'Air voids at most 10 %'],
    [{ kind: 'dry-density-min', text: '17.5', unit: 'kN/m3' }, 'Dry unit weight at least 17.5 kN/m³'],
  ])('%j', (criterion, words) => {
    expect(describeCriterion(criterion)).toBe(words)
  })
})

describe('steps of the minimum (Ohio 203.07, practice 3.3)', () => {
  test.each([[90, '102'], [104.9, '102'], [105, '100'], [119.9, '100'], [120, '98'], [104.96, '100'], [145, '98']])(
    'a maximum of %d pcf asks for %s %%',
    (pcf, text) => {
      expect(stepFor(OHIO, convertDensity(pcf, 'pcf', 'kg/m3'))).toBe(text)
    },
  )
})

describe('entry', () => {
  const codes = (criterion: Criterion) => criterionProblems(criterion, 'c').map((p) => `${p.field} ${p.code}`)

  test('refuses what is no limit, with the field', () => {
    expect(codes({ kind: 'rc-min', text: '95 %' })).toEqual(['c.text limit-unreadable'])
    expect(codes({ kind: 'rc-min', text: '-95' })).toEqual(['c.text limit-negative'])
    expect(codes(band('+3', '-1'))).toEqual(['c.lowText band-reversed'])
    expect(codes(band('low', ''))).toEqual(['c.lowText limit-unreadable', 'c.highText limit-unreadable'])
    expect(codes({ kind: 'rc-min-steps', steps: [] })).toEqual(['c.steps steps-order'])
    expect(codes({ kind: 'rc-min-steps', steps: [{ belowMaxDryPcf: 120, text: '98' }, { belowMaxDryPcf: 105, text: '100' }] })).toEqual(['c.steps.1 steps-order'])
    expect(codes({ kind: 'rc-min-steps', steps: [{ text: '98' }, { text: '100' }] })).toEqual(['c.steps.0 steps-order'])
  })

  test('accepts them as specifications write them', () => {
    for (const criterion of [band('-2', '+2'), band('\u22122.0', '3'), { kind: 'rc-min-steps', steps: OHIO } as const, { kind: 'dry-density-min', text: '110.5', unit: 'pcf' } as const]) {
      expect(codes(criterion)).toEqual([])
    }
  })
})
