import { In } from 'typeorm'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import { DispositionCellEntity } from '#api/entities/disposition-cell.entity.ts'
import { DispositionEntity } from '#api/entities/disposition.entity.ts'
import { conflict } from '#api/errors.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { cellsInZones } from '#api/features/ground/cells-in-zones.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { GroundWriteAnswer } from '#api/features/placements/record-placement.service.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { CreateDisposition } from '#shared/schemas/placement.ts'

/** The owner's disposition: ground accepted as it is, on a named engineer's document. */
export async function acceptAsIs(write: SiteWrite, input: CreateDisposition): Promise<GroundWriteAnswer> {
  const { manager, siteId, user, now } = write
  const plan = await loadSitePlan(manager, siteId)
  const cells = cellsInZones(plan, input.cells)
  const rows = await manager.findBy(CellLiftEntity, { siteId, lift: input.lift, cell: In(cells) })
  const missing = cells.filter((cell) => !rows.some((row) => row.cell === cell))
  if (missing.length > 0) {
    throw conflict(`Nothing is placed at lift ${input.lift} in ${missing.map((cell) => plan.label(cell)).join(', ')}. Leave it out; what you entered was kept.`)
  }
  const { id, lift, reason, engineer, document } = input
  await manager.insert(DispositionEntity, { siteId, id, lift, reason, engineer, document, recordedAt: now, recordedBy: user.id, createdAt: now, updatedAt: now })
  await manager.insert(DispositionCellEntity, cells.map((cell) => ({ siteId, dispositionId: id, cell, lift })))
  write.record('ground.accepted-as-is', { type: 'disposition', id }, { lift, reason, engineer, document, cells: cells.map((cell) => plan.label(cell)) })
  write.changed('disposition', id)
  const lots = rows.flatMap((row) => row.lotId ?? [])
  const change = await changeGround(write, plan, lift === 0 ? { foundation: cells } : { lots })
  return { id, number: null, revision: write.revision, cells: change.cells.length, volume: rows.reduce((sum, row) => sum + row.volumeCm3, 0) }
}
