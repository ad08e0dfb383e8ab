import { describe, expect, test } from 'vitest'
import { reworkActions, reworkHeadline } from '#shared/domain/rework-advice.ts'
import type { ReasonCode } from '#shared/domain/verdict-types.ts'

const reasons = (...codes: ReasonCode[]) => codes.map((code) => ({ code }))

describe('the line of a rework order', () => {
  test.each<[ReasonCode, string]>([
    ['too-dry', 'Too dry. Add water.'],
    ['too-wet', 'Too wet. Dry it back.'],
    ['too-loose', 'Too loose. Roll again.'],
    ['too-dense', 'Too dense. Loosen it and roll lighter.'],
    ['saturation-low', 'Too little water. Add water.'],
    ['saturation-high', 'Too much water. Dry it back.'],
    ['air-voids-high', 'Too much air. Roll again.'],
  ])('says what is wrong and what to do: %s', (code, words) => {
    expect(reworkHeadline(reasons(code))).toBe(words)
  })

  test('puts the water before the roller, whatever order the limits are in', () => {
    expect(reworkHeadline(reasons('too-loose', 'too-dry'))).toBe('Too dry and too loose. Add water, then roll again.')
    expect(reworkHeadline(reasons('air-voids-high', 'too-loose', 'too-wet'))).toBe('Too wet, too loose and too much air. Dry it back, then roll again.')
  })

  test('sends people to the lead where no limit is named', () => {
    expect(reworkHeadline([])).toBe('Does not meet specification. Ask the QC lead what to do.')
  })
})

describe('the actions of a rework order', () => {
  test('name each thing to put right once', () => {
    expect(reworkActions(reasons('too-loose', 'air-voids-high', 'saturation-low'))).toEqual(['too-loose', 'too-dry'])
    expect(reworkActions(reasons('too-dense', 'saturation-high'))).toEqual(['too-dense', 'too-wet'])
    expect(reworkActions([])).toEqual(['other'])
  })
})
