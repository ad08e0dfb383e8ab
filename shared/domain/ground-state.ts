/**
 * The states a (cell, lift) can stand in, one set for map, rail, lists, charts and paper.
 * The codes are what ground-codec, the database and the drawing layer carry: never renumber them.
 */
export const GROUND_STATES = [
  'none',
  'not-placed',
  'awaiting-test',
  'awaiting-retest',
  'meets-spec',
  'released',
  'accepted-as-is',
  'recheck',
  'rework',
  'suspect',
] as const

/** `none` means: no fill belongs there at this cut (outside every zone, natural ground, or above design). */
export type GroundState = (typeof GROUND_STATES)[number]

/** State code of a state, 0 to 9, its place in GROUND_STATES. */
export function groundStateCode(state: GroundState): number {
  return GROUND_STATES.indexOf(state)
}

/**
 * State of a code.
 * @throws RangeError when the code is not one of ours (a programmer's error, not bad input).
 */
export function groundStateOf(code: number): GroundState {
  const state = GROUND_STATES[code]
  if (state === undefined) throw new RangeError(`No ground state has the code ${code}`)
  return state
}

/** Overlay bits beside the state. */
export const GROUND_FLAGS = {
  /** the result that speaks for the cell is within the method's repeatability of a limit */
  near: 1,
  /** a higher lift was placed while this one was not released */
  covered: 2,
  /** a verification test fails where the contractor's passes */
  hold: 4,
  /** only some quarters of the cell are placed */
  partial: 8,
  /** a layer beneath this one was covered too early and is still unresolved */
  doubt: 16,
  /** a release of this cell waits for the owner's acceptance at a hold point */
  awaitingAcceptance: 32,
} as const

export type GroundFlag = keyof typeof GROUND_FLAGS

/** True when the flag is set in the bits. */
export function hasFlag(bits: number, flag: GroundFlag): boolean {
  return (bits & GROUND_FLAGS[flag]) !== 0
}

/** The states under which a layer may be covered. */
export function mayBeCovered(state: GroundState): boolean {
  return state === 'released' || state === 'accepted-as-is'
}
