import type { EntityManager } from 'typeorm'
import { notFound } from '#api/errors.ts'
import type { Actor } from '#api/features/site-head/site-write.ts'
import type { Role } from '#shared/policies/role.ts'

interface Member {
  readonly user: Actor
  readonly role: Role
}

/** The person's role on the site, or null for a stranger to it (or a site that is not there). */
export async function findMember(manager: EntityManager, siteId: string, userId: string): Promise<Member | null> {
  const rows: { role: Role; name: string }[] = await manager.query(
    'SELECT m.`role`, u.`name` FROM `membership` m JOIN `user` u ON u.`id` = m.`user_id` WHERE m.`site_id` = ? AND m.`user_id` = ?',
    [siteId, userId],
  )
  const row = rows[0]
  return row ? { user: { id: userId, name: row.name }, role: row.role } : null
}

/** As findMember; a stranger learns nothing, not even that the site exists. */
export async function loadMember(manager: EntityManager, siteId: string, userId: string): Promise<Member> {
  const member = await findMember(manager, siteId, userId)
  if (!member) throw notFound()
  return member
}
