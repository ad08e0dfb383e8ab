import { mayBeCovered } from '#shared/domain/ground-state.ts'
import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Column } from '#shared/schemas/ground.ts'
import type { GroundTask } from '#web/features/ground/plan/ground-task.ts'
import { surfaceRow } from './strip-rows.ts'

export type CellAct =
  | { readonly label: string; readonly task: GroundTask }
  | { readonly label: string; readonly record: { readonly lift: number } }

/** What a role may do on a cell as its column stands, the likeliest first. */
export function cellActs(column: Column, role: Role): CellAct[] {
  const surface = surfaceRow(column)
  if (column.zoneId === null || surface === undefined) return []
  const acts: CellAct[] = []
  const { lift, state } = surface
  if (lift === 0 && state === 'awaiting-test' && can(role, 'inspection.record')) acts.push({ label: 'Record inspection', task: { kind: 'inspect' } })
  if (lift > 0 && state !== 'released' && can(role, 'test.record-qc')) acts.push({ label: 'Record test', record: { lift } })
  if (column.nextLift !== null && can(role, 'placement.record')) acts.push({ label: 'Place fill', task: { kind: 'place', lift: column.nextLift } })
  if (state === 'meets-spec' && can(role, 'release.issue')) acts.push({ label: 'Release', task: { kind: 'release', lift } })
  if (state === 'meets-spec' && can(role, 'release.ask')) acts.push({ label: 'Ask for release', task: { kind: 'release', lift } })
  if (lift > 0 && can(role, 'test.record-qa')) acts.push({ label: 'Record verification test', record: { lift } })
  const unresolved = column.rows.find((row) => row.lift === (column.blockedBy?.lift ?? lift))
  if (unresolved !== undefined && unresolved.lift > 0 && !mayBeCovered(unresolved.state) && unresolved.state !== 'not-placed' && can(role, 'disposition.accept-as-is')) {
    acts.push({ label: 'Accept as is', task: { kind: 'accept-as-is', lift: unresolved.lift } })
  }
  if (lift > 0 && state !== 'rework' && state !== 'awaiting-retest' && can(role, 'rework.issue')) acts.push({ label: 'Issue rework order', task: { kind: 'rework', lift } })
  return acts
}
