import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { PlacementEntity } from '#api/entities/placement.entity.ts'
import { verifyChain } from '#api/features/events/verify-chain.ts'
import { curveSchema, materialSchema } from '#shared/schemas/lab.ts'
import type { CreateCurve, Curve } from '#shared/schemas/lab.ts'
import { convertDensity } from '#shared/units/density.ts'
import { curveInput } from '#tests/factories/curve.ts'
import { fieldWork } from '#tests/factories/field-work.ts'
import { materialInput } from '#tests/factories/material.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { placeCells } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite

beforeAll(async () => {
  app = await testApp()
})
beforeEach(async () => {
  open = await openSite(app)
})
afterAll(() => app.end())

// P-6: wet pounds in 0.055 ft³ (answerhappy.com 187713); dry unit weights recomputed
const P6 = [[6.1, 6.5], [6.4, 9.3], [6.7, 13.3], [6.8, 16.6], [6.6, 21.2]] as const
const P6_DRY = [104.14, 106.46, 107.52, 106.03, 99.01]
const entry = (mould = 9.2): NonNullable<CreateCurve['entry']> => ({
  kind: 'masses', massUnit: 'lb', volumeUnit: 'ft3', mould, mouldVolume: 0.055, specimens: P6.map(([mass, percent]) => ({ mouldAndSoil: Number((mass + mould).toFixed(3)), moisture: { percent } })),
})
const input = (overrides: Partial<CreateCurve> = {}): CreateCurve => curveInput({ materialId: open.material.id, entry: entry(), points: [], ...overrides })
const issues = (body: unknown) => JSON.stringify((body as { details?: unknown }).details)

async function record(overrides: Partial<CreateCurve> = {}): Promise<Curve> {
  const { status, body } = await open.people.technician.post(open.path('/curves'), input(overrides))
  if (status !== 201) throw new Error(`Answered ${status}: ${JSON.stringify(body)}`)
  return curveSchema.parse(body)
}
const put = (id: string, body: object) => open.people.technician.put(open.path(`/curves/${id}`), body)

describe('a curve from mould masses', () => {
  it('keeps them as they were weighed and takes its points from them', async () => {
    const curve = await record({ apparatus: { layers: 3, blows: 25, oversizePercent: 4 } })
    expect(curve.entry).toEqual(entry())
    expect(curve.apparatus).toEqual({ layers: 3, blows: 25, oversizePercent: 4 })
    curve.points.forEach((point, i) => expect(convertDensity(point.dryDensity, 'kg/m3', 'pcf')).toBeCloseTo(P6_DRY[i] ?? 0, 2))
    // the mould of 0.055 ft³ is neither the 4 in nor the 6 in one, and takes 60 % of the energy by volume
    expect(curve.flags.map((flag) => flag.code)).toEqual(['mould-volume', 'energy'])
  })

  it('names the specimen that cannot be, and stores nothing', async () => {
    const wrong = { ...entry(), specimens: [...entry().specimens.slice(0, 4), { mouldAndSoil: 9.2, moisture: { percent: 21.2 } }] } as CreateCurve['entry']
    const { status, body } = await open.people.technician.post(open.path('/curves'), input({ entry: wrong }))
    expect(status).toBe(400)
    expect(issues(body)).toContain('body.entry.specimens.4.mouldAndSoil')
  })

  it('refuses a method that may not be used for the soil, and says which may', async () => {
    const coarse = await open.people.technician.post(open.path('/curves'), input({ apparatus: { layers: 3, blows: 25, oversizePercent: 28 } }))
    expect(coarse.status).toBe(400)
    expect(issues(coarse.body)).toContain('body.apparatus.oversizePercent')
    expect(issues(coarse.body)).toContain('Method B may')
    const older = await open.people.technician.post(open.path('/curves'), input({ apparatus: { edition: '2000', layers: 3, blows: 25, oversizePercent: 22 } }))
    expect(issues(older.body)).toContain('D698-00 method A takes at most 20 %')
    expect((await record({ apparatus: { edition: '2007', mould: '6-in', layers: null, blows: null, oversizePercent: 22 } })).apparatus).toMatchObject({ edition: '2007', mould: '6-in' })
    const letter = await open.people.technician.post(open.path('/curves'), input({ procedure: 'D' }))
    expect(issues(letter.body)).toContain('body.procedure')
  })
})

