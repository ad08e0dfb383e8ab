import { CalibrationEntity } from '#api/entities/calibration.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { loadCalibration } from '#api/features/calibrations/calibrations.queries.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { refuseIf } from '#api/http/refuse-input.ts'
import { calibrate } from '#shared/domain/calibration.ts'
import type { Calibration, CreateCalibration } from '#shared/schemas/calibration.ts'

/** Records a calibration with what its measurements come to. */
export async function recordCalibration(write: SiteWrite, input: CreateCalibration): Promise<Calibration> {
  const { manager, siteId, user, now } = write
  const performedAt = notInFuture(new Date(input.performedAt), now, 'body.performedAt')
  const validUntil = input.validUntil === null ? null : new Date(input.validUntil)
  const result = calibrate(input.sheet)
  refuseIf([
    ...(result.ok ? [] : result.problems.map(({ field, message }) => ({ path: `body.sheet.${field}`, message }))),
    ...(validUntil !== null && validUntil <= performedAt ? [{ path: 'body.validUntil', message: 'It must be valid until after it was performed, or without an end.' }] : []),
  ])
  if (!result.ok) throw new Error('A calibration was refused without a reason')
  const { id, apparatus, sheet, remarks } = input
  const { value, spreadPercent, flags } = result
  const row = { siteId, id, kind: sheet.kind, apparatus, sheet, value, spreadPercent, flags, performedAt, validUntil, recordedAt: now, recordedBy: user.id, remarks, voidedAt: null, voidedBy: null, voidReason: null, createdAt: now, updatedAt: now }
  await manager.insert(CalibrationEntity, row as never)
  write.record('calibration.recorded', { type: 'calibration', id }, { ...input, value, spreadPercent, flags: flags.map((flag) => flag.code) }, performedAt)
  write.changed('calibration', id)
  return loadCalibration(manager, siteId, id)
}

/** Takes a calibration out of use with a reason; tests reduced with it keep their values. */
export async function voidCalibration(write: SiteWrite, id: string, reason: string): Promise<Calibration> {
  const { manager, siteId, user, now } = write
  const calibration = await manager.findOneBy(CalibrationEntity, { siteId, id })
  if (!calibration) throw notFound()
  if (calibration.voidedAt !== null) throw conflict(`This calibration of ${calibration.apparatus} is void already. Nothing was changed.`)
  await manager.update(CalibrationEntity, { siteId, id }, { voidedAt: now, voidedBy: user.id, voidReason: reason, updatedAt: now })
  write.record('calibration.voided', { type: 'calibration', id }, { apparatus: calibration.apparatus, kind: calibration.kind, reason })
  write.changed('calibration', id)
  return loadCalibration(manager, siteId, id)
}
