import type { Role } from '#shared/policies/role.ts'
import type { Board } from '#shared/schemas/ground.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { TASK_TITLES, type GroundTask } from '#web/features/ground/plan/ground-task.ts'
import { countOf } from '#web/features/ground/plan/ground-words.ts'
import type { Units } from '#web/lib/units.ts'
import { filledShare } from './filled-share.ts'

type PeekInput = {
  readonly role: Role
  readonly board: Board | undefined
  readonly orders: readonly Order[]
  readonly task: GroundTask | null
  readonly chosen: number
  readonly units: Units
}

/** The one sentence and number of the panel while it is drawn down. */
export function peekWords({ role, board, orders, task, chosen, units }: PeekInput): string {
  if (task !== null) return `${TASK_TITLES[task.kind]}, ${countOf(chosen, 'cell')}`
  if (chosen > 0) return `${countOf(chosen, 'cell')} chosen`
  if (board === undefined) return 'The board is on its way'
  switch (role) {
    case 'superintendent':
      return `May receive the next lift: ${units.volume(board.ready.reduce((sum, group) => sum + group.cm3, 0))}`
    case 'qc-lead':
    case 'technician':
      return `Tests owed: ${units.number(board.totals.testsOwed)}`
    case 'owner-rep': {
      const sum = (pick: (zone: Board['zones'][number]) => number): number => board.zones.reduce((total, zone) => total + pick(zone), 0)
      return `Filled to grade: ${units.percent(filledShare(sum((zone) => zone.placedCm3), sum((zone) => zone.designCm3)))}`
    }
    case 'operator':
      return `My rework: ${countOf(orders.filter((order) => order.state === 'issued' || order.state === 'working').length, 'order')}`
  }
}
