import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import type { GaugeCalibrationEntity } from '#api/entities/gauge-calibration.entity.ts'
import { GaugeCorrectionEntity } from '#api/entities/gauge-correction.entity.ts'
import type { GaugeOutageEntity } from '#api/entities/gauge-outage.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import type { StandardCountEntity } from '#api/entities/standard-count.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { notFound } from '#api/errors.ts'
import { loadGauges } from '#api/features/gauges/gauge-facts.queries.ts'
import type { LoadedGauge } from '#api/features/gauges/gauge-facts.queries.ts'
import { checkGauge } from '#shared/domain/gauge-check.ts'
import { groupBy } from '#shared/domain/group-by.ts'
import { workDay } from '#shared/domain/lots.ts'
import { moistureCorrection } from '#shared/domain/moisture-correction.ts'
import { calibrationOn, judgeCounts } from '#shared/domain/standard-count.ts'
import type { JudgedCount } from '#shared/domain/standard-count.ts'
import type { Gauge, GaugeCorrection, GaugeDetail, JudgedCountView } from '#shared/schemas/gauge.ts'

type Names = (id: string | null) => string

/** All that is shown of a gauge beside its own facts. */
interface Shown extends LoadedGauge {
  readonly corrections: readonly GaugeCorrection[]
  readonly nameOf: Names
  readonly at: Date
  readonly day: string
}

/** The register as it stands at a moment: each gauge's state on that working day, and what the next count is compared with. */
export async function listGauges(manager: EntityManager, siteId: string, at: Date): Promise<Gauge[]> {
  return (await loadShown(manager, siteId, at)).map(presentGauge)
}

export async function loadGauge(manager: EntityManager, siteId: string, id: string, at: Date): Promise<Gauge> {
  const [shown] = await loadShown(manager, siteId, at, [id])
  if (!shown) throw notFound()
  return presentGauge(shown)
}

/** One gauge with its log: every count as it is judged, calibrations, times out of service and corrections. */
export async function loadGaugeDetail(manager: EntityManager, siteId: string, id: string, at: Date): Promise<GaugeDetail> {
  const [shown] = await loadShown(manager, siteId, at, [id])
  if (!shown) throw notFound()
  const { facts, calibrations, outages, counts, corrections, nameOf } = shown
  const rows = new Map(counts.map((row) => [row.id, row]))
  return {
    ...presentGauge(shown),
    calibrations: calibrations.map((row) => presentCalibration(row, nameOf)),
    outages: outages.map((row) => presentOutage(row, nameOf)),
    counts: judgeCounts(facts.calibrations, facts.counts).judged.map((judged) => presentCount(judged, rows, nameOf)),
    corrections: [...corrections],
  }
}

async function loadShown(manager: EntityManager, siteId: string, at: Date, ids?: readonly string[]): Promise<Shown[]> {
  const loaded = await loadGauges(manager, siteId, ids)
  if (loaded.length === 0) return []
  const site = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const corrections = await manager.find(GaugeCorrectionEntity, { where: { siteId, gaugeId: In(loaded.map(({ gauge }) => gauge.id)) }, order: { inForceFrom: 'DESC', createdAt: 'DESC' } })
  const materials = await manager.findBy(BorrowMaterialEntity, { siteId, id: In(corrections.map((row) => row.materialId)) })
  const nameOf = await loadNames(manager, [
    ...loaded.flatMap(({ calibrations, outages, counts }) => [...calibrations.map((row) => row.recordedBy), ...outages.flatMap((row) => [row.takenOutBy, row.returnedBy]), ...counts.flatMap((row) => [row.countedBy, row.voidedBy])]),
    ...corrections.flatMap((row) => [row.recordedBy, row.withdrawnBy]),
  ])
  const materialNames = new Map(materials.map(({ id, name }) => [id, name]))
  const byGauge = groupBy(corrections, (row) => row.gaugeId)
  const day = workDay(at.getTime(), site.timeZone, site.dayCutHour)
  return loaded.map((each) => ({ ...each, nameOf, at, day, corrections: presentCorrections(byGauge.get(each.gauge.id) ?? [], { materialNames, nameOf, at }) }))
}

async function loadNames(manager: EntityManager, ids: readonly (string | null)[]): Promise<Names> {
  const people = await manager.find(UserEntity, { where: { id: In([...new Set(ids.filter((id) => id !== null))]) }, select: { id: true, name: true } })
  const names = new Map(people.map(({ id, name }) => [id, name]))
  return (id) => (id === null ? '' : (names.get(id) ?? ''))
}

