import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { releaseCheckSchema } from '#shared/schemas/release.ts'
import { testDetailSchema, testListSchema, testPreviewSchema, type CreateTest } from '#shared/schemas/field-test.ts'
import { countInput, gaugeInput, gaugeSheet } from '#tests/factories/gauge.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { testInput } from '#tests/factories/test-input.ts'
import { placeCells } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let technician: SignedIn

beforeAll(async () => {
  app = await testApp()
})

beforeEach(async () => {
  open = await openSite(app)
  technician = open.people.technician
  await placeCells(app, open, [0])
})

afterAll(() => app.end())

const messageOf = (body: unknown) => (body as { message: string }).message
const post = async (path: string, body: object, status = 201) => {
  const answer = await technician.post(open.path(path), body)
  expect(answer.status, JSON.stringify(answer.body)).toBe(status)
  return answer.body as { id: string; number: string }
}
const register = async (...input: Parameters<typeof gaugeInput>) => (await post('/gauges', gaugeInput(...input))).id
const recordTest = (gaugeId: string | undefined, overrides: Partial<CreateTest> = {}) => post('/tests', testInput(open, { sheet: gaugeSheet(gaugeId), ...overrides }))
const release = () => open.people['qc-lead'].post(open.path('/releases'), { id: randomUUID(), zoneId: open.site.zones[0]?.id, lift: 1, cells: [0], happenedAt: new Date().toISOString(), overrideReason: null, remarks: '' })

async function check() {
  const answer = await technician.post(open.path('/releases/check'), { zoneId: open.site.zones[0]?.id, lift: 1, cells: [0] })
  const { red, amber, overridable } = releaseCheckSchema.parse(answer.body)
  // the foundation of these cells was inspected elsewhere, which is said of every one of them
  return { red: red.map((finding) => finding.code), amber: amber.map((finding) => finding.code).filter((code) => code !== 'below-unresolved'), overridable, words: red[0]?.message }
}

async function detail(id: string) {
  return testDetailSchema.parse((await technician.get(open.path(`/tests/${id}`))).body)
}

describe('a test read with a gauge of the register', () => {
  it('holds its release until a good count of that day is there, and again when it is voided', async () => {
    const gaugeId = await register({ serial: '4127' })
    const test = await recordTest(gaugeId)
    expect(await check()).toMatchObject({ red: ['gauge-not-checked'], overridable: false, words: expect.stringMatching(new RegExp(`^${test.number} rests on a gauge that was not checked\\. Gauge 4127 has no standard count on `)) })
    expect((await detail(test.id))).toMatchObject({ flagged: true, gauge: { gaugeId, serial: '4127', state: 'not-counted' } })
    const refused = await release()
    expect(refused.status).toBe(409)
    expect(messageOf(refused.body)).toContain(test.number)

    const bad = countInput({ density: 2_100 })
    await post(`/gauges/${gaugeId}/counts`, bad)
    expect((await check()).red).toEqual(['gauge-not-checked'])
    expect((await detail(test.id)).gauge?.state).toBe('count-bad')

    const good = countInput({ countedAt: new Date(Date.now() - 50_000).toISOString() })
    await post(`/gauges/${gaugeId}/counts`, good)
    expect(await check()).toMatchObject({ red: [], amber: [] })
    expect(await detail(test.id)).toMatchObject({ gauge: { state: 'good' } })

    await post(`/gauges/${gaugeId}/counts/${good.id}/void`, { reason: 'Block on wet sand' }, 200)
    expect((await check()).red).toEqual(['gauge-not-checked'])
    expect((await release()).status).toBe(409)
    await post(`/gauges/${gaugeId}/counts/${bad.id}/void`, { reason: 'Block on wet sand' }, 200)
    expect((await detail(test.id)).gauge?.state).toBe('not-counted')
    await post(`/gauges/${gaugeId}/counts`, countInput({ countedAt: new Date(Date.now() - 50_000).toISOString() }))
    expect((await release()).status).toBe(201)
  })

  it('holds it while the gauge is past its calibration, or was out of service', async () => {
    const overdue = await register({}, { dueOn: '2024-06-01' })
    await post(`/gauges/${overdue}/counts`, countInput())
    const test = await recordTest(overdue)
    expect((await detail(test.id)).gauge?.state).toBe('overdue')
    expect((await check()).red).toEqual(['gauge-not-checked'])
    await post(`/gauges/${overdue}/calibrations`, { id: randomUUID(), calibratedOn: '2024-06-02', dueOn: null, density: 2_000, moisture: 600 })
    expect((await check()).red).toEqual([])
    await post(`/gauges/${overdue}/take-out`, { id: randomUUID(), happenedAt: new Date(Date.now() - 3_600_000).toISOString(), reason: 'Dropped' })
    expect((await detail(test.id)).gauge?.state).toBe('out-of-service')
    expect((await check()).red).toEqual(['gauge-not-checked'])
  })

  it('is told in the preview and in the register', async () => {
    const gaugeId = await register()
    const { purpose, follows, at, lift, sampledAt, curveId, oversizePercent, sheet } = testInput(open, { sheet: gaugeSheet(gaugeId) })
    const preview = async (asked: object) => testPreviewSchema.parse((await technician.post(open.path('/tests/preview'), { purpose, follows, at, lift, sampledAt, curveId, oversizePercent, ...asked })).body).gauge
    expect(await preview({ sheet })).toMatchObject({ gaugeId, state: 'not-counted' })
    expect(await preview({ sheet: gaugeSheet() })).toMatchObject({ gaugeId: null, state: 'not-named' })
    expect(await preview({ sheet: testInput(open).sheet })).toBeNull()
    // a judgement test is not asked for a stake, and carries no other flag
    const test = await recordTest(gaugeId, { purpose: 'judgement' })
    const listed = async () => testListSchema.parse((await technician.get(open.path('/tests'))).body).tests.map((row) => [row.id, row.flagged])
    expect(await listed()).toEqual([[test.id, true]])
    await post(`/gauges/${gaugeId}/counts`, countInput())
    expect(await preview({ sheet })).toMatchObject({ gaugeId, state: 'good' })
    expect(await listed()).toEqual([[test.id, false]])
  })
})

describe('a gauge test that names no gauge', () => {
  it('is taken where the site has no register, flagged, and holds no release', async () => {
    const test = await recordTest(undefined)
    expect(await detail(test.id)).toMatchObject({ flagged: true, gauge: { state: 'not-named' } })
    expect(await check()).toMatchObject({ red: [], amber: ['gauge-not-named'] })
    expect((await release()).status).toBe(201)
  })

  it('is refused once there is a register, for its density and for its moisture', async () => {
    await register()
    const refused = async (sheet: CreateTest['sheet']) => {
      const answer = await technician.post(open.path('/tests'), testInput(open, { sheet }))
      return [answer.status, (answer.body as { details: { issues: { path: string }[] } }).details.issues.map((issue) => issue.path)]
    }
    expect(await refused(gaugeSheet())).toEqual([400, ['body.sheet.gaugeId']])
    expect(await refused({ method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: 117.6, moisture: { method: 'gauge', densityUnit: 'pcf', moistureDensity: 14.1, correctionK: 0 } })).toEqual([400, ['body.sheet.moisture.gaugeId']])
    expect(await refused(gaugeSheet(randomUUID()))).toEqual([400, ['body.sheet.gaugeId']])
    const owners = await open.people['owner-rep'].post(open.path('/tests'), testInput(open, { sheet: gaugeSheet(), purpose: 'verification' }))
    expect(owners.status, JSON.stringify(owners.body)).toBe(201)
  })
})
