import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { gaugeDetailSchema, gaugeListSchema, gaugeSchema, type CreateGauge, type Gauge, type GaugeDetail, type RecordCount } from '#shared/schemas/gauge.ts'
import { workDay } from '#shared/domain/lots.ts'
import { countInput, gaugeInput } from '#tests/factories/gauge.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let technician: SignedIn
let stranger: SignedIn

beforeAll(async () => {
  app = await testApp()
  open = await openSite(app)
  technician = open.people.technician
  stranger = await app.signedIn()
})

afterAll(() => app.end())

const DAY_MS = 86_400_000
/** noon of a working day so many days ago; `hours` later */
const daysAgo = (days: number, hours = 0) => new Date(Math.floor(Date.now() / DAY_MS) * DAY_MS - days * DAY_MS + (20 + hours) * 3_600_000).toISOString()
const issuesOf = (body: unknown) => (body as { details: { issues: { path: string }[] } }).details.issues.map((issue) => issue.path)
const messageOf = (body: unknown) => (body as { message: string }).message

async function record(input: CreateGauge = gaugeInput()): Promise<Gauge> {
  const answer = await technician.post(open.path('/gauges'), input)
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return gaugeSchema.parse(answer.body)
}

async function counted(gaugeId: string, overrides: Partial<RecordCount> = {}): Promise<Gauge> {
  const answer = await technician.post(open.path(`/gauges/${gaugeId}/counts`), countInput(overrides))
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return gaugeSchema.parse(answer.body)
}

async function detail(gaugeId: string, at = ''): Promise<GaugeDetail> {
  const answer = await open.people['owner-rep'].get(open.path(`/gauges/${gaugeId}${at && `?at=${encodeURIComponent(at)}`}`))
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return gaugeDetailSchema.parse(answer.body)
}

describe('GET and POST /api/sites/:siteId/gauges', () => {
  it('are for those who work with the records; QC writes', async () => {
    const path = open.path('/gauges')
    expect((await app.visitor().get(path)).status).toBe(401)
    expect((await app.visitor().post(path, gaugeInput())).status).toBe(401)
    expect((await stranger.get(path)).status).toBe(404)
    expect((await stranger.post(path, gaugeInput())).status).toBe(404)
    expect((await open.people.operator.get(path)).status).toBe(403)
    for (const role of ['superintendent', 'owner-rep', 'operator'] as const) expect((await open.people[role].post(path, gaugeInput())).status).toBe(403)
    expect((await open.people.superintendent.get(path)).status).toBe(200)
  })

  it('refuse what no gauge is, each field named', async () => {
    const refused = async (input: unknown) => {
      const answer = await technician.post(open.path('/gauges'), input as object)
      expect(answer.status).toBe(400)
      return issuesOf(answer.body)
    }
    expect(await refused(gaugeInput({ serial: ' ' }))).toEqual(['body.serial'])
    expect(await refused(gaugeInput({}, { density: 0, moisture: -1 }))).toEqual(['body.calibration.density', 'body.calibration.moisture'])
    expect(await refused(gaugeInput({}, { dueOn: '2024-01-14' }))).toEqual(['body.calibration.dueOn'])
    expect(await refused(gaugeInput({}, { calibratedOn: '2091-01-01' }))).toEqual(['body.calibration.calibratedOn'])
    expect(await refused(gaugeInput({ leakTestedOn: '2091-01-01' }))).toEqual(['body.leakTestedOn'])
    expect((await technician.get(open.path('/gauges?at=yesterday'))).status).toBe(400)
  })

  it('keep a gauge with its calibration, once however often it is sent, its serial its own', async () => {
    const input = gaugeInput({ leakTestedOn: '2024-02-01' }, { dueOn: '2090-01-15' })
    const gauge = await record(input)
    expect(gauge).toMatchObject({ serial: input.serial, leakTestedOn: '2024-02-01', outage: null, corrections: [], check: { state: 'not-counted', reference: { from: 'calibration', density: 2_000, moisture: 600 }, count: null } })
    expect(gauge.calibration).toMatchObject({ calibratedOn: '2024-01-15', dueOn: '2090-01-15', density: 2_000, moisture: 600, recordedBy: technician.user.name })
    expect((await technician.post(open.path('/gauges'), input)).body).toEqual(gauge)
    const second = await technician.post(open.path('/gauges'), gaugeInput({ serial: input.serial }))
    expect(second.status).toBe(409)
    expect(messageOf(second.body)).toMatch(/in the register already\. Nothing was saved/)
    const { gauges } = gaugeListSchema.parse((await open.people['owner-rep'].get(open.path('/gauges'))).body)
    expect(gauges.filter(({ id }) => id === gauge.id)).toEqual([gauge])
  })
})

