import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { GaugeCalibrationEntity } from '#api/entities/gauge-calibration.entity.ts'
import { GaugeOutageEntity } from '#api/entities/gauge-outage.entity.ts'
import { GaugeEntity } from '#api/entities/gauge.entity.ts'
import { StandardCountEntity } from '#api/entities/standard-count.entity.ts'
import type { GaugeFacts } from '#shared/domain/gauge-check.ts'
import { groupBy } from '#shared/domain/group-by.ts'

export interface LoadedGauge {
  readonly gauge: GaugeEntity
  readonly calibrations: readonly GaugeCalibrationEntity[]
  readonly outages: readonly GaugeOutageEntity[]
  /** by time, void ones too */
  readonly counts: readonly StandardCountEntity[]
  /** the same as the domain reads them */
  readonly facts: GaugeFacts
}

/** The gauges of a site's register by their serial; those with these ids, or all. */
export async function loadGauges(manager: EntityManager, siteId: string, ids?: readonly string[]): Promise<LoadedGauge[]> {
  const where = ids === undefined ? { siteId } : { siteId, id: In(ids) }
  const gauges = await manager.find(GaugeEntity, { where, order: { serial: 'ASC', id: 'ASC' } })
  if (gauges.length === 0) return []
  const ofGauge = { siteId, gaugeId: In(gauges.map((gauge) => gauge.id)) }
  const calibrations = groupBy(await manager.find(GaugeCalibrationEntity, { where: ofGauge, order: { calibratedOn: 'ASC', createdAt: 'ASC' } }), (row) => row.gaugeId)
  const outages = groupBy(await manager.find(GaugeOutageEntity, { where: ofGauge, order: { fromAt: 'ASC' } }), (row) => row.gaugeId)
  const counts = groupBy(await manager.find(StandardCountEntity, { where: ofGauge, order: { countedAt: 'ASC', createdAt: 'ASC' } }), (row) => row.gaugeId)
  return gauges.map((gauge) => {
    const own = { gauge, calibrations: calibrations.get(gauge.id) ?? [], outages: outages.get(gauge.id) ?? [], counts: counts.get(gauge.id) ?? [] }
    return { ...own, facts: factsOf(own) }
  })
}

function factsOf({ gauge, calibrations, outages, counts }: Omit<LoadedGauge, 'facts'>): GaugeFacts {
  return {
    serial: gauge.serial,
    calibrations: calibrations.map(({ calibratedOn, dueOn, densityCount, moistureCount, createdAt }) => ({ calibratedOn, dueOn, density: densityCount, moisture: moistureCount, recordedAt: createdAt.getTime() })),
    outages: outages.map(({ fromAt, untilAt, reason }) => ({ from: fromAt.getTime(), until: untilAt?.getTime() ?? null, reason })),
    counts: counts.map(({ id, day, countedAt, createdAt, densityCount, moistureCount, voidedAt }) => ({
      id,
      day,
      countedAt: countedAt.getTime(),
      recordedAt: createdAt.getTime(),
      voided: voidedAt !== null,
      density: densityCount,
      moisture: moistureCount,
    })),
  }
}
