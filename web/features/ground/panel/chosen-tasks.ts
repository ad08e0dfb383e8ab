import { mayBeCovered, type GroundState } from '#shared/domain/ground-state.ts'
import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { GroundTask } from '#web/features/ground/plan/ground-task.ts'

interface Standing {
  readonly lift: number
  readonly state: GroundState
}

/** The tasks a role may begin with cells as their working surface stands. Tasks of one lift need one lift. */
export function chosenTasks(standings: readonly Standing[], role: Role): GroundTask[] {
  const lifts = new Set(standings.map(({ lift }) => lift))
  const [lift = 0] = lifts
  const oneLift = lifts.size === 1
  const some = (test: (state: GroundState) => boolean): boolean => standings.some(({ state }) => test(state))
  const tasks: GroundTask[] = []
  if (can(role, 'placement.record')) tasks.push({ kind: 'place', lift: null })
  if (can(role, 'inspection.record') && standings.some((standing) => standing.lift === 0)) tasks.push({ kind: 'inspect' })
  if (oneLift && (can(role, 'release.issue') || can(role, 'release.ask')) && some((state) => state === 'meets-spec')) tasks.push({ kind: 'release', lift })
  if (oneLift && lift > 0 && can(role, 'rework.issue')) tasks.push({ kind: 'rework', lift })
  if (oneLift && lift > 0 && can(role, 'disposition.accept-as-is') && some((state) => !mayBeCovered(state))) tasks.push({ kind: 'accept-as-is', lift })
  return tasks
}
