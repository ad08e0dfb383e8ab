import { describe, expect, it } from 'vitest'
import { deriveLot } from '#shared/domain/derive-lot.ts'
import { GROUND_FLAGS } from '#shared/domain/ground-state.ts'
import type { LotFacts, LotOrder } from '#shared/domain/lot-facts.ts'
import { buildLotFacts, buildSlice, buildTest, CELL } from '#tests/factories/lot-facts.ts'

const derive = (change: Partial<LotFacts> = {}) => deriveLot(buildLotFacts(change))
const statesOf = (change: Partial<LotFacts>) => derive(change).cells.map((cell) => cell.state)
const threePasses = [buildTest('t1', 0), buildTest('t2', 3), buildTest('t3', 5)]
const order = (change: Partial<LotOrder> = {}): LotOrder => ({ orderId: 'o1', state: 'issued', cells: [2, 3, 4], causeTestId: 't2', reportedAt: null, ...change })

describe('a lot before and after its tests', () => {
  it('owes every test while none is taken', () => {
    const lot = derive()
    expect(lot).toMatchObject({ volumeCm3: 120_000_000, areaMm2: 600_000_000, fCm3: 50_000_000 })
    expect(lot).toMatchObject({ required: 3, taken: 0, owed: 3, reruns: 0, passing: 0, toStake: 3, standing: 'owes' })
    expect(new Set(lot.cells.map((cell) => cell.state))).toEqual(new Set(['awaiting-test']))
  })

  it('shows which cells one pass speaks for in full', () => {
    // the test in cell 0 has 50 m³: 20 of cell 0, 20 of cell 1, 10 of cell 2
    const lot = derive({ tests: [buildTest('t1', 0)] })
    expect(lot.cells.map((cell) => cell.spokenCm3 / 1e6)).toEqual([20, 20, 10, 0, 0, 0])
    expect(lot.cells.map((cell) => cell.state)).toEqual(['meets-spec', 'meets-spec', ...Array<string>(4).fill('awaiting-test')])
    expect(lot).toMatchObject({ taken: 1, owed: 2, standing: 'owes' })
    expect(lot.cells[1].namingTestId).toBe('t1')
  })

  it('meets spec everywhere with the tests it needs', () => {
    const lot = derive({ tests: threePasses })
    expect(lot).toMatchObject({ taken: 3, owed: 0, passing: 3, toStake: 0, standing: 'waiting-release' })
    expect(lot.cells.every((cell) => cell.state === 'meets-spec' && cell.spokenCm3 === CELL)).toBe(true)
    // t2 gives 20 to its own cell 3, 20 to cell 2 (lower index at equal distance), so 10 of cell 4; t3 gives the rest
    expect(lot.pairs.filter((pair) => pair.cell === 4).map(({ testId, cm3 }) => [testId, cm3 / 1e6])).toEqual([['t2', 10], ['t3', 10]])
  })

  it('leaves out judgement, verification, referee and superseded tests', () => {
    const tests = [
      buildTest('t1', 0, { purpose: 'judgement' }),
      buildTest('t2', 1, { purpose: 'verification' }),
      buildTest('t3', 2, { purpose: 'referee' }),
      buildTest('t4', 3, { superseded: true }),
    ]
    expect(derive({ tests })).toMatchObject({ required: 3, taken: 0, pairs: [] })
  })

  it('lists re-runs apart and stakes no test that is due anyway', () => {
    const tests = [buildTest('t1', 0, { outcome: 'suspect' }), buildTest('t2', 3, { outcome: 'pending' }), buildTest('t3', 5)]
    const lot = derive({ tests, marks: [{ testId: 't1', kind: 'suspect', cells: [0, 1] }] })
    expect(lot).toMatchObject({ taken: 1, owed: 2, reruns: 1, toStake: 0, standing: 'suspect' })
    expect(lot.cells.map(({ state, namingTestId }) => [state, namingTestId])).toEqual([
      ['suspect', 't1'],
      ['suspect', 't1'],
      ['awaiting-test', 't2'],
      ['awaiting-test', 't2'],
      ['awaiting-test', 't2'],
      ['meets-spec', 't3'],
    ])
  })

  it('takes the part of a minimum per lift and day when it is the larger', () => {
    expect(derive({ minimumOwedByLiftDay: 5 })).toMatchObject({ required: 5, fCm3: 50_000_000 })
    expect(derive({ minimumOwedByLiftDay: 5, slices: [] })).toMatchObject({ required: 0, standing: 'not-placed' })
  })

  it('flags cells that a near result speaks for, and cells partly placed', () => {
    const cells = buildLotFacts().cells.map((cell) => ({ ...cell, partial: cell.cell === 5 }))
    const lot = derive({ cells, tests: [buildTest('t1', 0, { near: true }), buildTest('t2', 3), buildTest('t3', 5)] })
    const { near, partial } = GROUND_FLAGS
    expect(lot.cells.map((cell) => cell.flags)).toEqual([near, near, 0, 0, 0, partial])
  })

  it('shows a cell without fill as not placed', () => {
    expect(statesOf({ slices: buildLotFacts().slices.slice(0, 5), tests: threePasses })[5]).toBe('not-placed')
  })

  it('wants cells for its fill', () => {
    expect(() => derive({ slices: [buildSlice(77)], tests: threePasses })).toThrow(RangeError)
  })
})

