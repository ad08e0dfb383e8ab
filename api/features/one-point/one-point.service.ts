import { IsNull } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { OnePointCheckEntity } from '#api/entities/one-point-check.entity.ts'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import { flagTest, unflagTest } from '#api/features/one-point/flag-test.ts'
import { loadOnePoint, onePointNumber } from '#api/features/one-point/one-point.queries.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { refusal, refuseIf } from '#api/http/refuse-input.ts'
import { checkCurve } from '#shared/domain/check-curve.ts'
import type { CurveCheck, SiteCurve } from '#shared/domain/check-curve.ts'
import { reduceOnePoint } from '#shared/domain/one-point.ts'
import { onePointResultSchema } from '#shared/schemas/one-point.ts'
import type { CreateOnePoint, OnePointCheck } from '#shared/schemas/one-point.ts'

/** What makes a point no point of this family, so that nothing is worth keeping. */
const REFUSED: Readonly<Record<string, string>> = { 'other-method': 'body.method', 'bad-point': 'body.sheet.moisture', 'no-family': 'body.curveId' }

/**
 * Records a one-point check: reduces the specimen, fits it into the family of the curve in use, and freezes what it came to.
 * A curve that is off flags the test the soil was taken at; no verdict changes.
 */
export async function recordOnePoint(write: SiteWrite, input: CreateOnePoint): Promise<OnePointCheck> {
  const { manager, siteId, user, now } = write
  const sampledAt = notInFuture(new Date(input.sampledAt), now)
  const curves = (await manager.find(ReferenceCurveEntity, { where: { siteId }, order: { code: 'ASC', id: 'ASC' } })).map(asSiteCurve)
  const inUse = curves.find((curve) => curve.id === input.curveId)
  if (!inUse) throw refusal([{ path: 'body.curveId', message: 'That reference curve is not one of this site’s. Choose one from the list.' }])
  if (inUse.pair === null) throw refusal([{ path: 'body.curveId', message: `Curve ${inUse.code} has no maximum yet. Choose another.` }])
  const test = await loadTest(write, input, inUse.code)
  const point = reduceOrRefuse(input)
  const { waterDensity, unitSystem } = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const check = checkCurve(inUse, curves, { point, compacted: input, waterDensity })
  refuseFamily(check)
  const { id, curveId, testId, method, procedure, sheet, remarks } = input
  const [{ last }]: [{ last: number | null }] = await manager.query('SELECT MAX(`seq`) AS `last` FROM `one_point_check` WHERE `site_id` = ?', [siteId])
  const seq = Number(last ?? 0) + 1
  const result = onePointResultSchema.parse({ family: check.members, inUse, fit: check.fit, off: check.off })
  const row = { siteId, id, seq, materialId: inUse.materialId, curveId, testId, method, procedure, sheet, ...point, result, sampledAt, recordedAt: now, recordedBy: user.id, remarks, voidedAt: null, voidedBy: null, voidReason: null, createdAt: now, updatedAt: now }
  await manager.insert(OnePointCheckEntity, row as never)
  const number = onePointNumber(seq)
  write.record('one-point.recorded', { type: 'one-point', id }, { ...input, number, curve: inUse.code, test: test?.number ?? null, ...point, fit: check.fit.ok ? { on: check.fit.on, pair: check.fit.pair, usable: check.fit.usable } : check.fit.reason, off: check.off }, sampledAt)
  write.changed('one-point', id)
  if (test && check.off?.off) await flagTest(write, test, { number, curve: inUse.code, off: check.off, unitSystem })
  return loadOnePoint(manager, siteId, id)
}

/** Takes a check out of force with a reason; the flag it set falls with it. */
export async function voidOnePoint(write: SiteWrite, id: string, reason: string): Promise<OnePointCheck> {
  const { manager, siteId, user, now } = write
  const check = await manager.findOneBy(OnePointCheckEntity, { siteId, id })
  if (!check) throw notFound()
  const number = onePointNumber(check.seq)
  if (check.voidedAt !== null) throw conflict(`${number} is void already. Nothing was changed.`)
  await manager.update(OnePointCheckEntity, { siteId, id }, { voidedAt: now, voidedBy: user.id, voidReason: reason, updatedAt: now })
  write.record('one-point.voided', { type: 'one-point', id }, { number, reason })
  write.changed('one-point', id)
  if (check.testId !== null) await unflagTest(write, check.testId, number)
  return loadOnePoint(manager, siteId, id)
}

function asSiteCurve({ id, code, materialId, method, procedure, status, points, gs, maxDryDensity, optimumMoisture }: ReferenceCurveEntity): SiteCurve {
  return { id, code, materialId, method, procedure, status, points, gs, pair: maxDryDensity === null || optimumMoisture === null ? null : { maxDryDensity, optimumMoisture } }
}

async function loadTest({ manager, siteId }: SiteWrite, { testId, curveId }: CreateOnePoint, code: string): Promise<FieldTestEntity | null> {
  if (testId === null) return null
  const test = await manager.findOneBy(FieldTestEntity, { siteId, id: testId, voidedAt: IsNull() })
  if (!test) throw refusal([{ path: 'body.testId', message: 'That test is not one of this site’s, or is void. Choose another, or none.' }])
  if (test.curveId !== curveId) throw refusal([{ path: 'body.testId', message: `${test.number} is not judged by ${code}. Choose the curve it is judged by, or no test.` }])
  return test
}

function reduceOrRefuse({ sheet }: CreateOnePoint) {
  const reduced = reduceOnePoint(sheet)
  if (reduced.ok) return { wetDensity: reduced.wetDensity, dryDensity: reduced.dryDensity, moisture: reduced.moisture }
  refuseIf(reduced.problems.map(({ field, message }) => ({ path: `body.sheet.${field}`, message })))
  throw new Error('A one-point was refused without a reason')
}

function refuseFamily({ fit }: CurveCheck): void {
  const path = fit.ok ? undefined : REFUSED[fit.reason.code]
  if (!fit.ok && path !== undefined) throw refusal([{ path, message: fit.reason.message }])
}
