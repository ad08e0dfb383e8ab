import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { deriveLot } from '#shared/domain/derive-lot.ts'
import type { LotFacts, LotTest } from '#shared/domain/lot-facts.ts'
import { buildLotFacts, buildSlice, buildTest, CELL } from '#tests/factories/lot-facts.ts'

const derive = (change: Partial<LotFacts> = {}) => deriveLot(buildLotFacts(change))

describe('properties of the derivation', () => {
  const outcome = fc.constantFrom('pass', 'pass', 'pass', 'fail', 'suspect', 'pending') as fc.Arbitrary<LotTest['outcome']>
  const tests = fc
    .array(fc.record({ cell: fc.integer({ min: 0, max: 5 }), sampledAt: fc.integer({ min: 0, max: 60 }), outcome, superseded: fc.boolean(), purpose: fc.constantFrom('required', 'required', 'judgement') as fc.Arbitrary<LotTest['purpose']> }), { maxLength: 6 })
    .map((items) => items.map(({ cell, ...rest }, i) => buildTest(`t${i + 1}`, cell, rest)))
  const slices = fc
    .uniqueArray(fc.record({ cell: fc.integer({ min: 0, max: 5 }), time: fc.integer({ min: 0, max: 5 }), volume: fc.integer({ min: 1, max: CELL }) }), { selector: ({ cell, time }) => `${cell} ${time}`, maxLength: 12 })
    .map((items) => items.map(({ cell, time, volume }) => buildSlice(cell, time * 10, `p${time}`, volume)))
  const marksOf = (all: readonly LotTest[]) =>
    all.filter((test) => test.outcome === 'fail' || test.outcome === 'suspect').map((test) => ({ testId: test.testId, kind: test.outcome === 'fail' ? ('fail' as const) : ('suspect' as const), cells: [test.cell] }))
  const settings = { seed: 20261201, numRuns: 300 }

  it('the answer does not depend on the order in which the records arrived', () => {
    fc.assert(
      fc.property(slices, tests, (fill, taken) => {
        const one = derive({ slices: fill, tests: taken, marks: marksOf(taken) })
        const other = derive({ slices: [...fill].reverse(), tests: [...taken].reverse(), marks: [...marksOf(taken)].reverse() })
        expect(other).toEqual(one)
      }),
      settings,
    )
  })

  it('ground meets spec only where passes hold all of it, and never where a live failure marks it', () => {
    fc.assert(
      fc.property(slices, tests, (fill, taken) => {
        const lot = derive({ slices: fill, tests: taken, marks: marksOf(taken) })
        const failed = new Set(taken.filter((test) => test.outcome === 'fail' && !test.superseded).map((test) => test.cell))
        for (const cell of lot.cells) {
          expect(cell.spokenCm3).toBeLessThanOrEqual(cell.volumeCm3)
          if (cell.state === 'meets-spec') expect([cell.spokenCm3, failed.has(cell.cell)]).toEqual([cell.volumeCm3, false])
          if (cell.volumeCm3 > 0 && failed.has(cell.cell)) expect(cell.state).toBe('rework')
        }
      }),
      settings,
    )
  })

  it('with passes only, a lot owes nothing exactly when all its fill meets spec', () => {
    fc.assert(
      fc.property(slices, fc.array(fc.integer({ min: 0, max: 5 }), { maxLength: 4 }), (fill, cells) => {
        const lot = derive({ slices: fill, tests: cells.map((cell, i) => buildTest(`t${i + 1}`, cell)) })
        expect(lot.cells.every((cell) => cell.state === 'meets-spec' || cell.state === 'not-placed')).toBe(lot.owed === 0)
      }),
      settings,
    )
  })

  it('releasing what meets spec changes nothing else', () => {
    fc.assert(
      fc.property(slices, tests, (fill, taken) => {
        const before = derive({ slices: fill, tests: taken, marks: marksOf(taken) })
        const releases = before.cells
          .filter((cell) => cell.state === 'meets-spec')
          .map(({ cell, volumeCm3 }) => ({ cell, status: 'released' as const, volumeCm3, pairs: before.pairs.filter((pair) => pair.cell === cell).map(({ testId, cm3 }) => ({ testId, cell, cm3 })) }))
        const after = derive({ slices: fill, tests: taken, marks: marksOf(taken), releases })
        expect(after.brokenReleases).toEqual([])
        expect(after.cells.map((cell) => cell.spokenCm3)).toEqual(before.cells.map((cell) => cell.spokenCm3))
        expect(after.cells.map((cell) => cell.state)).toEqual(before.cells.map((cell) => (cell.state === 'meets-spec' ? 'released' : cell.state)))
        expect([after.required, after.owed]).toEqual([before.required, before.owed])
      }),
      settings,
    )
  })
})