describe('the round of a failure', () => {
  const mark = { testId: 't2', kind: 'fail' as const, cells: [2, 3] }
  const failing = buildTest('t2', 3, { outcome: 'fail' })
  const others = [buildTest('t1', 0), buildTest('t3', 5)]

  it('turns marked ground to rework, named by the failing test, and holds its share from the passes', () => {
    const lot = derive({ tests: [failing, ...others], marks: [mark] })
    expect(lot).toMatchObject({ taken: 3, passing: 2, owed: 0, standing: 'rework' })
    expect(lot.cells.map(({ state, namingTestId }) => [state, namingTestId])).toEqual([
      ['meets-spec', 't1'],
      ['meets-spec', 't1'],
      ['rework', 't2'],
      ['rework', 't2'],
      ['awaiting-test', null],
      ['meets-spec', 't3'],
    ])
  })

  it('waits for its retest once rework is reported, and stakes nothing for it', () => {
    const lot = derive({
      tests: [{ ...failing, superseded: true }, ...others],
      marks: [mark],
      orders: [order({ state: 'ready', cells: [2, 3], reportedAt: 30 })],
    })
    expect(lot.cells.map((cell) => cell.state).slice(2, 4)).toEqual(['awaiting-retest', 'awaiting-retest'])
    expect(lot.cells[2].namingTestId).toBe('t2')
    expect(lot).toMatchObject({ taken: 2, owed: 1, toStake: 0, standing: 'awaiting-retest' })
    expect(lot.orders).toEqual([{ orderId: 'o1', volumeCm3: 40_000_000, needed: 1, passed: 0, left: 1, closes: false }])
  })

  it('says that the order closes with a retest passed, and meets spec once it is closed', () => {
    const retest = buildTest('t4', 3, { sampledAt: 40, firstCells: [2, 3] })
    const ready = order({ state: 'ready', cells: [2, 3], reportedAt: 30 })
    const open = derive({ tests: [retest, ...others], marks: [mark], orders: [ready] })
    expect(open.orders[0]).toMatchObject({ passed: 1, left: 0, closes: true })
    expect(open.cells[3].state).toBe('awaiting-retest')
    const closed = derive({ tests: [retest, ...others] })
    expect(closed.standing).toBe('waiting-release')
    expect(closed.cells.slice(2, 4).map((cell) => cell.namingTestId)).toEqual(['t4', 't4'])
  })

  it('is rework again when the retest fails', () => {
    const retest = buildTest('t4', 3, { sampledAt: 40, outcome: 'fail' })
    const lot = derive({
      tests: [retest, ...others],
      marks: [mark, { testId: 't4', kind: 'fail', cells: [3] }],
      orders: [order({ state: 'ready', cells: [2, 3], reportedAt: 30 })],
    })
    expect(lot.cells.slice(2, 4).map(({ state, namingTestId }) => [state, namingTestId])).toEqual([
      ['awaiting-retest', 't2'],
      ['rework', 't4'],
    ])
    expect(lot.orders[0]).toMatchObject({ closes: false })
  })

  it('keeps ground in rework while an order is issued or worked on', () => {
    expect(statesOf({ tests: threePasses, orders: [order()] }).slice(2, 5)).toEqual(['rework', 'rework', 'rework'])
    expect(statesOf({ tests: threePasses, orders: [order({ state: 'working' })] })[2]).toBe('rework')
  })
})

