import type { Curve } from '#shared/schemas/lab.ts'
import { curveInput, pointsFromPcf } from '#tests/factories/curve.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'

/** Another approved curve of the site's material: the first one's, moved by so many pcf. */
export async function otherCurve(open: OpenSite, pcf: number): Promise<Curve> {
  const lead = open.people['qc-lead']
  const shape = [[8, 112.8], [10, 117.8], [12, 120], [14, 117.8], [16, 112.8]] as const
  const points = pointsFromPcf(shape.map(([moisture, density]) => [moisture, density + pcf] as const))
  const draft = await lead.post(open.path('/curves'), curveInput({ materialId: open.material.id, points, gs: 2.8 }))
  const approved = await lead.post(open.path(`/curves/${(draft.body as Curve).id}/approve`), { use: 'spline' })
  if (approved.status !== 200) throw new Error(`The curve was not approved: ${JSON.stringify(approved.body)}`)
  return approved.body as Curve
}
