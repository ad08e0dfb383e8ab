import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Board } from '#shared/schemas/ground.ts'
import type { GroundPlan } from '#web/features/ground/plan/ground-plan.ts'
import { countOf } from '#web/features/ground/plan/ground-words.ts'

/** Cells whose foundation nobody has accepted yet. */
export function awaitingInspection(board: Board): number {
  return board.notYet.filter((group) => group.reason === 'awaiting-inspection').reduce((sum, group) => sum + group.cells.length, 0)
}

/** What to do first where no cell may receive fill. */
export function firstStep(board: Board, plan: GroundPlan, role: Role): string {
  const uninspected = awaitingInspection(board)
  if (board.totals.placedCm3 === 0) {
    if (plan.cells.every((cell) => cell.zone < 0)) return 'No zone holds a cell yet. Draw the zones in Setup first.'
    if (uninspected > 0) {
      const next = can(role, 'inspection.record') ? 'Record the inspection of the foundation first.' : 'The QC lead records its inspection first.'
      return `No fill placed yet. Foundation waits for inspection in ${countOf(uninspected, 'cell')}. ${next}`
    }
    return 'No fill placed yet. Once the foundation is released, cells are ready for their first lift.'
  }
  if (board.notYet.every((group) => group.reason === 'at-grade')) return 'Every cell stands at design grade.'
  return 'No cell may be covered now. What stands in the way is listed below.'
}
