import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { looseToCompactedFactor } from '#shared/domain/volume-state.ts'
import { curveListSchema, curveSchema, materialListSchema, materialSchema } from '#shared/schemas/lab.ts'
import type { CreateCurve, Curve } from '#shared/schemas/lab.ts'
import { convertDensity } from '#shared/units/density.ts'
import { curveInput, pointsFromPcf } from '#tests/factories/curve.ts'
import { materialInput } from '#tests/factories/material.ts'
import { openSite, rowsOf } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let lead: SignedIn
let technician: SignedIn
let stranger: SignedIn

beforeAll(async () => {
  app = await testApp()
  open = await openSite(app)
  lead = open.people['qc-lead']
  technician = open.people.technician
  stranger = await app.signedIn()
})

afterAll(() => app.end())

const pcf = (kgPerM3: number | undefined) => convertDensity(kgPerM3 ?? Number.NaN, 'kg/m3', 'pcf')
const pathsOf = (body: unknown) => (body as { details: { issues: { path: string }[] } }).details.issues.map((issue) => issue.path)
const messageOf = (body: unknown) => (body as { message: string }).message
const input = (overrides: Partial<CreateCurve> = {}) => curveInput({ materialId: open.material.id, ...overrides })

async function record(overrides: Partial<CreateCurve> = {}): Promise<Curve> {
  const answer = await technician.post(open.path('/curves'), input(overrides))
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return curveSchema.parse(answer.body)
}

describe('GET and POST /api/sites/:siteId/materials', () => {
  it('are for those who work with the records', async () => {
    const path = open.path('/materials')
    expect((await app.visitor().get(path)).status).toBe(401)
    expect((await app.visitor().post(path, materialInput())).status).toBe(401)
    expect((await stranger.get(path)).status).toBe(404)
    expect((await stranger.post(path, materialInput())).status).toBe(404)
    expect((await open.people.operator.get(path)).status).toBe(403)
    expect((await open.people.superintendent.post(path, materialInput())).status).toBe(403)
    expect((await technician.post(path, materialInput({ swellPercent: 200 }))).status).toBe(400)
  })

  it('keep a material with its factor from loose to compacted', async () => {
    // 25 % swell, 10 % shrink: 0.90 / 1.25 (published swell tables)
    const body = materialInput({ name: 'Silty sand, cut 4', swellPercent: 25, shrinkPercent: 10 })
    const answer = await technician.post(open.path('/materials'), body)
    expect(answer.status).toBe(201)
    expect(materialSchema.parse(answer.body)).toEqual({ ...body, gs: null, gsMeasured: false, looseToCompacted: looseToCompactedFactor(body) })
    expect(materialSchema.parse(answer.body).looseToCompacted).toBeCloseTo(0.72, 12)
    expect((await technician.post(open.path('/materials'), body)).body).toEqual(answer.body)
    const { materials } = materialListSchema.parse((await open.people['owner-rep'].get(open.path('/materials'))).body)
    expect(materials.filter(({ id }) => id === body.id)).toEqual([answer.body])
    const second = await technician.post(open.path('/materials'), materialInput({ name: 'Silty sand, cut 4' }))
    expect(second.status).toBe(409)
    expect(messageOf(second.body)).toMatch(/already has a material called Silty sand, cut 4/)
  })
})

