import type { EntityManager } from 'typeorm'
import { MembershipEntity } from '#api/entities/membership.entity.ts'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import { CHAIN_START } from '#api/features/site-head/event-chain.ts'

/** The head of a site at revision 0, nothing numbered yet. */
export function emptyHead(siteId: string): SiteHeadEntity {
  return {
    siteId,
    revision: 0,
    chainLength: 0,
    chainHead: CHAIN_START,
    nextTest: 1,
    nextOrder: 1,
    nextLot: 1,
    nextStake: 1,
    nextRelease: 1,
    nextPlacement: 1,
  }
}

/** Head and first member of a site whose row was just inserted: its maker is its QC lead. */
export async function openSite(manager: EntityManager, siteId: string, userId: string, now: Date): Promise<void> {
  await manager.insert(SiteHeadEntity, emptyHead(siteId))
  await manager.insert(MembershipEntity, { siteId, userId, role: 'qc-lead', createdAt: now, updatedAt: now })
}
