import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { loadCurve } from '#api/features/lab/curves.queries.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { refusal } from '#api/http/refuse-input.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import type { SupersedeCurve } from '#shared/schemas/rejudge.ts'

/**
 * Puts another approved curve of the same material in a curve's place. New tests take the successor; a test judged before
 * keeps its verdict until it is judged again, which is an act of its own.
 */
export async function supersedeCurve(write: SiteWrite, id: string, { successorId, reason }: SupersedeCurve): Promise<Curve> {
  const { manager, siteId, user, now } = write
  const curve = await manager.findOneBy(ReferenceCurveEntity, { siteId, id })
  if (!curve) throw notFound()
  if (curve.status !== 'approved') {
    throw conflict(`Curve ${curve.code} is ${curve.status === 'draft' ? 'not approved, so there is nothing to supersede' : 'superseded already'}. Nothing was changed.`)
  }
  const successor = await manager.findOneBy(ReferenceCurveEntity, { siteId, id: successorId })
  if (!successor || successor.id === id) throw refusal([{ path: 'body.successorId', message: 'That curve is not another one of this site’s. Choose one from the list.' }])
  refuseSuccessor(curve, successor)
  await manager.update(ReferenceCurveEntity, { siteId, id }, { status: 'superseded', successorId, supersededAt: now, supersededBy: user.id, supersedeReason: reason, updatedAt: now })
  write.record('curve.superseded', { type: 'curve', id }, { code: curve.code, by: successor.code, successorId, reason })
  write.changed('curve', id)
  return loadCurve(manager, siteId, id)
}

/** A curve takes the place of another only when it is approved, of the same material, and has a pair. */
export function refuseSuccessor(curve: ReferenceCurveEntity, successor: ReferenceCurveEntity): void {
  const refuse = (message: string) => refusal([{ path: 'body.successorId', message }])
  if (successor.status !== 'approved') throw refuse(`Curve ${successor.code} is ${successor.status === 'draft' ? 'not approved yet' : 'superseded itself'}. Choose an approved one.`)
  if (successor.materialId !== curve.materialId) throw refuse(`Curve ${successor.code} is of another material than ${curve.code}. Choose one of the same material.`)
}
