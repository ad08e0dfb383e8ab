import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import { loadCurve } from '#api/features/lab/curves.queries.ts'
import { methodIssues, pointsOfSheet } from '#api/features/lab/curve-sheet.ts'
import { fitCurve, pairOf } from '#api/features/lab/fit-curve.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { refusal, refuseIf } from '#api/http/refuse-input.ts'
import type { InputIssue } from '#api/http/validate.ts'
import { GREATEST_DENSITY, LEAST_DENSITY } from '#shared/domain/curve-checks.ts'
import { zeroAirVoidsDensity } from '#shared/domain/phase-relations.ts'
import type { CorrectCurve, CreateCurve, Curve, CurveUse } from '#shared/schemas/lab.ts'

const NOT_SUPERSEDED = { successorId: null, supersededAt: null, supersededBy: null, supersedeReason: null } as const

/** Gs is kept to this many parts of one. */
const GS_PARTS = 1_000

/**
 * Records a laboratory curve as a draft, with the pair that would be approved: the laboratory's own where it is given
 * with a reason, else the spline's. Points that make no reference are refused unless that own pair stands in for them.
 */
export async function createCurve(write: SiteWrite, given: CreateCurve): Promise<Curve> {
  const { manager, siteId, user, now } = write
  const { body, pair } = await readSheet(write, given)
  if (await manager.existsBy(ReferenceCurveEntity, { siteId, code: body.code })) throw codeTaken(body.code)
  const { id } = given
  const draft = { id, siteId, status: 'draft' as const, recordedBy: user.id, approvedBy: null, approvedAt: null, withdrawReason: null, createdAt: now, updatedAt: now }
  await manager.insert(ReferenceCurveEntity, { ...body, ...pair, ...draft, ...NOT_SUPERSEDED } as never)
  write.record('curve.recorded', { type: 'curve', id }, { ...body, sampledAt: given.sampledAt, ...pair }, body.sampledAt)
  write.changed('curve', id)
  return loadCurve(manager, siteId, id)
}

/** Puts a draft right, as a whole. A curve that was approved, withdrawn or used by a test is not changed. */
export async function correctCurve(write: SiteWrite, id: string, given: CorrectCurve): Promise<Curve> {
  const { manager, siteId, now } = write
  const curve = await loadDraft(write, id)
  const { body, pair } = await readSheet(write, given)
  if (body.code !== curve.code && (await manager.existsBy(ReferenceCurveEntity, { siteId, code: body.code }))) throw codeTaken(body.code)
  await manager.update(ReferenceCurveEntity, { siteId, id }, { ...body, ...pair, updatedAt: now } as never)
  write.record('curve.corrected', { type: 'curve', id }, { ...body, sampledAt: given.sampledAt, ...pair }, body.sampledAt)
  write.changed('curve', id)
  return loadCurve(manager, siteId, id)
}

/** Takes a draft back, with a reason; it stays on record and judges nothing. */
export async function withdrawCurve(write: SiteWrite, id: string, reason: string): Promise<Curve> {
  const { manager, siteId, now } = write
  const curve = await loadDraft(write, id)
  await manager.update(ReferenceCurveEntity, { siteId, id }, { status: 'withdrawn', withdrawReason: reason, maxDryDensity: null, optimumMoisture: null, pairFrom: null, updatedAt: now })
  write.record('curve.withdrawn', { type: 'curve', id }, { code: curve.code, reason })
  write.changed('curve', id)
  return loadCurve(manager, siteId, id)
}

/** A draft that no test was judged by, or the reason it may not be changed. */
async function loadDraft({ manager, siteId }: SiteWrite, id: string): Promise<ReferenceCurveEntity> {
  const curve = await manager.findOneBy(ReferenceCurveEntity, { siteId, id })
  if (!curve) throw notFound()
  if (curve.status !== 'draft') throw conflict(`Curve ${curve.code} is no draft any more. Nothing was changed; record a new curve where another is right.`)
  if (await manager.existsBy(FieldTestEntity, { siteId, curveId: id })) {
    throw conflict(`Tests were judged by ${curve.code} already. Nothing was changed; record a new curve and judge them again by it.`)
  }
  return curve
}

const codeTaken = (code: string) => conflict(`This site already has a curve called ${code}. Nothing was saved; give this one another name.`)

/** A sheet checked and worked out: what to store of it, and the pair that would be approved. */
async function readSheet({ manager, siteId, now }: SiteWrite, given: CorrectCurve) {
  const points = pointsOfSheet(given)
  const { code, materialId, method, procedure, gsMeasured, coarse, reported } = given
  const gs = Math.round(given.gs * GS_PARTS) / GS_PARTS
  const body = { code, materialId, method, procedure, points, entry: given.entry ?? null, apparatus: given.apparatus ?? null, gs, gsMeasured, coarse, reported, sampledAt: notInFuture(new Date(given.sampledAt), now) }
  const site = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const hasMaterial = await manager.existsBy(BorrowMaterialEntity, { siteId, id: materialId })
  refuseIf([
    ...(hasMaterial ? [] : [{ path: 'body.materialId', message: 'That material is not one of this site’s. Choose one from the list.' }]),
    ...methodIssues(body),
    ...curveIssues(body, site.waterDensity),
  ])
  const chosen = pairOf(body, reported ? 'reported' : 'spline', site.unitSystem, site.waterDensity)
  const pair = chosen.ok ? { ...chosen.pair, pairFrom: chosen.from } : { maxDryDensity: null, optimumMoisture: null, pairFrom: null }
  return { body, pair }
}

function curveIssues(input: Pick<CreateCurve, 'points' | 'gs' | 'gsMeasured' | 'reported'>, waterDensity: number): InputIssue[] {
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
    throw conflict(`Curve ${curve.code} is ${curve.status === 'withdrawn' ? 'withdrawn' : 'approved'} already. Nothing was changed; record a new curve where another pair is right.`)
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
