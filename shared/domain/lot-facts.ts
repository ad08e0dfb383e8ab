import type { FrequencyRule } from './frequency-rule.ts'
import type { GroundState } from './ground-state.ts'
import type { GridPoint } from './site-geometry.ts'

/**
 * What the derivation of a lot reads (facts) and what it answers (derived). Units as in site-geometry.ts:
 * mm, mm², µm, cm³, epoch milliseconds; ids are the UUIDs of the records.
 */

/** A cell of the lot. `partial`: only some of its quarters are placed. */
export interface LotCell {
  readonly cell: number
  readonly column: number
  readonly row: number
  readonly centroid: GridPoint
  readonly areaMm2: number
  /** compacted thickness of the placed layer, above 0 where anything is placed */
  readonly thicknessUm: number
  readonly partial: boolean
}

/** What one placement put into one cell; `slice` is the placement's id, `placedAt` when it happened. */
export interface LotSlice {
  readonly cell: number
  readonly slice: string
  readonly placedAt: number
  readonly volumeCm3: number
}

export type TestPurpose = 'required' | 'judgement' | 'verification' | 'referee'

/** `pending`: sampled, result due. */
export type TestOutcome = 'pass' | 'fail' | 'suspect' | 'pending'

/** One test point: the last non-void result of its chain. */
export interface LotTest {
  readonly testId: string
  /** running number, breaks ties where two tests hold equal shares */
  readonly seq: number
  readonly at: GridPoint
  readonly cell: number
  readonly sampledAt: number
  readonly purpose: TestPurpose
  readonly outcome: TestOutcome
  /** within the method's repeatability of a limit */
  readonly near: boolean
  /** rework was reported, or fill removed, in its cell after it was sampled: it counts for nothing */
  readonly superseded: boolean
  /** a retest: the cells of the rework order it answers, which it speaks for first */
  readonly firstCells?: readonly number[]
}

/** Ground an active failure, suspicion or verification hold marks, stored when its verdict was saved. */
export interface LotMark {
  readonly testId: string
  readonly kind: 'fail' | 'suspect' | 'hold'
  readonly cells: readonly number[]
}

/** An open rework order. */
export interface LotOrder {
  readonly orderId: string
  readonly state: 'issued' | 'working' | 'ready'
  readonly cells: readonly number[]
  /** the failing test it was issued for; null where the lead issued it without one */
  readonly causeTestId: string | null
  /** when the rework was last reported done; null while it is not */
  readonly reportedAt: number | null
}

/** A volume one test gives to one cell. */
export interface SharePair {
  readonly testId: string
  readonly cell: number
  readonly cm3: number
}

/** A release that has not been revoked. */
export interface LotRelease {
  readonly cell: number
  readonly status: 'released' | 'awaiting-acceptance'
  /** the cell's volume when it was released: a later top-up exceeds it and reopens the cell */
  readonly volumeCm3: number
  /** the shares it stands on, frozen */
  readonly pairs: readonly SharePair[]
}

/** The latest inspection of a foundation cell (lift 0). */
export interface FoundationInspection {
  readonly cell: number
  readonly outcome: 'accepted' | 'not-accepted'
}

export interface LotFacts {
  /** 0 is the foundation: accepted by inspection, no volume, no frequency */
  readonly lift: number
  readonly rules: readonly FrequencyRule[]
  /** a remainder up to this share of a rule's unit asks no further test; default 0 */
  readonly remainderTolerancePercent?: number
  /** hand-compacted or near-structure fill: how many times the tests; default 1 */
  readonly multiplier?: number
  /** length of the lot along its alignment, mm; needed only by a rule per length */
  readonly lengthMm?: number
  /** this lot's part of the minimum per lift and day (shareMinimum of frequency.ts); default 0 */
  readonly minimumOwedByLiftDay?: number
  readonly cells: readonly LotCell[]
  readonly slices: readonly LotSlice[]
  readonly tests: readonly LotTest[]
  readonly marks: readonly LotMark[]
  readonly orders: readonly LotOrder[]
  readonly releases: readonly LotRelease[]
  readonly acceptedAsIs: readonly number[]
  /** released cells exposed to rain or freeze since, not yet looked at */
  readonly rechecks?: readonly number[]
  /** lift 0 only */
  readonly inspections?: readonly FoundationInspection[]
}

/** Where a lot stands, worst first; `owes` also where ground still awaits a test. */
export const LOT_STANDINGS = [
  'not-placed',
  'rework',
  'awaiting-retest',
  'suspect',
  'owes',
  'recheck',
  'waiting-acceptance',
  'waiting-release',
  'released',
] as const

export type LotStanding = (typeof LOT_STANDINGS)[number]

/** A share as stored: `frozen` under a release, `far` where it reaches farther than one test reasonably does. */
export interface DerivedPair extends SharePair {
  readonly frozen: boolean
  readonly far: boolean
}

export interface DerivedCell {
  readonly cell: number
  readonly state: GroundState
  /** GROUND_FLAGS bits near, hold, partial, awaitingAcceptance; covered and doubt come from deriveColumn */
  readonly flags: number
  readonly volumeCm3: number
  /** held by passes, frozen shares included */
  readonly spokenCm3: number
  /** the test that causes the state, or null */
  readonly namingTestId: string | null
}

/** A release that no longer stands on its basis: the caller revokes it by an event and derives again. */
export interface BrokenRelease {
  readonly cell: number
  readonly reason: 'failed' | 'basis-lost' | 'removed'
  /** the failing test, or the test that is no longer a current pass */
  readonly testId: string | null
}

export interface OrderProgress {
  readonly orderId: string
  readonly volumeCm3: number
  /** passes it takes to close */
  readonly needed: number
  /** passes sampled inside since the rework was reported */
  readonly passed: number
  readonly left: number
  readonly closes: boolean
}

export interface LotDerivation {
  readonly volumeCm3: number
  readonly areaMm2: number
  /** volume one test may speak for, cm³; 0 while nothing is placed */
  readonly fCm3: number
  readonly required: number
  /** current required-purpose results that are neither suspect nor due nor superseded */
  readonly taken: number
  readonly owed: number
  /** suspect required tests that want a re-run at their place (part of owed) */
  readonly reruns: number
  /** required passes among taken */
  readonly passing: number
  /** tests owed that neither a re-run, a result due, nor a retest of a ready order will bring */
  readonly toStake: number
  readonly pairs: readonly DerivedPair[]
  /** in the order of facts.cells */
  readonly cells: readonly DerivedCell[]
  readonly orders: readonly OrderProgress[]
  readonly brokenReleases: readonly BrokenRelease[]
  readonly standing: LotStanding
}
