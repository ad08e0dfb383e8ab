import type { EntityManager } from 'typeorm'
import { MembershipEntity } from '#api/entities/membership.entity.ts'
import { buildSite } from '#tests/factories/site.ts'
import { buildUser } from '#tests/factories/user.ts'

/** A person's role on a site; builds the person and the site that are not given. */
export async function buildMembership(manager: EntityManager, overrides: Partial<MembershipEntity> = {}): Promise<MembershipEntity> {
  const now = new Date()
  const membership: MembershipEntity = {
    siteId: overrides.siteId ?? (await buildSite(manager)).id,
    userId: overrides.userId ?? (await buildUser(manager)).id,
    role: 'qc-lead',
    createdAt: now,
    updatedAt: now,
    ...overrides,
  }
  await manager.insert(MembershipEntity, membership)
  return membership
}
