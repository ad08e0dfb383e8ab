import type { EntityManager } from 'typeorm'
import type { Role } from '#shared/policies/role.ts'
import type { Member } from '#shared/schemas/member.ts'

interface Row {
  userId: string
  name: string
  email: string
  role: Role
  updatedAt: Date
}

const SELECT =
  'SELECT m.`user_id` AS userId, u.`name`, u.`email`, m.`role`, m.`updated_at` AS updatedAt FROM `membership` m JOIN `user` u ON u.`id` = m.`user_id` WHERE m.`site_id` = ?'

function present(row: Row): Member {
  return { ...row, updatedAt: row.updatedAt.toISOString() }
}

export async function listMembers(manager: EntityManager, siteId: string): Promise<Member[]> {
  const rows: Row[] = await manager.query(`${SELECT} ORDER BY u.\`name\`, m.\`user_id\``, [siteId])
  return rows.map(present)
}
