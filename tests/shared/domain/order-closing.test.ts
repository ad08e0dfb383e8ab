import { describe, expect, it } from 'vitest'
import type { LotTest } from '#shared/domain/lot-facts.ts'
import { cellsThatMayLeave, orderProgress, passesToClose } from '#shared/domain/order-closing.ts'

const test = (testId: string, cell: number, sampledAt: number, change: Partial<LotTest> = {}): LotTest => ({
  testId,
  seq: sampledAt,
  at: { u: cell * 1000 + 500, v: 500 },
  cell,
  sampledAt,
  purpose: 'required',
  outcome: 'pass',
  near: false,
  superseded: false,
  ...change,
})

describe('closing a rework order', () => {
  it('takes one pass per f of its volume, at least one', () => {
    expect(passesToClose(1000, 500)).toBe(2)
    expect(passesToClose(1001, 500)).toBe(3)
    expect(passesToClose(20, 500)).toBe(1)
    expect(passesToClose(0, 0)).toBe(1)
  })

  it('counts only passes inside it, of required purpose, sampled after the rework was reported', () => {
    const tests = [
      test('before', 1, 90),
      test('outside', 7, 150),
      test('judgement', 1, 150, { purpose: 'judgement' }),
      test('suspect', 1, 150, { outcome: 'suspect' }),
      test('superseded', 1, 150, { superseded: true }),
      test('good', 2, 150),
    ]
    const order = { cells: [1, 2, 3], reportedAt: 100 }
    expect(orderProgress(order, tests, () => 200, 500)).toEqual({ volumeCm3: 600, needed: 2, passed: 1, left: 1, closes: false })
    expect(orderProgress(order, [...tests, test('second', 3, 160)], () => 200, 500)).toMatchObject({ passed: 2, left: 0, closes: true })
  })

  it('counts nothing before rework is reported, and does not close over a failing retest', () => {
    expect(orderProgress({ cells: [1], reportedAt: null }, [test('t', 1, 150)], () => 200, 500)).toMatchObject({ passed: 0, closes: false })
    const tests = [test('t', 1, 150), test('u', 1, 160, { outcome: 'fail' })]
    expect(orderProgress({ cells: [1], reportedAt: 100 }, tests, () => 200, 500)).toMatchObject({ passed: 1, closes: false })
  })
})

describe('leaving an order by a bounding pass', () => {
  const cells = [0, 1, 2, 3, 4].map((cell) => ({ cell, centroid: { u: cell * 1000 + 500, v: 500 } }))
  const failure = { at: { u: 500, v: 500 }, cell: 0, sampledAt: 100 }

  it('lets go the cell of a later pass and the cells behind it', () => {
    expect(cellsThatMayLeave(failure, cells, [test('p', 2, 150)])).toEqual([2, 3, 4].map((cell) => ({ cell, testId: 'p' })))
  })

  it('lets nothing go for a pass sampled before the failure', () => {
    expect(cellsThatMayLeave(failure, cells, [test('p', 2, 100)])).toEqual([])
  })

  it('never lets the cell of the failure itself go', () => {
    expect(cellsThatMayLeave(failure, cells.slice(0, 1), [test('p', 0, 150)])).toEqual([])
  })

  it('takes a pass off to the side as between only inside the circle over failure and cell', () => {
    // circle over (500, 500) and (4500, 500): centre (2500, 500), radius 2000
    const aside = (v: number) => cellsThatMayLeave(failure, [cells[4]], [test('p', 99, 150, { at: { u: 2500, v } })])
    expect(aside(2500)).toEqual([{ cell: 4, testId: 'p' }])
    expect(aside(2501)).toEqual([])
  })
})
