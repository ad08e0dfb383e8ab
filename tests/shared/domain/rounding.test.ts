import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { meets, parseLimit, roundToPlace, settle } from '#shared/domain/rounding.ts'
import type { RoundingRule } from '#shared/domain/rounding.ts'

const seeded = { seed: 20261201, numRuns: 500 }
const even: RoundingRule = { method: 'rounding', ties: 'even' }
const up: RoundingRule = { method: 'rounding', ties: 'up' }
const absolute: RoundingRule = { method: 'absolute' }
const limit = (text: string) => parseLimit(text) ?? { value: Number.NaN, decimals: 0 }

describe('roundToPlace', () => {
  test.each([
    // FAA training slide, slideplayer.com/slide/1650665.
    [4.61, 4.6], [4.64, 4.6], [4.65, 4.6], [4.66, 4.7], [4.69, 4.7], [4.75, 4.8],
  ])('ties to even: %d rounds to %d (FAA slide)', (value, expected) => {
    expect(roundToPlace(value, 1, 'even')).toBe(expected)
  })

  test('ties up: 4.65 rounds to 4.7 and 94.5 to 95 (Iowa IM 202, practice 3.4)', () => {
    expect(roundToPlace(4.65, 1, 'up')).toBe(4.7)
    expect(roundToPlace(94.5, 0, 'up')).toBe(95)
  })

  test('works on the decimal that a number prints as, in any size and either sign', () => {
    expect(roundToPlace(94.95, 1, 'even')).toBe(95)
    expect(roundToPlace(94.85, 1, 'even')).toBe(94.8)
    expect(roundToPlace(-2.5, 0, 'even')).toBe(-2)
    expect(roundToPlace(-2.5, 0, 'up')).toBe(-3)
    expect(roundToPlace(-0.4, 0, 'even')).toBe(0)
    expect(Object.is(roundToPlace(-0.4, 0, 'even'), -0)).toBe(false)
    expect(roundToPlace(1e-300, 2, 'up')).toBe(0)
    expect(roundToPlace(1.5e21, 2, 'up')).toBe(1.5e21)
    expect(roundToPlace(Number.NaN, 1, 'up')).toBeNaN()
  })

  test('agrees with integer arithmetic on every decimal of three places', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 2_000_000 }), fc.constantFrom('even' as const, 'up' as const), (thousandths, ties) => {
        const tens = Math.floor(thousandths / 100)
        const rest = thousandths % 100
        const goesUp = rest > 50 || (rest === 50 && (ties === 'up' || tens % 2 === 1))
        expect(roundToPlace(thousandths / 1000, 1, ties)).toBe((goesUp ? tens + 1 : tens) / 10)
      }),
      seeded,
    )
  })
})

describe('meets', () => {
  test.each([
    // Consequences worked from ASTM E29.
    ['94.5', '95', even, false], ['94.51', '95', even, true], ['94.51', '95', absolute, false],
    ['94.95', '95.0', even, true], ['94.949', '95.0', even, false],
    // practice 3.4: 94.6 meets "95" and misses "95.0"; ties up where the agency says so.
    ['94.6', '95', even, true], ['94.6', '95.0', even, false], ['94.5', '95', up, true],
  ])('%s against a minimum written "%s"', (value, text, rule, expected) => {
    expect(meets(Number(value), limit(text), 'min', rule)).toBe(expected)
  })

  test('a maximum written "4" accepts 4.25 but "4.0" does not (Iowa IM 202, practice 3.4)', () => {
    expect(meets(4.25, limit('4'), 'max', up)).toBe(true)
    expect(meets(4.25, limit('4.0'), 'max', up)).toBe(false)
  })

  test('a value exactly on a limit meets it, also when arithmetic left dust on it', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 800, max: 1200 }), fc.double({ min: 1200, max: 2400, noNaN: true }),
        fc.constantFrom(even, up, absolute), fc.constantFrom('min' as const, 'max' as const),
        (tenths, maximum, rule, side) => {
          const text = (tenths / 10).toFixed(1)
          const observed = (100 * (maximum * (tenths / 1000))) / maximum
          expect(meets(observed, limit(text), side, rule)).toBe(true)
        },
      ),
      seeded,
    )
  })

  test('is monotonic: what meets a minimum still meets it when it is larger', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 90, max: 100, noNaN: true }), fc.double({ min: 0, max: 5, noNaN: true }),
        fc.constantFrom('95', '95.0', '94.95'), fc.constantFrom(even, up, absolute),
        (value, more, text, rule) => {
          if (meets(value, limit(text), 'min', rule)) expect(meets(value + more, limit(text), 'min', rule)).toBe(true)
        },
      ),
      seeded,
    )
  })
})

describe('parseLimit', () => {
  test('reads value and decimals as written, with any minus', () => {
    expect(parseLimit('95')).toEqual({ value: 95, decimals: 0 })
    expect(parseLimit('95.0')).toEqual({ value: 95, decimals: 1 })
    expect(parseLimit('+2')).toEqual({ value: 2, decimals: 0 })
    expect(parseLimit('\u22121.50')).toEqual({ value: -1.5, decimals: 2 })
    expect(parseLimit('-0')).toEqual({ value: 0, decimals: 0 })
  })

  test.each(['', ' ', 'abc', '95%', '9,5', '1e3', 'NaN', '--2', '1.2.3', '9'.repeat(1000), '.5'])('refuses %j', (text) => {
    expect(parseLimit(text)).toBeNull()
  })

  test('settle removes dust and nothing else', () => {
    expect(settle(94.99999999999999)).toBe(95)
    expect(settle(94.9999)).toBe(94.9999)
    expect(Object.is(settle(-1e-13), 0)).toBe(true)
  })
})