describe('POST /api/sites/:siteId/curves', () => {
  it('is for the lead and technicians of the site', async () => {
    const path = open.path('/curves')
    expect((await app.visitor().post(path, input())).status).toBe(401)
    expect((await stranger.post(path, input())).status).toBe(404)
    expect((await open.people.superintendent.post(path, input())).status).toBe(403)
    expect((await open.people['owner-rep'].post(path, input())).status).toBe(403)
  })

  /** Natural cubic spline through the published points; the sets of answer sites are extra data, by their recomputed values. */
  const P3: CreateCurve['points'] = [[9.9, 1620.5], [10.6, 1639], [12.1, 1673.9], [13.8, 1704.7], [15.1, 1713.1], [17.4, 1697.6], [19.4, 1660.3], [21.2, 1618.2]].map(
    ([moisture, dryDensity]) => ({ moisture: moisture!, dryDensity: dryDensity! }),
  )
  it.each<[string, CreateCurve['points'], number, number, number]>([
    // P-3: 1713.2 kg/m³ at 15.26 %
    ['P-3', P3, 2.7, convertDensity(1713.2, 'kg/m3', 'pcf'), 15.26],
    // P-4: 127.62 pcf at 12.35 %; Gs assumed, so that no point lies above zero air voids
    ['P-4', pointsFromPcf([[8.4, 122.2], [10.2, 126.3], [11.7, 127.4], [12.7, 127.5], [14, 125]]), 2.85, 127.62, 12.35],
    // P-5: 125.06 pcf at 12.05 %
    ['P-5', pointsFromPcf([[8.4, 90.22], [10.2, 112.98], [12.3, 124.76], [14.6, 105.24], [16.8, 93.24]]), 2.72, 125.06, 12.05],
    // P-6: 107.54 pcf at 12.82 %
    ['P-6', pointsFromPcf([[6.5, 104.14], [9.3, 106.46], [13.3, 107.52], [16.6, 106.03], [21.2, 99.01]]), 2.7, 107.54, 12.82],
    // P-7: 111.71 pcf at 16.04 %
    ['P-7', pointsFromPcf([[9.1, 106.97], [11.8, 109.84], [14.8, 111.24], [16.5, 111.59], [18.9, 107.32]]), 2.7, 111.71, 16.04],
  ])('answers the published spline of set %s', async (code, points, gs, maximum, optimum) => {
    const curve = await record({ code, points, gs })
    expect(Math.abs(pcf(curve.fit.spline?.maxDryDensity) - maximum)).toBeLessThan(0.01)
    expect(Math.abs((curve.fit.spline?.optimumMoisture ?? 0) - optimum)).toBeLessThan(0.01)
    expect(curve).toMatchObject({ status: 'draft', pairFrom: 'spline', approvedBy: null, recordedBy: technician.user.name, testsJudged: 0 })
    const highest = Math.max(...curve.fit.drawn.map(([, dryDensity]) => dryDensity))
    expect(Math.abs(pcf(highest) - maximum)).toBeLessThan(0.1)
    expect(curve.fit.drawn.map(([moisture]) => moisture).at(-1)).toBe(Math.max(...points.map((point) => point.moisture)))
  })

  it('shows the least-squares fits beside the spline and warns where they differ', async () => {
    const { curves } = curveListSchema.parse((await lead.get(open.path('/curves'))).body)
    const sharp = curves.find(({ code }) => code === 'P-5')
    // P-5: quadratic 120.0 pcf at 12.53 %
    expect(pcf(sharp?.fit.quadratic?.maxDryDensity)).toBeCloseTo(120, 1)
    expect(sharp?.fit.quadratic?.optimumMoisture).toBeCloseTo(12.53, 1)
    expect(sharp?.fit.warnings.map(({ code }) => code)).toContain('fits-differ')
  })

  it('refuses points that make no reference, with the reason, and keeps nothing', async () => {
    const three = input({ points: pointsFromPcf([[8, 113], [12, 120], [16, 113]]) })
    const answer = await technician.post(open.path('/curves'), three)
    expect(answer.status).toBe(400)
    expect(pathsOf(answer.body)).toEqual(['body.points'])
    expect(messageOf(answer.body)).toMatch(/at least 4 points; there are 3.*Nothing was saved/)
    expect((await lead.get(open.path(`/curves/${three.id}`))).status).toBe(404)
    const rising = await technician.post(open.path('/curves'), input({ points: pointsFromPcf([[6, 110], [8, 113], [10, 116], [12, 118]]) }))
    expect(messageOf(rising.body)).toMatch(/do not pass over a peak/)
    const wet = await technician.post(open.path('/curves'), input({ gs: 2.5 }))
    expect(messageOf(wet.body)).toMatch(/above the zero-air-voids line/)
  })

  it('takes the laboratory’s own pair with its reason in place of a fit', async () => {
    const reported = { maxDryDensity: convertDensity(119.5, 'pcf', 'kg/m3'), optimumMoisture: 12.2, reason: 'Signed report 88-1' }
    const curve = await record({ points: [], reported })
    expect(curve).toMatchObject({ pairFrom: 'reported', fit: { spline: null, drawn: [] } })
    expect(curve.fit.refusal).toMatch(/at least 4 points/)
    expect(pcf(curve.pair?.maxDryDensity)).toBeCloseTo(119.5, 9)
    const approved = await lead.post(open.path(`/curves/${curve.id}/approve`), { use: 'reported' })
    expect(approved.status).toBe(200)
    const dense = await technician.post(open.path('/curves'), input({ reported: { ...reported, optimumMoisture: 18 } }))
    expect(pathsOf(dense.body)).toEqual(['body.reported.maxDryDensity'])
    expect((await technician.post(open.path('/curves'), input({ reported: { ...reported, reason: '' } }))).status).toBe(400)
  })

  it('takes only materials of the site, codes once, and times gone by', async () => {
    const foreign = await technician.post(open.path('/curves'), input({ materialId: randomUUID() }))
    expect([foreign.status, pathsOf(foreign.body)]).toEqual([400, ['body.materialId']])
    const same = await technician.post(open.path('/curves'), input({ code: open.curve.code }))
    expect([same.status, messageOf(same.body)]).toEqual([409, expect.stringContaining(open.curve.code)])
    const early = await technician.post(open.path('/curves'), input({ sampledAt: new Date(Date.now() + 3_600_000).toISOString() }))
    expect([early.status, messageOf(early.body)]).toEqual([400, expect.stringContaining('future')])
  })

  it('gives the first answer again to the same request', async () => {
    const body = input()
    const first = await technician.post(open.path('/curves'), body)
    expect((await technician.post(open.path('/curves'), body)).body).toEqual(first.body)
    expect((await technician.post(open.path('/curves'), { ...body, gs: 2.71 })).status).toBe(409)
  })
})

