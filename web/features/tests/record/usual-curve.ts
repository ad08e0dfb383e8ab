import type { Curve } from '#shared/schemas/lab.ts'

/** The curve in force at the end of a line of successors. */
function inForce(curve: Curve, byId: ReadonlyMap<string, Curve>): Curve {
  const next = curve.superseded === null ? undefined : byId.get(curve.superseded.by.id)
  return next === undefined ? curve : inForce(next, byId)
}

/**
 * The approved curve a new test of a material usually takes: the only one, or the one most of its tests were judged by, a
 * superseded curve's tests counting for its successor. None where that is not clear: a family of curves nobody has used yet.
 * @param materialId null where nothing is placed: the material of all curves, where they are of one
 */
export function usualCurve(curves: readonly Curve[], materialId: string | null): Curve | undefined {
  const own = curves.filter((curve) => materialId === null || curve.materialId === materialId)
  const approved = own.filter((curve) => curve.status === 'approved')
  if (approved.length <= 1) return approved[0]
  if (new Set(approved.map((curve) => curve.materialId)).size > 1) return undefined
  const byId = new Map(own.map((curve) => [curve.id, curve]))
  const used = new Map(approved.map((curve) => [curve.id, 0]))
  for (const curve of own) {
    const { id } = inForce(curve, byId)
    if (used.has(id)) used.set(id, (used.get(id) ?? 0) + curve.testsJudged)
  }
  const most = Math.max(...used.values())
  const leading = approved.filter((curve) => used.get(curve.id) === most)
  return most > 0 && leading.length === 1 ? leading[0] : undefined
}