function presentGauge({ gauge, facts, calibrations, outages, counts, corrections, nameOf, at, day }: Shown): Gauge {
  const { state, message, reference, count } = checkGauge(facts, at.getTime(), day)
  const inForce = calibrationOn(facts.calibrations, day)
  const calibration = calibrations[facts.calibrations.findIndex((each) => each === inForce)]
  const outage = outages.find((row) => row.fromAt <= at && (row.untilAt === null || at < row.untilAt))
  return {
    id: gauge.id,
    serial: gauge.serial,
    model: gauge.model,
    leakTestedOn: gauge.leakTestedOn,
    calibration: calibration ? presentCalibration(calibration, nameOf) : null,
    outage: outage ? presentOutage(outage, nameOf) : null,
    check: {
      state,
      message,
      day,
      reference: reference && { ...reference, days: [...reference.days] },
      count: count && presentCount(count, new Map(counts.map((row) => [row.id, row])), nameOf),
    },
    corrections: corrections.filter((each) => each.inForce),
  }
}

function presentCalibration({ id, calibratedOn, dueOn, densityCount, moistureCount, recordedBy }: GaugeCalibrationEntity, nameOf: Names) {
  return { id, calibratedOn, dueOn, density: densityCount, moisture: moistureCount, recordedBy: nameOf(recordedBy) }
}

function presentOutage({ id, fromAt, reason, takenOutBy, untilAt, returnedBy, returnRemarks }: GaugeOutageEntity, nameOf: Names) {
  return {
    id,
    from: fromAt.toISOString(),
    reason,
    takenOutBy: nameOf(takenOutBy),
    until: untilAt?.toISOString() ?? null,
    returnedBy: returnedBy === null ? null : nameOf(returnedBy),
    returnRemarks,
  }
}

function presentCount({ count, reference, judgement, refused, stands }: JudgedCount, rows: ReadonlyMap<string, StandardCountEntity>, nameOf: Names): JudgedCountView {
  const row = rows.get(count.id)
  if (!row) throw new Error(`Count ${count.id} was judged but not loaded`)
  return {
    id: row.id,
    day: row.day,
    countedAt: row.countedAt.toISOString(),
    countedBy: nameOf(row.countedBy),
    density: row.densityCount,
    moisture: row.moistureCount,
    reference: reference && { ...reference, days: [...reference.days] },
    good: judgement?.good ?? false,
    densityPercent: judgement?.densityPercent ?? null,
    moisturePercent: judgement?.moisturePercent ?? null,
    densityGood: judgement?.densityGood ?? false,
    moistureGood: judgement?.moistureGood ?? false,
    reasons: refused ? [refused.message] : (judgement?.reasons.map((reason) => reason.message) ?? []),
    stands,
    stability: row.stability === null ? null : [...row.stability],
    remarks: row.remarks,
    void: row.voidedAt === null ? null : { at: row.voidedAt.toISOString(), by: nameOf(row.voidedBy), reason: row.voidReason ?? '' },
  }
}

interface CorrectionWords {
  readonly materialNames: ReadonlyMap<string, string>
  readonly nameOf: Names
  readonly at: Date
}

/** Corrections as they come, newest first; the first of its material that counts at the moment is in force. */
function presentCorrections(rows: readonly GaugeCorrectionEntity[], { materialNames, nameOf, at }: CorrectionWords): GaugeCorrection[] {
  const served = new Set<string>()
  return rows.flatMap((row) => {
    const correction = moistureCorrection(row.pairs)
    if (!correction.ok) return []
    const { k, least, greatest, pairs } = correction.value
    const inForce = row.withdrawnAt === null && row.inForceFrom <= at && !served.has(row.materialId)
    if (inForce) served.add(row.materialId)
    return {
      id: row.id,
      materialId: row.materialId,
      materialName: materialNames.get(row.materialId) ?? '',
      pairs: row.pairs.map(({ oven, gauge }, index) => ({ oven, gauge, k: pairs[index] ?? k })),
      k,
      least,
      greatest,
      inForceFrom: row.inForceFrom.toISOString(),
      recordedBy: nameOf(row.recordedBy),
      remarks: row.remarks,
      inForce,
      withdrawn: row.withdrawnAt === null ? null : { at: row.withdrawnAt.toISOString(), by: nameOf(row.withdrawnBy), reason: row.withdrawReason ?? '' },
    }
  })
}
