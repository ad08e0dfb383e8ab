import { In, IsNull } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { AttachmentEntity } from '#api/entities/attachment.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { notFound } from '#api/errors.ts'
import { loadSubject } from '#api/features/attachments/attachment-subject.ts'
import type { SiteRead } from '#api/features/site-head/site-write.ts'
import { seesWithdrawnFiles } from '#shared/policies/attachment.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Attachment, AttachmentQuery } from '#shared/schemas/attachment.ts'

/** Files of one record in the order they were added; those withdrawn are for the lead alone. */
export async function listAttachments({ manager, siteId, role }: SiteRead, query: AttachmentQuery): Promise<Attachment[]> {
  await loadSubject(manager, siteId, query)
  const rows = await manager.find(AttachmentEntity, {
    where: { siteId, subjectType: query.subject, subjectId: query.subjectId, ...shownTo(role) },
    order: { addedAt: 'ASC', takenAt: 'ASC', fileName: 'ASC', id: 'ASC' },
  })
  return present(manager, rows)
}

/** One file's row, as far as the role may see it; 404 otherwise. */
export async function findAttachment({ manager, siteId, role }: Pick<SiteRead, 'manager' | 'siteId' | 'role'>, id: string): Promise<AttachmentEntity> {
  const row = await manager.findOneBy(AttachmentEntity, { siteId, id, ...shownTo(role) })
  if (!row) throw notFound()
  return row
}

export async function presentAttachment(manager: EntityManager, row: AttachmentEntity): Promise<Attachment> {
  const [attachment] = await present(manager, [row])
  if (!attachment) throw notFound()
  return attachment
}

function shownTo(role: Role) {
  return seesWithdrawnFiles(role) ? {} : { withdrawnAt: IsNull() }
}

async function present(manager: EntityManager, rows: readonly AttachmentEntity[]): Promise<Attachment[]> {
  if (rows.length === 0) return []
  const people = rows.flatMap(({ addedBy, withdrawnBy }) => (withdrawnBy === null ? [addedBy] : [addedBy, withdrawnBy]))
  const users = await manager.find(UserEntity, { where: { id: In(people) }, select: { id: true, name: true } })
  const names = new Map(users.map(({ id, name }) => [id, name]))
  return rows.map((row): Attachment => {
    const { id, subjectType, subjectId, kind, fileName, contentType, bytes, sha256, width, height, caption, takenFrom, withdrawnAt, withdrawnBy } = row
    return {
      id,
      subject: subjectType,
      subjectId,
      kind,
      fileName,
      contentType,
      bytes,
      sha256,
      width,
      height,
      caption,
      addedBy: { id: row.addedBy, name: names.get(row.addedBy) ?? '' },
      addedAt: row.addedAt.toISOString(),
      takenAt: row.takenAt.toISOString(),
      takenFrom,
      withdrawn: withdrawnAt === null || withdrawnBy === null ? null : { at: withdrawnAt.toISOString(), by: names.get(withdrawnBy) ?? '', reason: row.withdrawalReason ?? '' },
    }
  })
}
