import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import { loadCurve } from '#api/features/lab/curves.queries.ts'
import { fitCurve, pairOf } from '#api/features/lab/fit-curve.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { refusal, refuseIf } from '#api/http/refuse-input.ts'
import type { InputIssue } from '#api/http/validate.ts'
import { GREATEST_DENSITY, LEAST_DENSITY } from '#shared/domain/curve-checks.ts'
import { zeroAirVoidsDensity } from '#shared/domain/phase-relations.ts'
import type { CreateCurve, Curve, CurveUse } from '#shared/schemas/lab.ts'

/** Gs is kept to this many parts of one. */
const GS_PARTS = 1_000

/**
 * Records a laboratory curve as a draft, with the pair that would be approved: the laboratory's own where it is given
 * with a reason, else the spline's. Points that make no reference are refused unless that own pair stands in for them.
 */
export async function createCurve(write: SiteWrite, given: CreateCurve): Promise<Curve> {
  const { manager, siteId, user, now } = write
  const input = { ...given, gs: Math.round(given.gs * GS_PARTS) / GS_PARTS }
  const sampledAt = notInFuture(new Date(input.sampledAt), now)
  const site = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const hasMaterial = await manager.existsBy(BorrowMaterialEntity, { siteId, id: input.materialId })
  refuseIf([
    ...(hasMaterial ? [] : [{ path: 'body.materialId', message: 'That material is not one of this site’s. Choose one from the list.' }]),
    ...curveIssues(input, site.waterDensity),
  ])
  if (await manager.existsBy(ReferenceCurveEntity, { siteId, code: input.code })) {
    throw conflict(`This site already has a curve called ${input.code}. Nothing was saved; give this one another name.`)
  }
  const chosen = pairOf(input, input.reported ? 'reported' : 'spline', site.unitSystem, site.waterDensity)
  const pair = chosen.ok ? { ...chosen.pair, pairFrom: chosen.from } : { maxDryDensity: null, optimumMoisture: null, pairFrom: null }
  await manager.insert(ReferenceCurveEntity, {
    ...input,
    ...pair,
    siteId,
    sampledAt,
    status: 'draft',
    recordedBy: user.id,
    approvedBy: null,
    approvedAt: null,
    successorId: null,
    supersededAt: null,
    supersededBy: null,
    supersedeReason: null,
    createdAt: now,
    updatedAt: now,
  })
  const { id, ...body } = input
  write.record('curve.recorded', { type: 'curve', id }, { ...body, ...pair }, sampledAt)
  write.changed('curve', id)
  return loadCurve(manager, siteId, id)
}

function curveIssues(input: CreateCurve, waterDensity: number): InputIssue[] {
  const { reported } = input
  if (reported) {
    if (reported.maxDryDensity < LEAST_DENSITY || reported.maxDryDensity > GREATEST_DENSITY) {
      return [{ path: 'body.reported.maxDryDensity', message: 'No soil has this maximum dry density. Check the figure and its unit.' }]
    }
    if (reported.maxDryDensity > zeroAirVoidsDensity(reported.optimumMoisture, input.gs, waterDensity)) {
      return [{ path: 'body.reported.maxDryDensity', message: `The reported pair lies above the zero-air-voids line of Gs ${input.gs}. Check the pair and Gs.` }]
    }
    return []
  }
  const fit = fitCurve(input, waterDensity)
  return fit.ok ? [] : [{ path: fit.reason.code === 'gs-range' ? 'body.gs' : 'body.points', message: fit.reason.message }]
}

/** Puts a curve in force with the pair the lead confirms. A pair that tests were judged by is never changed afterwards. */
export async function approveCurve(write: SiteWrite, id: string, use: CurveUse): Promise<Curve> {
  const { manager, siteId, user, now } = write
  const curve = await manager.findOneBy(ReferenceCurveEntity, { siteId, id })
  if (!curve) throw notFound()
  if (curve.status !== 'draft') {
    throw conflict(`Curve ${curve.code} is approved already. Nothing was changed; record a new curve where another pair is right.`)
  }
  const site = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const chosen = pairOf(curve, use, site.unitSystem, site.waterDensity)
  if (!chosen.ok) throw refusal([{ path: 'body.use', message: `This pair cannot be used. ${chosen.reason}` }])
  const pair = { ...chosen.pair, pairFrom: chosen.from }
  await manager.update(ReferenceCurveEntity, { siteId, id }, { ...pair, status: 'approved', approvedBy: user.id, approvedAt: now, updatedAt: now })
  write.record('curve.approved', { type: 'curve', id }, { code: curve.code, ...pair })
  write.changed('curve', id)
  return loadCurve(manager, siteId, id)
}
