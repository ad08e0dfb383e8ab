import { allocateShares, type Allocation } from './allocation.ts'
import { requiredTests, spokenVolume, type FrequencyOptions } from './frequency.ts'
import { hasFlag } from './ground-state.ts'
import { deriveCells } from './lot-cells.ts'
import type {
  BrokenRelease,
  DerivedCell,
  DerivedPair,
  LotDerivation,
  LotFacts,
  LotRelease,
  LotStanding,
  LotTest,
  OrderProgress,
} from './lot-facts.ts'
import { orderProgress } from './order-closing.ts'

/**
 * All that follows from the facts of one lot: volumes, f, the counts of tests, who speaks for what, the state of each
 * cell, how far its orders are from closing, and where the lot stands (domain sections 6 and 7). The one function for
 * writing, recomputing and previewing; it depends on no order among the records.
 * @param facts cells of the lot, each once, and every active record that touches them; a slice lies in a cell of the lot
 */
export function deriveLot(facts: LotFacts): LotDerivation {
  const volumes = volumesOf(facts)
  const measure = {
    volumeCm3: sum([...volumes.values()]),
    areaMm2: sum(facts.cells.filter((cell) => volumes.get(cell.cell) !== 0).map((cell) => cell.areaMm2)),
    lengthMm: facts.lengthMm,
  }
  const rules = facts.lift === 0 ? [] : facts.rules
  const options: FrequencyOptions = {
    remainderTolerancePercent: facts.remainderTolerancePercent,
    multiplier: facts.multiplier,
  }
  const fCm3 = spokenVolume(rules, measure, options)
  const byLiftDay = facts.lift === 0 ? 0 : (facts.minimumOwedByLiftDay ?? 0)
  const required = Math.max(requiredTests(rules, measure, options), measure.volumeCm3 > 0 ? byLiftDay : 0)

  const counting = facts.tests.filter((test) => test.purpose === 'required' && !test.superseded)
  const withOutcome = (outcome: LotTest['outcome']) => counting.filter((test) => test.outcome === outcome).length
  const passing = withOutcome('pass')
  const taken = passing + withOutcome('fail')
  const owed = Math.max(0, required - taken)
  const reruns = withOutcome('suspect')

  const orders = facts.orders.map(
    (order): OrderProgress => ({
      orderId: order.orderId,
      ...orderProgress(order, facts.tests, (cell) => volumes.get(cell) ?? 0, fCm3),
    }),
  )
  const retestsDue = sum(orders.filter((_, i) => facts.orders[i].state === 'ready').map((order) => order.left))

  const allocation = allocate(facts, counting, fCm3)
  const pairs = pairsOf(facts.releases, allocation)
  const cells = deriveCells(facts, volumes, pairs, counting)
  return {
    volumeCm3: measure.volumeCm3,
    areaMm2: measure.areaMm2,
    fCm3,
    required,
    taken,
    owed,
    reruns,
    passing,
    toStake: Math.max(0, owed - reruns - withOutcome('pending') - retestsDue),
    pairs,
    cells,
    orders,
    brokenReleases: brokenReleases(facts, volumes, counting),
    standing: standingOf(cells, owed, reruns),
  }
}

function volumesOf(facts: LotFacts): Map<number, number> {
  const volumes = new Map(facts.cells.map((cell) => [cell.cell, 0]))
  for (const slice of facts.slices) volumes.set(slice.cell, (volumes.get(slice.cell) ?? 0) + slice.volumeCm3)
  return volumes
}

function allocate(facts: LotFacts, points: readonly LotTest[], fCm3: number): Allocation {
  const cells = new Map(facts.cells.map((cell) => [cell.cell, cell]))
  return allocateShares({
    slices: facts.slices,
    points,
    frozen: facts.releases,
    fCm3,
    cellOf: (index) => {
      const cell = cells.get(index)
      if (cell === undefined) throw new RangeError(`Cell ${index} has fill but is not in the lot`)
      return cell
    },
  })
}

/** Shares by test and cell: the slices of a cell are one ground. */
function pairsOf(releases: readonly LotRelease[], allocation: Allocation): DerivedPair[] {
  const frozen = releases.flatMap((release) => release.pairs.map((pair) => ({ ...pair, frozen: true, far: false })))
  const merged = new Map<string, DerivedPair>()
  for (const { testId, cell, cm3, far } of allocation.shares) {
    const key = `${cell} ${testId}`
    const known = merged.get(key)
    merged.set(key, { testId, cell, cm3: cm3 + (known?.cm3 ?? 0), frozen: false, far })
  }
  return [...frozen, ...merged.values()].sort(
    (a, b) => a.cell - b.cell || (a.testId < b.testId ? -1 : a.testId > b.testId ? 1 : Number(b.frozen) - Number(a.frozen)),
  )
}

function brokenReleases(
  facts: LotFacts,
  volumes: ReadonlyMap<number, number>,
  counting: readonly LotTest[],
): BrokenRelease[] {
  const passes = new Set(counting.filter((test) => test.outcome === 'pass').map((test) => test.testId))
  return facts.releases.flatMap(({ cell, pairs }): BrokenRelease[] => {
    const failure = facts.marks.find((mark) => mark.kind === 'fail' && mark.cells.includes(cell))
    if (failure !== undefined) return [{ cell, reason: 'failed', testId: failure.testId }]
    if (facts.lift > 0 && volumes.get(cell) === 0) return [{ cell, reason: 'removed', testId: null }]
    const lost = pairs.find((pair) => !passes.has(pair.testId))
    return lost === undefined ? [] : [{ cell, reason: 'basis-lost', testId: lost.testId }]
  })
}

function standingOf(cells: readonly DerivedCell[], owed: number, reruns: number): LotStanding {
  const placed = cells.filter((cell) => cell.state !== 'not-placed')
  const some = (state: DerivedCell['state']) => placed.some((cell) => cell.state === state)
  if (placed.length === 0) return 'not-placed'
  if (some('rework')) return 'rework'
  if (some('awaiting-retest')) return 'awaiting-retest'
  if (some('suspect') || reruns > 0) return 'suspect'
  if (owed > 0 || some('awaiting-test')) return 'owes'
  if (some('recheck')) return 'recheck'
  if (!some('meets-spec')) return 'released'
  const waiting = placed.filter((cell) => cell.state === 'meets-spec')
  return waiting.every((cell) => hasFlag(cell.flags, 'awaitingAcceptance')) ? 'waiting-acceptance' : 'waiting-release'
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0)
}
