import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { GaugeCorrectionEntity } from '#api/entities/gauge-correction.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { StandardCountEntity } from '#api/entities/standard-count.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { findGauge, toldGauge } from '#api/features/gauges/gauges.service.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import { refusal } from '#api/http/refuse-input.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { workDay } from '#shared/domain/lots.ts'
import { moistureCorrection } from '#shared/domain/moisture-correction.ts'
import type { Gauge, RecordCorrection, RecordCount } from '#shared/schemas/gauge.ts'

/** Records a standard count on the working day it was made; of several in a day the last that is not void stands. */
export async function recordCount(write: SiteWrite, gaugeId: string, input: RecordCount): Promise<Gauge> {
  const { manager, siteId, user, now } = write
  const { serial } = await findGauge(write, gaugeId)
  const countedAt = notInFuture(new Date(input.countedAt), now)
  const { timeZone, dayCutHour } = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const count: StandardCountEntity = {
    siteId,
    id: input.id,
    gaugeId,
    countedAt,
    day: workDay(countedAt.getTime(), timeZone, dayCutHour),
    densityCount: input.density,
    moistureCount: input.moisture,
    stability: input.stability,
    remarks: input.remarks,
    countedBy: user.id,
    voidedAt: null,
    voidedBy: null,
    voidReason: null,
    createdAt: now,
    updatedAt: now,
  }
  await manager.insert(StandardCountEntity, count as never)
  const { id: _id, ...body } = input
  write.record('gauge.counted', { type: 'gauge', id: gaugeId }, { serial, countId: input.id, day: count.day, ...body }, countedAt)
  return toldGauge(write, gaugeId)
}

/** Voids a standard count; the one before it on its day stands again, and later averages are without it. */
export async function voidCount(write: SiteWrite, gaugeId: string, countId: string, reason: string): Promise<Gauge> {
  const { manager, siteId, user, now } = write
  const { serial } = await findGauge(write, gaugeId)
  const count = await manager.findOneBy(StandardCountEntity, { siteId, gaugeId, id: countId })
  if (!count) throw notFound()
  if (count.voidedAt !== null) throw conflict('This count is void already. Nothing was changed.')
  await manager.update(StandardCountEntity, { siteId, id: countId }, { voidedAt: now, voidedBy: user.id, voidReason: reason, updatedAt: now })
  write.record('gauge.count-voided', { type: 'gauge', id: gaugeId }, { serial, countId, day: count.day, reason })
  return toldGauge(write, gaugeId)
}

/** Records the moisture correction of a gauge for a material, from pairs of oven and gauge moisture. */
export async function recordCorrection(write: SiteWrite, gaugeId: string, input: RecordCorrection): Promise<Gauge> {
  const { manager, siteId, user, now } = write
  const { serial } = await findGauge(write, gaugeId)
  const inForceFrom = notInFuture(new Date(input.inForceFrom), now)
  const material = await manager.findOneBy(BorrowMaterialEntity, { siteId, id: input.materialId })
  if (!material) throw refusal([{ path: 'body.materialId', message: 'That material is not one of this site’s. Choose one from the list.' }])
  const correction = moistureCorrection(input.pairs)
  if (!correction.ok) throw refusal([{ path: 'body.pairs', message: correction.reason.message }])
  const { id, pairs, remarks } = input
  const row: GaugeCorrectionEntity = { siteId, id, gaugeId, materialId: material.id, pairs, inForceFrom, remarks, recordedBy: user.id, withdrawnAt: null, withdrawnBy: null, withdrawReason: null, createdAt: now, updatedAt: now }
  await manager.insert(GaugeCorrectionEntity, row as never)
  write.record('gauge.corrected', { type: 'gauge', id: gaugeId }, { serial, correctionId: id, material: material.name, pairs, k: correction.value.k, remarks }, inForceFrom)
  return toldGauge(write, gaugeId)
}

/** Withdraws a correction: it is offered no more; tests keep the K they were recorded with. */
export async function withdrawCorrection(write: SiteWrite, gaugeId: string, correctionId: string, reason: string): Promise<Gauge> {
  const { manager, siteId, user, now } = write
  const { serial } = await findGauge(write, gaugeId)
  const correction = await manager.findOneBy(GaugeCorrectionEntity, { siteId, gaugeId, id: correctionId })
  if (!correction) throw notFound()
  if (correction.withdrawnAt !== null) throw conflict('This correction is withdrawn already. Nothing was changed.')
  await manager.update(GaugeCorrectionEntity, { siteId, id: correctionId }, { withdrawnAt: now, withdrawnBy: user.id, withdrawReason: reason, updatedAt: now })
  write.record('gauge.correction-withdrawn', { type: 'gauge', id: gaugeId }, { serial, correctionId, reason })
  return toldGauge(write, gaugeId)
}
