import { describe, expect, it } from 'vitest'
import type { RejudgeAnswer } from '#shared/schemas/rejudge.ts'
import { REHEARSED } from '#tests/factories/rejudging-view.ts'
import { moveLines, orderLines, releaseLines } from '#web/features/lab/rejudge/rejudge-words.ts'

const [test] = REHEARSED.tests as [RejudgeAnswer['tests'][number]]
const many = Array.from({ length: 6 }, (_, i) => i)

describe('what judging again does, in words', () => {
  it('sums the cells of one kind of move over the lifts, the gravest first', () => {
    const lines = moveLines([
      { lift: 1, from: 'rework', to: 'meets-spec', cells: [1] },
      { lift: 2, from: 'released', to: 'rework', cells: [1, 2] },
      { lift: 3, from: 'released', to: 'rework', cells: [1] },
      { lift: 5, from: 'released', to: 'awaiting-test', cells: [7] },
      { lift: 2, from: 'released', to: 'awaiting-test', cells: [8] },
    ])
    expect(lines.map((line) => line.words)).toEqual(['3 cells: released to rework, lifts 2 to 3', '2 cells: released to awaiting test, lifts 2, 5', '1 cell: rework to meets spec, lift 1'])
  })

  it('names few orders and releases, counts many, and gives an order its number only once it is issued', () => {
    expect(orderLines([test], true)).toEqual(['R-009 for T-0003'])
    expect(orderLines([test], false)).toEqual(['A rework order for T-0003'])
    expect(orderLines(many.map(() => test), true)).toEqual(['Rework orders for 6 tests'])
    expect(orderLines([{ ...test, effect: { marks: 'lift', order: 'stands' } }], true)).toEqual(['R-009 stands though T-0003 no longer fails: work had begun'])
    expect(releaseLines(many.map((n) => ({ number: `A-00${n}`, lift: n, cells: [1, 2] })))).toEqual(['6 releases revoked in 12 cells'])
  })
})
