import type { Cause } from './cell-state.ts'
import type { LotFacts } from './lot-facts.ts'

/** Per cell, what makes it rework, awaiting retest, suspect or held, with the test that is the cause. */
export interface LotCauses {
  readonly rework: (cell: number) => Cause | null
  readonly retest: (cell: number) => Cause | null
  readonly suspect: (cell: number) => Cause | null
  readonly hold: (cell: number) => Cause | null
}

/**
 * Reads marks and open orders into causes. A failure mark is live while its test is its chain's current result and not
 * superseded; once rework was reported the mark stays until the order closes, and the ground is awaiting its retest as
 * long as an order ready for retest holds the cell. An order issued or worked on is rework, and so is an old mark that
 * no order holds. Of several causes the test with the lowest running number is named.
 */
export function causesOf(facts: LotFacts): LotCauses {
  const seq = new Map(facts.tests.map((test) => [test.testId, test.seq]))
  const live = new Set(facts.tests.filter((test) => !test.superseded).map((test) => test.testId))
  const rank = (testId: string | null) => (testId === null ? Number.POSITIVE_INFINITY : (seq.get(testId) ?? Number.MAX_SAFE_INTEGER))
  const collect = (items: readonly { readonly cells: readonly number[]; readonly testId: string | null }[]) => {
    const causes = new Map<number, Cause>()
    const sorted = [...items].sort((a, b) => compare(rank(a.testId), rank(b.testId)) || compare(a.testId ?? '', b.testId ?? ''))
    for (const { cells, testId } of sorted) for (const cell of cells) if (!causes.has(cell)) causes.set(cell, { testId })
    return causes
  }
  const failures = facts.marks.filter((mark) => mark.kind === 'fail')
  const ordersIn = (ready: boolean) =>
    collect(facts.orders.filter((order) => (order.state === 'ready') === ready).map((order) => ({ cells: order.cells, testId: order.causeTestId })))
  const liveFailures = collect(failures.filter((mark) => live.has(mark.testId)))
  const oldFailures = collect(failures.filter((mark) => !live.has(mark.testId)))
  const working = ordersIn(false)
  const ready = ordersIn(true)
  const suspects = collect(facts.marks.filter((mark) => mark.kind === 'suspect'))
  const holds = collect(facts.marks.filter((mark) => mark.kind === 'hold'))
  return {
    rework: (cell) => liveFailures.get(cell) ?? working.get(cell) ?? (ready.has(cell) ? null : (oldFailures.get(cell) ?? null)),
    retest: (cell) => ready.get(cell) ?? null,
    suspect: (cell) => suspects.get(cell) ?? null,
    hold: (cell) => holds.get(cell) ?? null,
  }
}

function compare<T extends number | string>(a: T, b: T): number {
  return a < b ? -1 : a > b ? 1 : 0
}
