import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { refuseSuccessor } from '#api/features/rejudge/supersede-curve.service.ts'
import type { SiteRead } from '#api/features/site-head/site-write.ts'
import { refusal } from '#api/http/refuse-input.ts'

export interface CurvePair {
  readonly from: ReferenceCurveEntity
  readonly by: ReferenceCurveEntity
}

type Reading = Pick<SiteRead, 'manager' | 'siteId'>

/** The approved curve at the end of a line of successors, or null for a curve that is in force itself. */
async function lastSuccessor({ manager, siteId }: Reading, curve: ReferenceCurveEntity): Promise<ReferenceCurveEntity | null> {
  let last = curve
  // a curve can only be superseded by an approved one, so the line has an end
  while (last.successorId !== null) last = await manager.findOneByOrFail(ReferenceCurveEntity, { siteId, id: last.successorId })
  return last.id === curve.id ? null : last
}

/**
 * A curve and the one its tests would be judged by: the last of its successors, or one that is only thought of while the
 * curve is still in force.
 */
export async function loadCurvePair(read: Reading, id: string, byId: string | undefined): Promise<CurvePair> {
  const { manager, siteId } = read
  const from = await manager.findOneBy(ReferenceCurveEntity, { siteId, id })
  if (!from) throw notFound()
  const successor = await lastSuccessor(read, from)
  if (successor) {
    if (byId !== undefined && byId !== successor.id) throw refusal([{ path: 'body.by', message: `The tests of ${from.code} are judged again by ${successor.code}, which took its place.` }])
    return { from, by: successor }
  }
  if (from.status === 'draft') throw conflict(`Curve ${from.code} is not approved, so nothing takes its place. Nothing was changed.`)
  const by = byId === undefined ? null : await manager.findOneBy(ReferenceCurveEntity, { siteId, id: byId })
  if (!by || by.id === id) throw refusal([{ path: 'body.by', message: `Nothing has taken the place of ${from.code}. Choose the curve to compare it with.` }])
  refuseSuccessor(from, by)
  return { from, by }
}
