import type { EntityManager } from 'typeorm'
import { In } from 'typeorm'
import { PlacementCellEntity } from '#api/entities/placement-cell.entity.ts'
import { PlacementEntity } from '#api/entities/placement.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { placementNumber } from '#api/features/placements/record-placement.service.ts'
import { VOLUME_DIFFERENCE_LIMIT_PERCENT } from '#shared/domain/placement-volume.ts'
import type { Placement } from '#shared/schemas/placement.ts'

/** Placements newest first. */
export async function listPlacements(manager: EntityManager, siteId: string, limit: number): Promise<Placement[]> {
  const rows = await manager.find(PlacementEntity, { where: { siteId }, order: { happenedAt: 'DESC', seq: 'DESC' }, take: limit })
  if (rows.length === 0) return []
  const cells = await manager.find(PlacementCellEntity, { where: { siteId, placementId: In(rows.map((row) => row.id)) }, order: { cell: 'ASC' } })
  const people = await manager.findBy(UserEntity, { id: In(rows.flatMap((row) => [row.recordedBy, row.voidedBy ?? row.recordedBy])) })
  const names = new Map(people.map((person) => [person.id, person.name]))
  const materials: { id: string; name: string }[] = await manager.query('SELECT `id`, `name` FROM `borrow_material` WHERE `site_id` = ?', [siteId])
  const person = (id: string) => ({ id, name: names.get(id) ?? '' })
  return rows.map((row): Placement => {
    const difference = row.loads > 0 ? (100 * (row.loadsCm3 - row.geometryCm3)) / row.geometryCm3 : null
    return {
      id: row.id,
      number: placementNumber(row.seq),
      zoneId: row.zoneId,
      lift: row.lift,
      materialId: row.materialId,
      materialName: materials.find((material) => material.id === row.materialId)?.name ?? '',
      happenedAt: row.happenedAt.toISOString(),
      recordedAt: row.recordedAt.toISOString(),
      recordedBy: person(row.recordedBy),
      cells: cells.filter((cell) => cell.placementId === row.id).map(({ cell, quarters, volumeCm3, coveredEarly }) => ({ cell, quarters, volumeCm3, coveredEarly: Boolean(coveredEarly) })),
      loads: row.loads,
      loadVolumeCm3: row.loadVolumeCm3,
      looseThicknessUm: row.looseThicknessUm,
      machine: row.machine,
      passes: row.passes,
      remarks: row.remarks,
      geometryCm3: row.geometryCm3,
      loadsCm3: row.loadsCm3,
      drivingCm3: row.drivingCm3,
      differencePercent: difference,
      differenceFlagged: difference !== null && Math.abs(difference) > VOLUME_DIFFERENCE_LIMIT_PERCENT,
      coverReason: row.coverReason,
      voided: row.voidedAt ? { at: row.voidedAt.toISOString(), by: person(row.voidedBy ?? ''), reason: row.voidReason ?? '' } : null,
    }
  })
}