describe('releases', () => {
  const release = (cell: number, pairs: { testId: string; cell: number; cm3: number }[], status: 'released' | 'awaiting-acceptance' = 'released') => ({ cell, status, volumeCm3: CELL, pairs })
  const released = [0, 1].map((cell) => release(cell, [{ testId: 't1', cell, cm3: CELL }]))

  it('freeze their shares: a nearer later pass does not take them over', () => {
    const lot = derive({ tests: [buildTest('t1', 0), buildTest('t2', 1, { sampledAt: 30 })], releases: released })
    expect(lot.pairs.filter((pair) => pair.cell < 2).map(({ testId, cell, frozen }) => [testId, cell, frozen])).toEqual([['t1', 0, true], ['t1', 1, true]])
    expect(lot.cells.slice(0, 2).map(({ state, namingTestId, spokenCm3 }) => [state, namingTestId, spokenCm3])).toEqual([
      ['released', 't1', CELL],
      ['released', 't1', CELL],
    ])
  })

  it('end the lot when every cell is released or accepted as is', () => {
    const passes: Record<number, string> = { 0: 't1', 1: 't1', 2: 't2', 3: 't2', 5: 't3' }
    const releases = Object.entries(passes).map(([cell, testId]) => release(Number(cell), [{ testId, cell: Number(cell), cm3: CELL }]))
    expect(derive({ tests: threePasses, releases, acceptedAsIs: [4] }).standing).toBe('released')
    const waiting = releases.map((one) => ({ ...one, status: 'awaiting-acceptance' as const }))
    const lot = derive({ tests: threePasses, releases: waiting, acceptedAsIs: [4] })
    expect(lot.standing).toBe('waiting-acceptance')
    expect(lot.cells[0]).toMatchObject({ state: 'meets-spec', flags: GROUND_FLAGS.awaitingAcceptance })
  })

  it('reopen only the cell that is topped up', () => {
    const slices = [...buildLotFacts().slices, buildSlice(0, 40, 'p2', 1_000_000)]
    const lot = derive({ slices, tests: [buildTest('t1', 0)], releases: released })
    expect(lot.cells.slice(0, 2).map((cell) => cell.state)).toEqual(['awaiting-test', 'released'])
    const again = derive({ slices, tests: [buildTest('t1', 0), buildTest('t2', 0, { sampledAt: 50 })], releases: released })
    expect(again.cells[0]).toMatchObject({ state: 'meets-spec', spokenCm3: CELL + 1_000_000 })
  })

  it('are reported broken when a failure marks the cell, the basis is lost, or the fill is gone', () => {
    const mark = { testId: 't9', kind: 'fail' as const, cells: [0] }
    const failed = buildTest('t9', 0, { outcome: 'fail', purpose: 'judgement' })
    expect(derive({ tests: [buildTest('t1', 0), failed], marks: [mark], releases: released }).brokenReleases).toEqual([{ cell: 0, reason: 'failed', testId: 't9' }])
    expect(derive({ tests: [buildTest('t1', 0, { superseded: true })], releases: released }).brokenReleases).toEqual([
      { cell: 0, reason: 'basis-lost', testId: 't1' },
      { cell: 1, reason: 'basis-lost', testId: 't1' },
    ])
    expect(derive({ slices: buildLotFacts().slices.slice(1), tests: [buildTest('t1', 0)], releases: released }).brokenReleases).toEqual([{ cell: 0, reason: 'removed', testId: null }])
    expect(derive({ tests: [buildTest('t1', 0)], releases: released }).brokenReleases).toEqual([])
  })

  it('stand under a verification hold, which is a failure on ground not released', () => {
    const marks = [{ testId: 'v1', kind: 'hold' as const, cells: [1, 2] }]
    const lot = derive({ tests: [buildTest('t1', 0)], releases: released, marks })
    expect(lot.cells[1]).toMatchObject({ state: 'released', flags: GROUND_FLAGS.hold })
    expect(lot.cells[2]).toMatchObject({ state: 'rework', namingTestId: 'v1' })
    expect(lot.brokenReleases).toEqual([])
  })

  it('give way to a recheck', () => {
    expect(statesOf({ tests: [buildTest('t1', 0)], releases: released, rechecks: [0] }).slice(0, 2)).toEqual(['recheck', 'released'])
  })
})

describe('the foundation', () => {
  const foundation = (change: Partial<LotFacts> = {}) => derive({ lift: 0, slices: [], ...change })

  it('asks for no tests and waits for its inspection', () => {
    const lot = foundation({ inspections: [{ cell: 1, outcome: 'accepted' }, { cell: 2, outcome: 'not-accepted' }], acceptedAsIs: [3] })
    expect(lot).toMatchObject({ volumeCm3: 0, required: 0, owed: 0 })
    expect(lot.cells.map((cell) => cell.state)).toEqual(['awaiting-test', 'meets-spec', 'rework', 'accepted-as-is', 'awaiting-test', 'awaiting-test'])
  })

  it('is released like any lift', () => {
    const releases = [{ cell: 1, status: 'released' as const, volumeCm3: 0, pairs: [] }]
    const lot = foundation({ inspections: [{ cell: 1, outcome: 'accepted' }], releases })
    expect(lot.cells[1].state).toBe('released')
    expect(lot.brokenReleases).toEqual([])
  })

  it('is rework where a failing test marks it', () => {
    const tests = [buildTest('t1', 1, { outcome: 'fail', purpose: 'judgement' })]
    const lot = foundation({ tests, marks: [{ testId: 't1', kind: 'fail', cells: [1] }], inspections: [{ cell: 1, outcome: 'accepted' }] })
    expect(lot.cells[1]).toMatchObject({ state: 'rework', namingTestId: 't1' })
  })
})
