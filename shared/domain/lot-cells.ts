import { stateOf } from './cell-state.ts'
import { groupBy } from './group-by.ts'
import { causesOf } from './lot-causes.ts'
import type { DerivedCell, DerivedPair, LotFacts, LotTest, SharePair } from './lot-facts.ts'

/**
 * State, spoken volume and naming test of each cell of a lot, from its facts and the shares already given.
 * A standing release (the cell has not grown since) is judged as it was; a topped-up one only by what was added.
 * @param volumes placed volume by cell, cm³
 * @param counting the required tests that take part in the shares
 */
export function deriveCells(
  facts: LotFacts,
  volumes: ReadonlyMap<number, number>,
  pairs: readonly DerivedPair[],
  counting: readonly LotTest[],
): DerivedCell[] {
  const tests = new Map(counting.map((test) => [test.testId, test]))
  const pairsByCell = groupBy(pairs, (pair) => pair.cell)
  const releaseOf = new Map(facts.releases.map((release) => [release.cell, release]))
  const inspected = new Map((facts.inspections ?? []).map((inspection) => [inspection.cell, inspection.outcome]))
  const accepted = new Set(facts.acceptedAsIs)
  const rechecks = new Set(facts.rechecks)
  const causes = causesOf(facts)

  return facts.cells.map(({ cell, partial }) => {
    const volumeCm3 = volumes.get(cell) ?? 0
    const shares = (pairsByCell.get(cell) ?? []).map((pair) => ({ ...pair, test: tests.get(pair.testId) }))
    const passes = shares.filter((share) => share.frozen || share.test?.outcome === 'pass')
    const release = releaseOf.get(cell)
    const stands = release !== undefined && volumeCm3 <= release.volumeCm3
    const spokenCm3 = sumShares(passes)
    const fresh = sumShares(passes.filter((share) => !share.frozen))
    const stillToSpeakFor = volumeCm3 - (release?.volumeCm3 ?? 0)
    const foundation = facts.lift === 0
    const { state, flags, namingTestId } = stateOf({
      placed: foundation || volumeCm3 > 0,
      partial,
      acceptedAsIs: accepted.has(cell),
      rework: causes.rework(cell) ?? (foundation && inspected.get(cell) === 'not-accepted' ? { testId: null } : null),
      retest: causes.retest(cell),
      recheck: rechecks.has(cell),
      release: stands ? release.status : null,
      suspect: causes.suspect(cell),
      hold: causes.hold(cell),
      spokenFor: foundation ? inspected.get(cell) === 'accepted' : stands ? spokenCm3 >= volumeCm3 : fresh >= stillToSpeakFor,
      leadingPassId: leading(passes),
      pendingId: leading(shares.filter((share) => share.test?.outcome === 'pending')),
      near: passes.some((share) => share.test?.near === true),
    })
    return { cell, state, flags, volumeCm3, spokenCm3, namingTestId }
  })
}

/** The test with the largest share; of equal ones the lower running number. */
function leading(shares: readonly (DerivedPair & { readonly test: LotTest | undefined })[]): string | null {
  const byTest = groupBy(shares, (share) => share.testId)
  const [first] = [...byTest.values()]
    .map((own) => ({ testId: own[0].testId, seq: own[0].test?.seq ?? Number.POSITIVE_INFINITY, cm3: sumShares(own) }))
    .sort((a, b) => b.cm3 - a.cm3 || a.seq - b.seq)
  return first?.testId ?? null
}

function sumShares(shares: readonly SharePair[]): number {
  return shares.reduce((total, share) => total + share.cm3, 0)
}
