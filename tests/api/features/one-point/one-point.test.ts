import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { verifyChain } from '#api/features/events/verify-chain.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { onePointCheckSchema, onePointListSchema } from '#shared/schemas/one-point.ts'
import type { CreateOnePoint } from '#shared/schemas/one-point.ts'
import type { SiteChangedEvent } from '#shared/realtime.ts'
import { convertDensity } from '#shared/units/density.ts'
import { curveInput, pointsFromPcf } from '#tests/factories/curve.ts'
import { fieldWork } from '#tests/factories/field-work.ts'
import { openSite, rowsOf } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let work: ReturnType<typeof fieldWork>

beforeAll(async () => {
  app = await testApp()
})

/** The site's curve of 120.0 pcf at 12.0 % in the middle of a family: 128.0 at 10.0 and 112.0 at 14.5. */
beforeEach(async () => {
  open = await openSite(app)
  work = fieldWork(app, open)
  await approved([[6.5, 119], [8, 124.4], [10, 128], [11.5, 125.5], [13, 120.5]])
  await approved([[9.5, 105.5], [12, 110], [14.5, 112], [16.5, 110.5], [18.5, 106.5]])
})

afterAll(() => app.end())

async function approved(points: readonly (readonly [number, number])[], change: object = {}): Promise<Curve> {
  const lead = open.people['qc-lead']
  const draft = await lead.post(open.path('/curves'), curveInput({ materialId: open.material.id, points: pointsFromPcf(points), ...change }))
  const answer = await lead.post(open.path(`/curves/${(draft.body as Curve).id}/approve`), { use: 'spline' })
  if (answer.status !== 200) throw new Error(JSON.stringify(draft.body))
  return answer.body as Curve
}

/** Dry unit weight in pcf at a moisture, as a technician gives it: wet density. */
function onePoint(pcf: number, percent: number, overrides: Partial<CreateOnePoint> = {}): CreateOnePoint {
  const sheet: CreateOnePoint['sheet'] = { kind: 'density', densityUnit: 'pcf', wetDensity: pcf * (1 + percent / 100), moisture: { method: 'stated', percent } }
  return { id: randomUUID(), curveId: open.curve.id, method: 'D698', procedure: 'A', testId: null, sheet, sampledAt: new Date(Date.now() - 60_000).toISOString(), remarks: '', ...overrides }
}
const send = (input: CreateOnePoint) => open.people.technician.post(open.path('/one-point-checks'), input)

async function record(input: CreateOnePoint) {
  const { status, body } = await send(input)
  if (status !== 201) throw new Error(`Answered ${status}: ${JSON.stringify(body)}`)
  return onePointCheckSchema.parse(body)
}

