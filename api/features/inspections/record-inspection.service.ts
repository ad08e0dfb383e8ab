import { InspectionCellEntity } from '#api/entities/inspection-cell.entity.ts'
import { InspectionEntity } from '#api/entities/inspection.entity.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { cellsInZones } from '#api/features/ground/cells-in-zones.ts'
import { revokeCells } from '#api/features/ground/revoke-release.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import type { GroundWriteAnswer } from '#api/features/placements/record-placement.service.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { CreateInspection } from '#shared/schemas/placement.ts'

/** Records the inspection of a foundation (lift 0). One that is not accepted revokes what was released on it. */
export async function recordInspection(write: SiteWrite, input: CreateInspection): Promise<GroundWriteAnswer> {
  const { manager, siteId, user, now } = write
  const plan = await loadSitePlan(manager, siteId)
  const happenedAt = notInFuture(new Date(input.happenedAt), now)
  const cells = cellsInZones(plan, input.cells)
  const { id, method, outcome, remarks } = input
  await manager.insert(InspectionEntity, { siteId, id, happenedAt, recordedAt: now, recordedBy: user.id, method, outcome, remarks, createdAt: now, updatedAt: now })
  await manager.insert(InspectionCellEntity, cells.map((cell) => ({ siteId, inspectionId: id, cell })))
  if (outcome === 'not-accepted') {
    await revokeCells(write, plan, { lift: 0, cells, reason: 'its foundation was inspected again and not accepted' })
  }
  write.record('inspection.recorded', { type: 'inspection', id }, { method, outcome, remarks, cells: cells.map((cell) => plan.label(cell)) }, happenedAt)
  write.changed('inspection', id)
  const change = await changeGround(write, plan, { foundation: cells })
  return { id, number: null, revision: write.revision, cells: change.cells.length, volume: 0 }
}
