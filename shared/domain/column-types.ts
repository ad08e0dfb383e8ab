import type { GroundState } from './ground-state.ts'
import type { Layer } from './site-geometry.ts'

/** One lift of one cell as its lot derived it. Lift 0 has a row in every cell of a zone from the start. */
export interface ColumnRow {
  readonly lift: number
  readonly state: GroundState
  /** GROUND_FLAGS bits; covered and doubt are ignored and set anew */
  readonly flags: number
}

/** Why a cell cannot take its next lift. `complete`: the design top is reached. */
export type BlockReason =
  | 'complete'
  | 'not-placed'
  | 'partial'
  | 'rework'
  | 'awaiting-retest'
  | 'recheck'
  | 'suspect'
  | 'awaiting-test'
  | 'awaiting-inspection'
  | 'not-released'
  | 'awaiting-acceptance'
  | 'hold'

export interface ColumnFacts {
  /** planned layers of the cell, any order; lift 0 has none */
  readonly layers: readonly Layer[]
  /** placed (or once placed) lifts, any order, one per lift */
  readonly rows: readonly ColumnRow[]
}

export interface ColumnDerivation {
  /** the rows by rising lift, with covered and doubt set */
  readonly rows: readonly ColumnRow[]
  readonly surfaceLift: number
  readonly surfaceState: GroundState
  readonly surfaceFlags: number
  readonly ready: boolean
  /** the lift that may or might be placed next; null where the design top is reached */
  readonly nextLift: number | null
  /** null when ready */
  readonly blockedBy: { readonly lift: number; readonly state: GroundState; readonly reason: BlockReason } | null
}
