import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { CalibrationEntity } from '#api/entities/calibration.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { notFound } from '#api/errors.ts'
import { calibrationSheetSchema } from '#shared/schemas/calibration.ts'
import type { Calibration } from '#shared/schemas/calibration.ts'

/** Every calibration of a site, void ones too, the last performed first. */
export async function listCalibrations(manager: EntityManager, siteId: string): Promise<Calibration[]> {
  return present(manager, await manager.find(CalibrationEntity, { where: { siteId }, order: { performedAt: 'DESC', id: 'ASC' } }))
}

export async function loadCalibration(manager: EntityManager, siteId: string, id: string): Promise<Calibration> {
  const [calibration] = await present(manager, await manager.findBy(CalibrationEntity, { siteId, id }))
  if (!calibration) throw notFound()
  return calibration
}

async function present(manager: EntityManager, rows: readonly CalibrationEntity[]): Promise<Calibration[]> {
  const people = rows.flatMap(({ recordedBy, voidedBy }) => (voidedBy === null ? [recordedBy] : [recordedBy, voidedBy]))
  const users = await manager.find(UserEntity, { where: { id: In(people) }, select: { id: true, name: true } })
  const names = new Map(users.map(({ id, name }) => [id, name]))
  return rows.map((row): Calibration => {
    const { id, apparatus, value, spreadPercent, remarks, recordedBy, voidedAt, voidedBy } = row
    return {
      id,
      apparatus,
      sheet: calibrationSheetSchema.parse(row.sheet),
      value,
      spreadPercent,
      flags: [...row.flags],
      performedAt: row.performedAt.toISOString(),
      validUntil: row.validUntil?.toISOString() ?? null,
      remarks,
      recordedBy: { id: recordedBy, name: names.get(recordedBy) ?? '' },
      recordedAt: row.recordedAt.toISOString(),
      void: voidedAt === null || voidedBy === null ? null : { at: voidedAt.toISOString(), by: names.get(voidedBy) ?? '', reason: row.voidReason ?? '' },
    }
  })
}
