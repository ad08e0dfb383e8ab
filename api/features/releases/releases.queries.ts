import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { ReleaseCellEntity } from '#api/entities/release-cell.entity.ts'
import { ReleaseEntity } from '#api/entities/release.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { releaseNumber } from '#api/features/releases/releases.service.ts'
import type { Release } from '#shared/schemas/release.ts'

/** Releases newest first. */
export async function listReleases(manager: EntityManager, siteId: string, limit: number): Promise<Release[]> {
  const rows = await manager.find(ReleaseEntity, { where: { siteId }, order: { seq: 'DESC' }, take: limit })
  if (rows.length === 0) return []
  const cells = await manager.find(ReleaseCellEntity, { where: { siteId, releaseId: In(rows.map((row) => row.id)) }, order: { cell: 'ASC' } })
  const ids = rows.flatMap((row) => [row.askedBy, row.issuedBy, row.acceptedBy]).filter((id) => id !== null)
  const names = new Map((await manager.findBy(UserEntity, { id: In(ids) })).map((person) => [person.id, person.name]))
  const person = (id: string | null) => (id === null ? null : { id, name: names.get(id) ?? '' })
  return rows.map((row): Release => {
    const own = cells.filter((cell) => cell.releaseId === row.id)
    return {
      id: row.id,
      number: releaseNumber(row.seq),
      zoneId: row.zoneId,
      lift: row.lift,
      cells: own.map((cell) => ({ cell: cell.cell, revoked: cell.revokedAt ? { at: cell.revokedAt.toISOString(), reason: cell.revokedReason ?? '' } : null })),
      volumeCm3: own.reduce((sum, cell) => sum + cell.volumeCm3, 0),
      status: row.status,
      hold: Boolean(row.hold),
      askedBy: person(row.askedBy),
      issuedBy: person(row.issuedBy),
      issuedAt: row.issuedAt?.toISOString() ?? null,
      acceptedBy: person(row.acceptedBy),
      acceptedAt: row.acceptedAt?.toISOString() ?? null,
      declinedReason: row.declinedReason,
      overrideReason: row.overrideReason,
      remarks: row.remarks,
    }
  })
}