describe('the parts of a gauge', () => {
  it('are guarded, and are not found under a stranger’s site or another gauge', async () => {
    const gauge = await record()
    const other = await record()
    const count = countInput()
    await technician.post(open.path(`/gauges/${gauge.id}/counts`), count)
    const paths: [string, object][] = [
      [`/gauges/${gauge.id}/counts`, countInput()],
      [`/gauges/${gauge.id}/calibrations`, gaugeInput().calibration],
      [`/gauges/${gauge.id}/take-out`, { id: randomUUID(), happenedAt: daysAgo(1), reason: 'Dropped' }],
      [`/gauges/${gauge.id}/put-back`, { happenedAt: daysAgo(1), remarks: '' }],
      [`/gauges/${gauge.id}/corrections`, { id: randomUUID(), materialId: open.material.id, pairs: [{ oven: 12, gauge: 10 }], inForceFrom: daysAgo(1), remarks: '' }],
      [`/gauges/${gauge.id}/counts/${count.id}/void`, { reason: 'Wrong block' }],
      [`/gauges/${gauge.id}/corrections/${count.id}/withdraw`, { reason: 'Wrong block' }],
    ]
    for (const [path, body] of paths) {
      expect((await app.visitor().post(open.path(path), body)).status, path).toBe(401)
      expect((await stranger.post(open.path(path), body)).status, path).toBe(404)
      expect((await open.people['owner-rep'].post(open.path(path), body)).status, path).toBe(403)
      expect((await technician.post(open.path(path.replace(gauge.id, randomUUID())), body)).status, path).toBe(404)
      expect((await technician.post(open.path(path), {})).status, path).toBe(400)
    }
    expect((await technician.post(open.path(`/gauges/${other.id}/counts/${count.id}/void`), { reason: 'Wrong block' })).status).toBe(404)
    expect((await technician.get(open.path(`/gauges/${randomUUID()}`))).status).toBe(404)
    expect((await technician.patch(open.path(`/gauges/${randomUUID()}`), {})).status).toBe(404)
    expect((await open.people.superintendent.patch(open.path(`/gauges/${gauge.id}`), {})).status).toBe(403)
  })
})

describe('POST …/gauges/:id/counts', () => {
  it('judges the first four days by the calibration and the fifth by their average', async () => {
    const { id } = await record()
    for (const [index, density] of [2_005, 2_010, 2_015, 2_020].entries()) await counted(id, { density, countedAt: daysAgo(9 - index) })
    await counted(id, { density: 2_030, countedAt: daysAgo(5) })
    const { counts } = await detail(id)
    // 1 % of 2,000 and of the average 2,012.5 (gauge operating manual)
    expect(counts.map((count) => [count.good, count.reference?.from, count.reference?.density])).toEqual([...Array.from({ length: 4 }, () => [true, 'calibration', 2_000]), [true, 'average', 2_012.5]])
    expect(counts[4]).toMatchObject({ stands: true, countedBy: technician.user.name, void: null, day: workDay(Date.parse(daysAgo(5)), open.site.timeZone, open.site.dayCutHour) })
  })

  it('lets the last of a day stand, and the one before it again once that is void', async () => {
    const { id } = await record()
    const bad = await counted(id, { density: 2_100, countedAt: daysAgo(2) })
    expect(bad.check.state).toBe('not-counted')
    const recount = countInput({ density: 2_002, countedAt: daysAgo(2, 0.5) })
    await technician.post(open.path(`/gauges/${id}/counts`), recount)
    expect((await detail(id, daysAgo(2))).check).toMatchObject({ state: 'good', count: { id: recount.id } })
    const path = open.path(`/gauges/${id}/counts/${recount.id}/void`)
    expect((await technician.post(path, { reason: 'Block stood on steel' })).status).toBe(200)
    const after = await detail(id, daysAgo(2))
    expect(after.check).toMatchObject({ state: 'count-bad', count: { density: 2_100 } })
    expect(after.counts.find((count) => count.id === recount.id)).toMatchObject({ stands: false, void: { by: technician.user.name, reason: 'Block stood on steel' } })
    const twice = await technician.post(path, { reason: 'Block stood on steel' })
    expect([twice.status, messageOf(twice.body)]).toEqual([409, 'This count is void already. Nothing was changed.'])
  })

  it('keeps the five counts of a stability check, and refuses four, and a time to come', async () => {
    const { id } = await record()
    const five = Array.from({ length: 5 }, (_, index) => ({ density: 2_000 + index, moisture: 600 }))
    expect((await counted(id, { stability: five })).check.count?.stability).toEqual(five)
    const path = open.path(`/gauges/${id}/counts`)
    expect(issuesOf((await technician.post(path, countInput({ stability: five.slice(1) }))).body)).toEqual(['body.stability'])
    expect((await technician.post(path, countInput({ countedAt: daysAgo(-2) }))).status).toBe(400)
    expect(issuesOf((await technician.post(path, countInput({ density: 0 }))).body)).toEqual(['body.density'])
  })

  it('is one count however often it is sent, and another under the same id is refused', async () => {
    const { id } = await record()
    const input = countInput()
    const path = open.path(`/gauges/${id}/counts`)
    await technician.post(path, input)
    expect((await technician.post(path, input)).status).toBe(201)
    expect((await detail(id)).counts).toHaveLength(1)
    expect((await technician.post(path, { ...input, density: 2_001 })).status).toBe(409)
  })
})

