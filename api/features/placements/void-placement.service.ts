import { PlacementCellEntity } from '#api/entities/placement-cell.entity.ts'
import { PlacementEntity } from '#api/entities/placement.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { placementNumber } from '#api/features/placements/record-placement.service.ts'
import type { GroundWriteAnswer } from '#api/features/placements/record-placement.service.ts'
import { retireIdleStakes } from '#api/features/stakes/retire-stakes.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'

/** Voids a wrong placement, with the reason. Its record stays; its fill leaves the lots, and releases on it are revoked. */
export async function voidPlacement(write: SiteWrite, id: string, reason: string): Promise<GroundWriteAnswer> {
  const { manager, siteId, user, now } = write
  const placement = await manager.findOneBy(PlacementEntity, { siteId, id })
  if (!placement) throw notFound()
  if (placement.voidedAt) throw conflict(`${placementNumber(placement.seq)} is void already. Nothing was changed.`)
  const plan = await loadSitePlan(manager, siteId)
  const cells = await manager.findBy(PlacementCellEntity, { siteId, placementId: id })
  await manager.update(PlacementEntity, { siteId, id }, { voidedAt: now, voidedBy: user.id, voidReason: reason, updatedAt: now })
  const number = placementNumber(placement.seq)
  write.record('placement.voided', { type: 'placement', id }, { number, reason })
  write.changed('placement', id)
  const change = await changeGround(write, plan, { lots: cells.map((cell) => cell.lotId) })
  await retireIdleStakes(write, change.lots.values())
  return { id, number, revision: write.revision, cells: change.cells.length, volume: placement.drivingCm3 }
}