describe('POST /api/sites/:siteId/one-point-checks', () => {
  it('is for those who record in the laboratory', async () => {
    const path = open.path('/one-point-checks')
    expect((await app.visitor().post(path, onePoint(116, 10.5))).status).toBe(401)
    expect((await open.people['owner-rep'].post(path, onePoint(116, 10.5))).status).toBe(403)
    expect((await open.people.technician.post(`/api/sites/${randomUUID()}/one-point-checks`, onePoint(116, 10.5))).status).toBe(404)
    const other = await app.signedIn()
    expect((await other.post(path, onePoint(116, 10.5))).status).toBe(404)
  })

  it('says which curve fits and how far the one in use is off, frozen as it was that day', async () => {
    // 117.8 pcf at 10 % is a point of the curve in use, 83 % of its optimum
    const on = await record(onePoint(117.8, 10))
    expect(on).toMatchObject({ number: 'O-001', materialName: open.material.name, recordedBy: { name: open.people.technician.user.name }, void: null })
    expect(on.result.fit).toMatchObject({ ok: true, on: 'curve', members: [open.curve.id], usable: true, warnings: [] })
    expect(on.result.off).toMatchObject({ dryDensity: 0, moisture: 0, off: false })
    expect(on.result.family.map((member) => member.code)).toHaveLength(3)
    const between = await record(onePoint(121.5, 9.6))
    if (!between.result.fit.ok) throw new Error(between.result.fit.reason.message)
    expect(between.result.fit.on).toBe('between')
    expect(convertDensity(between.result.fit.pair.maxDryDensity, 'kg/m3', 'pcf')).toBeGreaterThan(122)
    expect(between.result.off).toMatchObject({ off: true })
    expect(between.result.off?.dryDensity).toBeLessThan(0)
    await open.people['qc-lead'].post(open.path(`/curves/${open.curve.id}/supersede`), { successorId: between.result.family.find((member) => member.id !== open.curve.id)?.id, reason: 'Another pit' })
    const list = onePointListSchema.parse((await open.people['owner-rep'].get(open.path('/one-point-checks'))).body)
    expect(list.checks.map((check) => check.number)).toEqual(['O-002', 'O-001'])
    expect(list.checks[1]?.result).toEqual(on.result)
    expect(await verifyChain(app.dataSource.manager, open.siteId)).toMatchObject({ ok: true })
  })

  it('keeps what lies outside the family, with the words why, and says nothing of the curve by it', async () => {
    const { result } = await record(onePoint(131, 8.8))
    expect(result.fit).toMatchObject({ ok: false, reason: { code: 'above-family' } })
    expect(result.off).toBeNull()
    const dry = await record(onePoint(112.8, 8))
    expect(dry.result.fit).toMatchObject({ ok: true, usable: false, unusable: { code: 'too-dry' } })
  })

  it('refuses what cannot be used, each field named, and saves nothing', async () => {
    const issues = async (input: CreateOnePoint) => {
      const { status, body } = await send(input)
      expect(status).toBe(400)
      return (body as { details: { issues: { path: string }[] } }).details.issues.map((issue) => issue.path)
    }
    expect(await issues(onePoint(116, 10, { procedure: 'C' }))).toEqual(['body.method'])
    expect(await issues(onePoint(116, 10, { curveId: randomUUID() }))).toEqual(['body.curveId'])
    expect(await issues(onePoint(116, 10, { testId: randomUUID() }))).toEqual(['body.testId'])
    expect(await issues(onePoint(1160, 10))).toEqual(['body.sheet.wetDensity'])
    const mould = { kind: 'mould', massUnit: 'lb', mouldAndSoil: 9, mould: 10, mouldVolume: 1 / 30, volumeUnit: 'ft3', moisture: { method: 'stated', percent: 10 } } as const
    expect(await issues(onePoint(116, 10, { sheet: mould }))).toEqual(['body.sheet.mouldAndSoil'])
    expect(await rowsOf(app.dataSource.manager, 'one_point_check', open.siteId)).toEqual([])
  })

  it('takes a request sent twice for one, and an id used for another for a conflict', async () => {
    const input = onePoint(117.8, 10)
    const first = await record(input)
    expect(await record(input)).toEqual(first)
    expect((await send({ ...input, remarks: 'Another' })).status).toBe(409)
  })

  it('is told to open boards after it is saved', async () => {
    const socket = app.connect(open.people['qc-lead'])
    await new Promise((resolve) => socket.on('connect', () => socket.emit('site:join', open.siteId, resolve)))
    const heard = new Promise<SiteChangedEvent>((resolve) => socket.on('site:changed', (event) => event.resource === 'one-point' && resolve(event)))
    const check = await record(onePoint(117.8, 10))
    expect(await heard).toMatchObject({ siteId: open.siteId, resource: 'one-point', id: check.id })
  })

  it('flags the test its soil was taken at where the curve is off, and changes no verdict', async () => {
    const test = await work.record()
    const before = await work.detailOf(test.id)
    await record(onePoint(117.8, 10, { testId: test.id }))
    expect((await work.detailOf(test.id)).flags).toEqual(before.flags)
    const off = await record(onePoint(121.5, 9.6, { testId: test.id }))
    expect(off.test).toEqual({ id: test.id, number: test.number })
    const flagged = await work.detailOf(test.id)
    expect(flagged.flags.at(-1)).toMatchObject({ code: 'one-point-off', message: expect.stringMatching(/^One-point check O-002: the maximum of .* is \d\.\d.pcf too low, its optimum \d\.\d.% too wet/) as string })
    expect({ ...flagged, flags: [], flagged: false }).toEqual({ ...before, flags: [], flagged: false })
    const voided = await open.people.technician.post(open.path(`/one-point-checks/${off.id}/void`), { reason: 'Wrong mould' })
    expect(onePointCheckSchema.parse(voided.body).void).toMatchObject({ reason: 'Wrong mould', by: open.people.technician.user.name })
    expect((await work.detailOf(test.id)).flags).toEqual(before.flags)
  })
})

describe('POST /api/sites/:siteId/one-point-checks/:id/void', () => {
  it('needs the right, a reason, and a check that stands', async () => {
    const check = await record(onePoint(117.8, 10))
    const path = open.path(`/one-point-checks/${check.id}/void`)
    const body = { reason: 'Wrong mould' }
    expect((await app.visitor().post(path, body)).status).toBe(401)
    expect((await open.people.superintendent.post(path, body)).status).toBe(403)
    expect((await open.people.technician.post(path, { reason: '' })).status).toBe(400)
    expect((await open.people.technician.post(open.path(`/one-point-checks/${randomUUID()}/void`), body)).status).toBe(404)
    expect((await open.people.technician.post(path, body)).status).toBe(200)
    expect((await open.people.technician.post(path, body)).status).toBe(409)
  })
})

describe('GET /api/sites/:siteId/one-point-checks', () => {
  it('is for those who see the registers', async () => {
    expect((await app.visitor().get(open.path('/one-point-checks'))).status).toBe(401)
    expect((await open.people.operator.get(open.path('/one-point-checks'))).status).toBe(403)
    expect((await open.people.superintendent.get(open.path('/one-point-checks'))).body).toEqual({ checks: [] })
  })
})
