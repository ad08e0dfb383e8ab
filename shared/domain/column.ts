import type { BlockReason, ColumnDerivation, ColumnFacts, ColumnRow } from './column-types.ts'
import { GROUND_FLAGS, hasFlag, mayBeCovered } from './ground-state.ts'

const UNRESOLVED_FOUNDATION: ColumnRow = { lift: 0, state: 'awaiting-test', flags: 0 }

/**
 * What the lifts of one cell say together (domain sections 5 and 7). Covered: a higher lift is placed while this one
 * is neither released nor accepted as is; doubt lies on every placed lift above such a one. Ready for the next lift:
 * every layer from lift 0 to the surface is released or accepted as is, whole and without hold, and the plan has a
 * layer above. Otherwise the reason is the lowest unresolved layer's.
 * @param facts planned layers and rows of a cell that lies in a zone; a missing lift 0 row is a foundation not yet inspected
 */
export function deriveColumn({ layers, rows }: ColumnFacts): ColumnDerivation {
  const sorted = [...rows].sort((a, b) => a.lift - b.lift)
  const column = sorted[0]?.lift === 0 ? sorted : [UNRESOLVED_FOUNDATION, ...sorted]
  const placed = column.filter(isPlaced)
  const surface = placed.at(-1) ?? UNRESOLVED_FOUNDATION
  const lowestCovered = placed.find((row) => row.lift < surface.lift && !mayBeCovered(row.state))
  const flagged = column.map((row) => {
    const covered = isPlaced(row) && row.lift < surface.lift && !mayBeCovered(row.state)
    const doubt = isPlaced(row) && lowestCovered !== undefined && row.lift > lowestCovered.lift
    const own = row.flags & ~(GROUND_FLAGS.covered | GROUND_FLAGS.doubt)
    return { ...row, flags: own | (covered ? GROUND_FLAGS.covered : 0) | (doubt ? GROUND_FLAGS.doubt : 0) }
  })

  const skipped = layers
    .filter((layer) => layer.lift > 0 && layer.lift < surface.lift && !column.some((row) => row.lift === layer.lift))
    .map((layer): ColumnRow => ({ lift: layer.lift, state: 'not-placed', flags: 0 }))
  const blocking = [...flagged, ...skipped]
    .filter((row) => row.lift <= surface.lift)
    .sort((a, b) => a.lift - b.lift)
    .flatMap((row) => {
      const reason = reasonOf(row)
      return reason === null ? [] : [{ lift: row.lift, state: row.state, reason }]
    })
    .at(0)
  const above = layers.map((layer) => layer.lift).filter((lift) => lift > surface.lift)
  const nextLift = above.length > 0 ? Math.min(...above) : null
  const complete = nextLift === null ? { lift: surface.lift, state: surface.state, reason: 'complete' as const } : null
  const blockedBy = blocking ?? complete
  return {
    rows: flagged,
    surfaceLift: surface.lift,
    surfaceState: surface.state,
    surfaceFlags: flagged.find((row) => row.lift === surface.lift)?.flags ?? surface.flags,
    ready: blockedBy === null,
    nextLift,
    blockedBy,
  }
}

function isPlaced(row: ColumnRow): boolean {
  return row.state !== 'not-placed' && row.state !== 'none'
}

/** Why nothing may go on this layer; null where something may. */
function reasonOf(row: ColumnRow): BlockReason | null {
  switch (row.state) {
    case 'none':
    case 'not-placed':
      return 'not-placed'
    case 'released':
    case 'accepted-as-is':
      return hasFlag(row.flags, 'partial') ? 'partial' : hasFlag(row.flags, 'hold') ? 'hold' : null
    case 'meets-spec':
      if (hasFlag(row.flags, 'partial')) return 'partial'
      return hasFlag(row.flags, 'awaitingAcceptance') ? 'awaiting-acceptance' : 'not-released'
    case 'awaiting-test':
      return row.lift === 0 ? 'awaiting-inspection' : 'awaiting-test'
    case 'awaiting-retest':
    case 'recheck':
    case 'rework':
    case 'suspect':
      return row.state
  }
}