describe('PUT /api/sites/:siteId/curves/:id', () => {
  it('is for those who record curves of the site', async () => {
    const { id } = await record()
    const body = input()
    expect((await app.visitor().put(open.path(`/curves/${id}`), body)).status).toBe(401)
    expect((await open.people['owner-rep'].put(open.path(`/curves/${id}`), body)).status).toBe(403)
    expect((await put(randomUUID(), body)).status).toBe(404)
    const other = await openSite(app)
    expect((await other.people['qc-lead'].put(other.path(`/curves/${id}`), { ...body, materialId: other.material.id })).status).toBe(404)
    expect((await put(id, { ...body, gs: 9 })).status).toBe(400)
  })

  it('puts a draft right as a whole', async () => {
    const curve = await record()
    const { status, body } = await put(curve.id, input({ code: curve.code, entry: null, points: curve.points.slice(0, 4), gs: 2.68 }))
    expect(status).toBe(200)
    expect(curveSchema.parse(body)).toMatchObject({ id: curve.id, code: curve.code, gs: 2.68, entry: null, status: 'draft' })
    expect(await verifyChain(app.dataSource.manager, open.siteId)).toMatchObject({ ok: true })
  })

  it('leaves a curve alone that was approved, or that a test was judged by', async () => {
    const curve = await record()
    expect((await open.people['qc-lead'].post(open.path(`/curves/${curve.id}/approve`), { use: 'spline' })).status).toBe(200)
    const before = (await open.people.technician.get(open.path(`/curves/${curve.id}`))).body
    expect((await put(curve.id, input())).status).toBe(409)
    expect((await open.people.technician.post(open.path(`/curves/${curve.id}/withdraw`), { reason: 'Wrong soil' })).status).toBe(409)
    expect((await open.people.technician.get(open.path(`/curves/${curve.id}`))).body).toEqual(before)
    const used = await record({ entry: null, points: curveInput({ materialId: '' }).points })
    await fieldWork(app, open).record({ curveId: used.id })
    expect((await put(used.id, input())).status).toBe(409)
  })
})

describe('POST /api/sites/:siteId/curves/:id/withdraw', () => {
  it('keeps the draft with the reason, and lets it judge nothing', async () => {
    const { id } = await record()
    expect((await open.people.superintendent.post(open.path(`/curves/${id}/withdraw`), { reason: 'Wrong soil' })).status).toBe(403)
    expect((await open.people.technician.post(open.path(`/curves/${id}/withdraw`), { reason: '' })).status).toBe(400)
    const withdrawn = curveSchema.parse((await open.people.technician.post(open.path(`/curves/${id}/withdraw`), { reason: 'Wrong soil' })).body)
    expect(withdrawn).toMatchObject({ status: 'withdrawn', withdrawReason: 'Wrong soil', pair: null })
    expect((await open.people['qc-lead'].post(open.path(`/curves/${id}/approve`), { use: 'spline' })).status).toBe(409)
    expect((await open.people.technician.post(open.path(`/curves/${id}/withdraw`), { reason: 'Wrong soil' })).status).toBe(409)
    await expect(fieldWork(app, open).record({ curveId: id })).rejects.toThrow('no maximum yet')
  })
})

describe('PATCH /api/sites/:siteId/materials/:id', () => {
  it('changes what is given, for those who record materials', async () => {
    const lead = open.people['qc-lead']
    const path = open.path(`/materials/${open.material.id}`)
    expect((await app.visitor().patch(path, { gs: 2.71 })).status).toBe(401)
    expect((await open.people['owner-rep'].patch(path, { gs: 2.71 })).status).toBe(403)
    expect((await lead.patch(open.path(`/materials/${randomUUID()}`), { gs: 2.71 })).status).toBe(404)
    expect((await lead.patch(path, { gs: 7 })).status).toBe(400)
    const changed = materialSchema.parse((await lead.patch(path, { gs: 2.71, gsMeasured: true, swellPercent: 30 })).body)
    expect(changed).toMatchObject({ ...open.material, gs: 2.71, gsMeasured: true, swellPercent: 30, looseToCompacted: changed.looseToCompacted })
    const second = materialInput()
    expect((await lead.post(open.path('/materials'), second)).status).toBe(201)
    expect((await lead.patch(path, { name: second.name })).status).toBe(409)
  })

  it('counts fill placed from then on by the new swell and shrink; what was placed keeps its volume', async () => {
    const loads = { loads: 4, loadVolumeCm3: 9_000_000 }
    const loadsOf = async () => (await app.dataSource.manager.find(PlacementEntity, { where: { siteId: open.siteId }, order: { seq: 'ASC' } })).map((placement) => placement.loadsCm3)
    await placeCells(app, open, [0, 1], loads)
    const [before] = await loadsOf()
    const changed = materialSchema.parse((await open.people['qc-lead'].patch(open.path(`/materials/${open.material.id}`), { swellPercent: 60, shrinkPercent: 20 })).body)
    await placeCells(app, open, [2, 3], loads)
    const [still, after] = await loadsOf()
    expect(still).toBe(before)
    // compacted = loose · (1 − shrink) / (1 + swell): 0.8 / 1.6
    expect(changed.looseToCompacted).toBeCloseTo(0.5, 12)
    expect(after).toBe(18_000_000)
    expect(before).not.toBe(after)
    expect(await verifyChain(app.dataSource.manager, open.siteId)).toMatchObject({ ok: true })
  })
})
