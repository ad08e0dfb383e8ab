import { IsNull } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { CalibrationEntity } from '#api/entities/calibration.entity.ts'
import { GaugeEntity } from '#api/entities/gauge.entity.ts'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { StakeEntity } from '#api/entities/stake.entity.ts'

/** What people call the things a test names, and the ids this site knows them by. */
export interface ExchangeReferences {
  readonly curves: readonly Pick<ReferenceCurveEntity, 'id' | 'code' | 'materialId'>[]
  readonly gauges: readonly Pick<GaugeEntity, 'id' | 'serial'>[]
  readonly calibrations: readonly CalibrationEntity[]
  /** those that stand */
  readonly stakes: readonly StakeEntity[]
}

export async function loadReferences(manager: EntityManager, siteId: string): Promise<ExchangeReferences> {
  const [curves, gauges, calibrations, stakes] = [
    await manager.find(ReferenceCurveEntity, { select: { siteId: true, id: true, code: true, materialId: true }, where: { siteId } }),
    await manager.find(GaugeEntity, { select: { siteId: true, id: true, serial: true }, where: { siteId } }),
    await manager.find(CalibrationEntity, { where: { siteId }, order: { performedAt: 'ASC', id: 'ASC' } }),
    await manager.find(StakeEntity, { where: { siteId, retiredAt: IsNull() }, order: { seq: 'ASC' } }),
  ]
  return { curves, gauges, calibrations, stakes }
}
