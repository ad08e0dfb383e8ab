import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { currentOf, formatTestNumber, nextChainName, parseTestName } from '#shared/domain/retest-chain.ts'
import type { ChainEntry } from '#shared/domain/retest-chain.ts'

const chain = (...names: string[]): ChainEntry[] => names.map((name) => ({ name: name.replace('!', ''), isVoid: name.includes('!') }))

describe('names of a chain', () => {
  test('a test number has at least four digits', () => {
    expect(formatTestNumber(142)).toBe('T-0142')
    expect(formatTestNumber(12_345)).toBe('T-12345')
  })

  test('retests count R1, R2; re-runs of a doubtful reading C1; apart from each other', () => {
    expect(nextChainName(chain('T-0142'), 'retest')).toBe('T-0142-R1')
    expect(nextChainName(chain('T-0142', 'T-0142-R1'), 'retest')).toBe('T-0142-R2')
    expect(nextChainName(chain('T-0218'), 're-run')).toBe('T-0218-C1')
    expect(nextChainName(chain('T-0142', 'T-0142-R1'), 're-run')).toBe('T-0142-C1')
    expect(nextChainName(chain('T-0142', 'T-0142-C1'), 'retest')).toBe('T-0142-R1')
  })

  test('no name is ever used again, voided ones included (practice 2, numbering)', () => {
    expect(nextChainName(chain('T-0142!', 'T-0142-R1!'), 'retest')).toBe('T-0142-R2')
  })

  test('an empty chain or a foreign name gives none', () => {
    expect(nextChainName([], 'retest')).toBeNull()
    expect(nextChainName(chain('T-0142', 'T-0143-R1'), 'retest')).toBeNull()
    expect(nextChainName(chain('X'), 'retest')).toBeNull()
  })

  test('names are read back as they were made', () => {
    expect(parseTestName('T-0142-R2')).toEqual({ number: 142, follow: { kind: 'retest', sequence: 2 } })
    expect(parseTestName('T-0218-C1')).toEqual({ number: 218, follow: { kind: 're-run', sequence: 1 } })
    for (const name of ['T-142', 'T-0142-R0', 'T-0142-X1', 't-0142', 'T-0142-R1-C1']) expect(parseTestName(name)).toBeNull()
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 999_999_999 }), (n) => {
        expect(parseTestName(formatTestNumber(n))).toEqual({ number: n, follow: null })
      }),
      { seed: 20261201, numRuns: 100 },
    )
  })
})

describe('the current result', () => {
  test('is the last that is not void', () => {
    expect(currentOf(chain('T-0142', 'T-0142-R1', 'T-0142-R2!'))?.name).toBe('T-0142-R1')
    expect(currentOf(chain('T-0142', 'T-0142-C1'))?.name).toBe('T-0142-C1')
    expect(currentOf(chain('T-0142!'))).toBeNull()
    expect(currentOf([])).toBeNull()
  })
})
