import type { GroundSheet } from '#shared/ground-codec.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import type { TestSummary } from '#shared/schemas/field-test.ts'
import type { TestFilter } from '#web/data/test/queries.ts'
import type { BoardMark, BoardStake, MarkOutcome } from '#web/features/ground/board/board-types.ts'

function outcomeOf({ outcome, near }: TestSummary): MarkOutcome {
  return outcome === 'pass' && near ? 'near' : outcome
}

/** The tests of the layer that the sheet shows in their cell; never a voided one or one that a later result replaces. */
export function shownMarks(tests: readonly TestSummary[], sheet: GroundSheet | undefined): BoardMark[] {
  if (sheet === undefined) return []
  return tests
    .filter((test) => test.current && !test.voided && sheet.lift[test.cell] === test.lift)
    .map((test) => ({
      id: test.id,
      outcome: outcomeOf(test),
      verification: test.purpose === 'verification',
      label: `${test.number}, ${test.headline}`,
      easting: test.easting,
      northing: test.northing,
    }))
}

/** The stakes that stand in the layer the sheet shows. */
export function shownStakes(stakes: readonly Stake[], sheet: GroundSheet | undefined): BoardStake[] {
  if (sheet === undefined) return []
  return stakes
    .filter((stake) => sheet.lift[stake.cell] === stake.lift)
    .map(({ id, label, easting, northing }) => ({ id, label, easting, northing }))
}

/** Current results, as many as the register gives at once: those the map and the list name. */
export const CURRENT_TESTS: TestFilter = { current: 'true', limit: 5_000 }
