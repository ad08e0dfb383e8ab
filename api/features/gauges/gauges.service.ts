import { GaugeCalibrationEntity } from '#api/entities/gauge-calibration.entity.ts'
import { GaugeOutageEntity } from '#api/entities/gauge-outage.entity.ts'
import { GaugeEntity } from '#api/entities/gauge.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { loadGauge } from '#api/features/gauges/gauges.queries.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import { refusal } from '#api/http/refuse-input.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { workDay } from '#shared/domain/lots.ts'
import type { AddCalibration, CreateGauge, EditGauge, Gauge, PutBack, TakeOut } from '#shared/schemas/gauge.ts'

/** The gauge with this id; another site's is not there. */
export async function findGauge({ manager, siteId }: SiteWrite, id: string): Promise<GaugeEntity> {
  const gauge = await manager.findOneBy(GaugeEntity, { siteId, id })
  if (!gauge) throw notFound()
  return gauge
}

/** Tells of a change of a gauge and answers it as it stands now. */
export async function toldGauge(write: SiteWrite, id: string): Promise<Gauge> {
  write.changed('gauge', id)
  return loadGauge(write.manager, write.siteId, id, write.now)
}

/** Takes a gauge into the register, with the calibration it comes with; its serial is its own on the site. */
export async function createGauge(write: SiteWrite, input: CreateGauge): Promise<Gauge> {
  const { manager, siteId, now } = write
  const { id, serial, model, leakTestedOn, calibration } = input
  if (await manager.existsBy(GaugeEntity, { siteId, serial })) {
    throw conflict(`Gauge ${serial} is in the register already. Nothing was saved; give this one its own serial number.`)
  }
  await refuseComingDays(write, { leakTestedOn, 'calibration.calibratedOn': calibration.calibratedOn })
  await manager.insert(GaugeEntity, { siteId, id, serial, model, leakTestedOn, createdAt: now, updatedAt: now })
  await insertCalibration(write, id, calibration)
  write.record('gauge.recorded', { type: 'gauge', id }, { serial, model, leakTestedOn, calibration })
  return toldGauge(write, id)
}

/** Changes what is written of a gauge: its model, or the day of its last leak test. */
export async function editGauge(write: SiteWrite, id: string, input: EditGauge): Promise<Gauge> {
  const { manager, siteId, now } = write
  const gauge = await findGauge(write, id)
  await refuseComingDays(write, { leakTestedOn: input.leakTestedOn ?? null })
  const model = input.model ?? gauge.model
  const leakTestedOn = input.leakTestedOn === undefined ? gauge.leakTestedOn : input.leakTestedOn
  await manager.update(GaugeEntity, { siteId, id }, { model, leakTestedOn, updatedAt: now })
  write.record('gauge.edited', { type: 'gauge', id }, { serial: gauge.serial, model, leakTestedOn })
  return toldGauge(write, id)
}

/** Records a new calibration: from its day on its counts are the reference, and the average starts again. */
export async function addCalibration(write: SiteWrite, gaugeId: string, input: AddCalibration): Promise<Gauge> {
  const { serial } = await findGauge(write, gaugeId)
  await refuseComingDays(write, { calibratedOn: input.calibratedOn })
  await insertCalibration(write, gaugeId, input)
  write.record('gauge.calibrated', { type: 'gauge', id: gaugeId }, { serial, ...input })
  return toldGauge(write, gaugeId)
}

async function insertCalibration({ manager, siteId, user, now }: SiteWrite, gaugeId: string, { id, calibratedOn, dueOn, density, moisture }: AddCalibration): Promise<void> {
  await manager.insert(GaugeCalibrationEntity, { siteId, id, gaugeId, calibratedOn, dueOn, densityCount: density, moistureCount: moisture, recordedBy: user.id, createdAt: now, updatedAt: now })
}

/** Takes a gauge out of service from a moment on; results read with it meanwhile hold their release. */
export async function takeOut(write: SiteWrite, gaugeId: string, { id, happenedAt, reason }: TakeOut): Promise<Gauge> {
  const { manager, siteId, user, now } = write
  const { serial } = await findGauge(write, gaugeId)
  const fromAt = notInFuture(new Date(happenedAt), now)
  const last = await lastOutage(write, gaugeId)
  if (last?.untilAt === null) throw conflict(`Gauge ${serial} is out of service already. Nothing was changed.`)
  if (last?.untilAt && fromAt < last.untilAt) throw conflict(`Gauge ${serial} was out of service until later than that. Give a later time; nothing was changed.`)
  await manager.insert(GaugeOutageEntity, { siteId, id, gaugeId, fromAt, reason, takenOutBy: user.id, untilAt: null, returnedBy: null, returnRemarks: null, createdAt: now, updatedAt: now })
  write.record('gauge.taken-out', { type: 'gauge', id: gaugeId }, { serial, reason }, fromAt)
  return toldGauge(write, gaugeId)
}

/** Puts a gauge back in service. */
export async function putBack(write: SiteWrite, gaugeId: string, { happenedAt, remarks }: PutBack): Promise<Gauge> {
  const { manager, siteId, user, now } = write
  const { serial } = await findGauge(write, gaugeId)
  const untilAt = notInFuture(new Date(happenedAt), now)
  const last = await lastOutage(write, gaugeId)
  if (last?.untilAt !== null) throw conflict(`Gauge ${serial} is in service. Nothing was changed.`)
  if (untilAt < last.fromAt) throw refusal([{ path: 'body.happenedAt', message: 'It cannot be back before it was taken out.' }])
  await manager.update(GaugeOutageEntity, { siteId, id: last.id }, { untilAt, returnedBy: user.id, returnRemarks: remarks, updatedAt: now })
  write.record('gauge.put-back', { type: 'gauge', id: gaugeId }, { serial, remarks }, untilAt)
  return toldGauge(write, gaugeId)
}

function lastOutage({ manager, siteId }: SiteWrite, gaugeId: string): Promise<GaugeOutageEntity | null> {
  return manager.findOne(GaugeOutageEntity, { where: { siteId, gaugeId }, order: { fromAt: 'DESC', createdAt: 'DESC' } })
}

async function refuseComingDays({ manager, siteId, now }: SiteWrite, days: Readonly<Record<string, string | null>>): Promise<void> {
  const { timeZone } = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const today = workDay(now.getTime(), timeZone, 0)
  const [coming] = Object.entries(days).filter(([, day]) => day !== null && day > today)
  if (coming) throw refusal([{ path: `body.${coming[0]}`, message: 'That day has not come yet. Check the date.' }])
}
