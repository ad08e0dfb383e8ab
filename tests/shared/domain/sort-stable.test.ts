import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { sortStable } from '#shared/domain/sort-stable.ts'

describe('the stable sort of indices', () => {
  it('keeps the order of equal keys', () => {
    expect([...sortStable(Uint32Array.of(0, 1, 2, 3), Float64Array.of(5, 2, 5, 2))]).toEqual([1, 3, 0, 2])
  })

  it('sorts whole keys up to 2^53 − 1 as a comparison would', () => {
    const key = fc.oneof(fc.integer({ min: 0, max: 3000 }), fc.maxSafeNat())
    fc.assert(
      fc.property(fc.array(key, { maxLength: 40 }), (keys) => {
        const indices = keys.map((_, index) => index)
        const expected = [...indices].sort((a, b) => keys[a] - keys[b] || a - b)
        expect([...sortStable(Uint32Array.from(indices), Float64Array.from(keys))]).toEqual(expected)
      }),
      { seed: 20261201, numRuns: 300 },
    )
  })
})