describe('calibrations, times out of service, corrections', () => {
  it('makes a new calibration the reference from its day on', async () => {
    const { id } = await record()
    const today = new Date().toISOString().slice(0, 10)
    const yesterday = daysAgo(1).slice(0, 10)
    const answer = await technician.post(open.path(`/gauges/${id}/calibrations`), { id: randomUUID(), calibratedOn: yesterday, dueOn: today, density: 2_500, moisture: 650 })
    expect(answer.status, JSON.stringify(answer.body)).toBe(201)
    expect(gaugeSchema.parse(answer.body).check.reference).toMatchObject({ density: 2_500 })
    expect((await detail(id, daysAgo(3))).check.reference).toMatchObject({ density: 2_000 })
    expect((await detail(id)).calibrations).toHaveLength(2)
  })

  it('says that a calibration is past due', async () => {
    const { id, check } = await record(gaugeInput({}, { dueOn: '2024-06-01' }))
    expect(check).toMatchObject({ state: 'overdue' })
    expect((await counted(id)).check.state).toBe('overdue')
  })

  it('takes a gauge out of service once, and back not before that', async () => {
    const { id, serial } = await record()
    const out = () => technician.post(open.path(`/gauges/${id}/take-out`), { id: randomUUID(), happenedAt: daysAgo(3), reason: 'Run over by a water truck' })
    expect(gaugeSchema.parse((await out()).body)).toMatchObject({ outage: { reason: 'Run over by a water truck', until: null }, check: { state: 'out-of-service' } })
    expect(messageOf((await out()).body)).toBe(`Gauge ${serial} is out of service already. Nothing was changed.`)
    const back = (happenedAt: string) => technician.post(open.path(`/gauges/${id}/put-back`), { happenedAt, remarks: 'Leak test clean' })
    expect(issuesOf((await back(daysAgo(4))).body)).toEqual(['body.happenedAt'])
    expect(gaugeSchema.parse((await back(daysAgo(2))).body)).toMatchObject({ outage: null, check: { state: 'not-counted' } })
    expect((await back(daysAgo(2))).status).toBe(409)
    expect((await detail(id, daysAgo(3, 1))).check.state).toBe('out-of-service')
    expect((await technician.post(open.path(`/gauges/${id}/take-out`), { id: randomUUID(), happenedAt: daysAgo(3), reason: 'Again' })).status).toBe(409)
  })

  it('keeps the day of a leak test; what is left out stays', async () => {
    const { id, model } = await record()
    expect(gaugeSchema.parse((await technician.patch(open.path(`/gauges/${id}`), { leakTestedOn: '2024-03-01' })).body)).toMatchObject({ model, leakTestedOn: '2024-03-01' })
    expect(gaugeSchema.parse((await technician.patch(open.path(`/gauges/${id}`), { leakTestedOn: null })).body)).toMatchObject({ leakTestedOn: null })
    expect(issuesOf((await technician.patch(open.path(`/gauges/${id}`), { leakTestedOn: '2091-03-01' })).body)).toEqual(['body.leakTestedOn'])
  })

  it('averages the pairs of a moisture correction, the last of its material in force until it is withdrawn', async () => {
    const { id } = await record()
    const path = open.path(`/gauges/${id}/corrections`)
    const input = (pairs: { oven: number; gauge: number }[], days: number) => ({ id: randomUUID(), materialId: open.material.id, pairs, inForceFrom: daysAgo(days), remarks: '' })
    // gauge 10 %, oven 12 % gives +18.18
    await technician.post(path, input([{ oven: 12, gauge: 10 }], 5))
    const second = input([{ oven: 12, gauge: 10 }, { oven: 10, gauge: 10 }], 2)
    expect(gaugeSchema.parse((await technician.post(path, second)).body).corrections).toMatchObject([{ k: expect.closeTo(9.0909, 4), least: 0, materialName: open.material.name, inForce: true }])
    expect((await technician.post(`${path}/${second.id}/withdraw`, { reason: 'Oven was not dry' })).status).toBe(200)
    const { corrections } = await detail(id)
    expect(corrections.map((each) => [each.inForce, each.withdrawn?.reason ?? null])).toEqual([[false, 'Oven was not dry'], [true, null]])
    expect((await technician.post(`${path}/${second.id}/withdraw`, { reason: 'Oven was not dry' })).status).toBe(409)
    expect(issuesOf((await technician.post(path, { ...input([{ oven: 12, gauge: 10 }], 2), materialId: randomUUID() })).body)).toEqual(['body.materialId'])
    expect(issuesOf((await technician.post(path, input([], 2))).body)).toEqual(['body.pairs'])
  })
})