describe('GET /api/sites/:siteId/curves and /curves/:id', () => {
  it('are for those who work with the records', async () => {
    for (const path of [open.path('/curves'), open.path(`/curves/${open.curve.id}`)]) {
      expect((await app.visitor().get(path)).status).toBe(401)
      expect((await stranger.get(path)).status).toBe(404)
      expect((await open.people.operator.get(path)).status).toBe(403)
      expect((await open.people['owner-rep'].get(path)).status).toBe(200)
    }
  })

  it('give nothing of another site', async () => {
    const other = await openSite(app)
    expect((await lead.get(open.path(`/curves/${other.curve.id}`))).status).toBe(404)
    expect((await other.people['qc-lead'].get(open.path('/curves'))).status).toBe(404)
  })

  it('count the tests that stand on a curve, voided ones left out', async () => {
    const curve = await record()
    const test = {
      siteId: open.siteId, purpose: 'required', zoneId: open.site.zones[0]?.id ?? '', lift: 1, cell: 0, easting: 0, northing: 0, u: 0, v: 0, depthUm: 200_000,
      method: 'other', sheet: {}, curveId: curve.id, remarks: '', outcome: 'pass', treatedAsFail: false, near: false, headline: '',
      wetDensity: 2_000, dryDensity: 1_850, moisture: 12, rc: 96, moistureDeviation: 0, verdict: {}, flags: [],
      recordedBy: lead.user.id, sampledAt: new Date(), recordedAt: new Date(), createdAt: new Date(), updatedAt: new Date(),
    }
    for (const seq of [1, 2, 3]) {
      const id = randomUUID()
      await app.dataSource.manager.insert('field_test', { ...test, id, chainId: id, seq, number: `T-${seq}`, voidedAt: seq === 3 ? new Date() : null })
    }
    expect(curveSchema.parse((await lead.get(open.path(`/curves/${curve.id}`))).body).testsJudged).toBe(2)
  })

  it('tell the curve with its material', async () => {
    const curve = curveSchema.parse((await technician.get(open.path(`/curves/${open.curve.id}`))).body)
    expect(curve).toEqual(open.curve)
    expect(curve).toMatchObject({ materialName: open.material.name, status: 'approved', approvedBy: lead.user.name })
  })
})

describe('POST /api/sites/:siteId/curves/:id/approve', () => {
  it('is for the lead and a curve of the site', async () => {
    const { id } = await record()
    const path = open.path(`/curves/${id}/approve`)
    expect((await app.visitor().post(path, { use: 'spline' })).status).toBe(401)
    expect((await stranger.post(path, { use: 'spline' })).status).toBe(404)
    expect((await technician.post(path, { use: 'spline' })).status).toBe(403)
    expect((await lead.post(path, { use: 'guess' })).status).toBe(400)
    expect((await lead.post(open.path(`/curves/${randomUUID()}/approve`), { use: 'spline' })).status).toBe(404)
  })

  it('puts the pair in force rounded to 0.1 pcf and 0.1 % and records who confirmed it', async () => {
    const points = pointsFromPcf([[8.4, 122.2], [10.2, 126.3], [11.7, 127.4], [12.7, 127.5], [14, 125]])
    const draft = await record({ points, gs: 2.85 })
    // P-4: spline 127.62 at 12.35, quadratic 127.57 at 11.76
    const curve = curveSchema.parse((await lead.post(open.path(`/curves/${draft.id}/approve`), { use: 'quadratic' })).body)
    expect(pcf(curve.pair?.maxDryDensity)).toBeCloseTo(127.6, 9)
    expect(curve.pair?.optimumMoisture).toBe(11.8)
    expect(curve).toMatchObject({ status: 'approved', pairFrom: 'quadratic', approvedBy: lead.user.name })
    const events = await rowsOf(app.dataSource.manager, 'event', open.siteId)
    const verbs = events.filter((event) => event.subject_id === draft.id).map((event) => event.verb)
    expect(verbs).toEqual(['curve.recorded', 'curve.approved'])
    const again = await lead.post(open.path(`/curves/${draft.id}/approve`), { use: 'spline' })
    expect([again.status, messageOf(again.body)]).toEqual([409, expect.stringMatching(/approved already/)])
  })

  it('refuses a fit that there is not', async () => {
    const reported = { maxDryDensity: 1900, optimumMoisture: 11, reason: 'Signed report' }
    const { id } = await record({ points: [], reported })
    const answer = await lead.post(open.path(`/curves/${id}/approve`), { use: 'spline' })
    expect([answer.status, pathsOf(answer.body)]).toEqual([400, ['body.use']])
    const { id: fitted } = await record()
    const none = await lead.post(open.path(`/curves/${fitted}/approve`), { use: 'reported' })
    expect([none.status, messageOf(none.body)]).toEqual([400, expect.stringMatching(/own pair was not entered/)])
  })

  it('rounds to 0.01 kN/m³ on a site that shows SI', async () => {
    const metric = await openSite(app, { site: { unitSystem: 'si' } })
    // 120.0 pcf = 1922.2 kg/m³ = 18.85 kN/m³
    expect(convertDensity(metric.curve.pair?.maxDryDensity ?? 0, 'kg/m3', 'kN/m3')).toBeCloseTo(18.85, 9)
  })
})
