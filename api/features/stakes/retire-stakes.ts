import { In, IsNull } from 'typeorm'
import { StakeEntity } from '#api/entities/stake.entity.ts'
import type { DerivedLot } from '#api/features/ground/change-ground.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'

/** Takes standing stakes out, each with what retired it. */
export async function retireStakes(write: SiteWrite, stakes: readonly StakeEntity[], retiredBy: string): Promise<void> {
  if (stakes.length === 0) return
  const { manager, siteId, now } = write
  await manager.update(StakeEntity, { siteId, id: In(stakes.map((stake) => stake.id)) }, { retiredAt: now, retiredBy, updatedAt: now })
  for (const { id, label, lotId } of stakes) {
    write.record('stake.retired', { type: 'stake', id }, { label, lotId, retiredBy })
    write.changed('stake', id)
  }
}

/** Takes out what stands in lots that need no further stake. */
export async function retireIdleStakes(write: SiteWrite, lots: Iterable<DerivedLot>): Promise<void> {
  const { manager, siteId } = write
  const idle = [...lots].filter(({ derived }) => derived.toStake === 0).map(({ lot }) => lot.id)
  if (idle.length === 0) return
  const stakes = await manager.find(StakeEntity, { where: { siteId, lotId: In(idle), retiredAt: IsNull() }, order: { seq: 'ASC' } })
  await retireStakes(write, stakes, 'No test is owed there any more')
}
