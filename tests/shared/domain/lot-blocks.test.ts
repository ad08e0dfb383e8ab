import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { lotBlocks } from '#shared/domain/lot-blocks.ts'
import type { TestHolding } from '#shared/domain/lot-blocks.ts'

const holding = (overrides: Partial<TestHolding>): TestHolding => ({ testId: 'a', seq: 1, outcome: 'pass', cm3: 100, released: false, ...overrides })

describe('the blocks of a lot', () => {
  test('are the tests in the order taken, then what is owed in pieces of f with the remainder last', () => {
    const holdings = [
      holding({ testId: 'late', seq: 9, cm3: 60, outcome: 'fail' }),
      holding({ testId: 'early', seq: 2 }),
      holding({ testId: 'let go', seq: 3, released: true }),
      holding({ testId: 'doubted', seq: 4, cm3: 40, outcome: 'suspect', released: true }),
    ]
    expect(lotBlocks(550, 100, holdings)).toEqual([
      { testId: 'early', state: 'meets', cm3: 100 },
      { testId: 'let go', state: 'released', cm3: 100 },
      { testId: 'doubted', state: 'suspect', cm3: 40 },
      { testId: 'late', state: 'rework', cm3: 60 },
      { testId: null, state: 'owed', cm3: 100 },
      { testId: null, state: 'owed', cm3: 100 },
      { testId: null, state: 'owed', cm3: 50 },
    ])
  })

  test('leave out a test that holds nothing, and are none where nothing is placed', () => {
    expect(lotBlocks(0, 0, [holding({ cm3: 0 })])).toEqual([])
    expect(lotBlocks(70, 0, [])).toEqual([{ testId: null, state: 'owed', cm3: 70 }])
  })

  test('sum to the volume exactly', () => {
    const outcome = fc.constantFrom('pass' as const, 'fail' as const, 'suspect' as const)
    const holdings = fc.array(fc.record({ testId: fc.uuid(), seq: fc.nat(), outcome, cm3: fc.nat(1_000_000), released: fc.boolean() }), { maxLength: 12 })
    fc.assert(
      fc.property(holdings, fc.nat(5_000_000), fc.integer({ min: 50_000, max: 400_000_000 }), (held, rest, fCm3) => {
        const volume = held.reduce((sum, one) => sum + one.cm3, rest)
        const blocks = lotBlocks(volume, fCm3, held)
        expect(blocks.reduce((sum, block) => sum + block.cm3, 0)).toBe(volume)
        expect(blocks.every((block) => block.cm3 > 0)).toBe(true)
      }),
      { seed: 20261201, numRuns: 300 },
    )
  })
})
