import { stateLook } from '#shared/look/ground-look.ts'
import type { GroundState } from '#shared/domain/ground-state.ts'

/** The id of a state's pattern in HatchDefs. */
export function hatchId(state: GroundState, near: boolean): string {
  return near ? `hatch-${state}-near` : `hatch-${state}`
}

/** What to put in `fill` for ground in a state: a pattern of HatchDefs, or a plain colour where the state has no hatch. */
export function stateFill(state: GroundState, near = false): string {
  if (state === 'none') return 'var(--film)'
  if (state === 'not-placed') return 'var(--sheet)'
  const look = stateLook(state)
  return look.hatch.kind === 'none' && !near ? look.fill.css : `url(#${hatchId(state, near)})`
}
