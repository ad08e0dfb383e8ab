import { GROUND_FLAGS, type GroundState } from './ground-state.ts'

/** All that decides the state of one (cell, lift); test ids where a test may be the cause. */
export interface CellFacts {
  readonly placed: boolean
  readonly partial: boolean
  readonly acceptedAsIs: boolean
  /** a live failure mark, or an order issued or worked on */
  readonly rework: Cause | null
  /** an order whose rework is reported done, or an old failure mark still waiting for it to close */
  readonly retest: Cause | null
  readonly recheck: boolean
  readonly release: 'released' | 'awaiting-acceptance' | null
  readonly suspect: Cause | null
  readonly hold: Cause | null
  /** passes hold all of its volume; lift 0: the inspection accepted it */
  readonly spokenFor: boolean
  /** the pass that holds the largest share of it */
  readonly leadingPassId: string | null
  /** a result still due that holds a share of it */
  readonly pendingId: string | null
  /** a pass near a limit holds a share of it */
  readonly near: boolean
}

export interface Cause {
  readonly testId: string | null
}

export interface CellState {
  readonly state: GroundState
  /** GROUND_FLAGS bits near, hold, partial, awaitingAcceptance */
  readonly flags: number
  readonly namingTestId: string | null
}

/**
 * State of a (cell, lift): the first that applies of not placed; accepted as is; rework or awaiting retest; recheck;
 * released; suspect; awaiting test (lift 0: awaiting inspection); meets spec (domain section 6). A verification hold
 * flags ground that is released or accepted, and is a failure elsewhere.
 */
export function stateOf(facts: CellFacts): CellState {
  const { state, namingTestId } = decide(facts)
  const flags =
    bit('near', facts.near && (state === 'meets-spec' || state === 'released')) |
    bit('hold', facts.hold !== null && state !== 'not-placed') |
    bit('partial', facts.partial && state !== 'not-placed') |
    bit('awaitingAcceptance', facts.release === 'awaiting-acceptance' && (state === 'meets-spec' || state === 'awaiting-test'))
  return { state, flags, namingTestId }
}

function decide(facts: CellFacts): { state: GroundState; namingTestId: string | null } {
  if (!facts.placed) return { state: 'not-placed', namingTestId: null }
  if (facts.acceptedAsIs) return { state: 'accepted-as-is', namingTestId: facts.hold?.testId ?? facts.leadingPassId }
  const failure = facts.rework ?? (facts.release === 'released' ? null : facts.hold)
  if (failure !== null) return { state: 'rework', namingTestId: failure.testId }
  if (facts.retest !== null) return { state: 'awaiting-retest', namingTestId: facts.retest.testId }
  if (facts.recheck) return { state: 'recheck', namingTestId: facts.leadingPassId }
  if (facts.release === 'released') return { state: 'released', namingTestId: facts.leadingPassId }
  if (facts.suspect !== null) return { state: 'suspect', namingTestId: facts.suspect.testId }
  if (!facts.spokenFor) return { state: 'awaiting-test', namingTestId: facts.pendingId }
  return { state: 'meets-spec', namingTestId: facts.leadingPassId }
}

function bit(flag: 'near' | 'hold' | 'partial' | 'awaitingAcceptance', set: boolean): number {
  return set ? GROUND_FLAGS[flag] : 0
}
