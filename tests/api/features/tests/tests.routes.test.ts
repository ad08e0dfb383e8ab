import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createTestSchema, recordTestAnswerSchema, testDetailSchema, testListSchema } from '#shared/schemas/field-test.ts'
import type { CreateTest, RecordTestAnswer, TestDetail } from '#shared/schemas/field-test.ts'
import { curveInput } from '#tests/factories/curve.ts'
import { openSite, rowsOf } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { GROUND_UM, LIFT_UM } from '#tests/factories/site-input.ts'
import { PASSING, TOO_LOOSE, drySheet, middleOf, testInput } from '#tests/factories/test-input.ts'
import { placeCells, statesOf } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let other: OpenSite
let technician: SignedIn

beforeAll(async () => {
  app = await testApp()
  open = await openSite(app)
  other = await openSite(app)
  technician = open.people.technician
  await placeCells(app, open, [0, 1, 2, 3, 4, 5])
})

afterAll(() => app.end())

const issuesOf = (body: unknown) => (body as { details: { issues: { path: string; message: string }[] } }).details.issues
const pathsOf = (body: unknown) => issuesOf(body).map((issue) => issue.path)
const input = (overrides: Partial<CreateTest> = {}) => testInput(open, overrides)

async function record(overrides: Partial<CreateTest> = {}): Promise<RecordTestAnswer> {
  const answer = await technician.post(open.path('/tests'), input(overrides))
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return recordTestAnswerSchema.parse(answer.body)
}

async function detailOf(id: string): Promise<TestDetail> {
  const answer = await technician.get(open.path(`/tests/${id}`))
  expect(answer.status).toBe(200)
  return testDetailSchema.parse(answer.body)
}

describe('who may record, see and void tests', () => {
  it('a signed-out person gets 401, a stranger 404', async () => {
    const stranger = await app.signedIn()
    const paths = ['/tests', `/tests/${randomUUID()}`]
    for (const path of paths) {
      expect((await app.visitor().get(open.path(path))).status).toBe(401)
      expect((await stranger.get(open.path(path))).status).toBe(404)
    }
    for (const path of ['/tests', '/tests/preview', `/tests/${randomUUID()}/void`]) {
      expect((await app.visitor().post(open.path(path), input())).status).toBe(401)
      expect((await stranger.post(open.path(path), input())).status).toBe(404)
    }
  })

  it('an operator sees no registers, and records nothing', async () => {
    const { operator } = open.people
    expect((await operator.get(open.path('/tests'))).status).toBe(403)
    expect((await operator.post(open.path('/tests'), input())).status).toBe(403)
    expect((await operator.post(open.path('/tests/preview'), input())).status).toBe(403)
  })

  it('each side records tests of its own purposes', async () => {
    expect((await open.people.superintendent.post(open.path('/tests'), input())).status).toBe(403)
    const wrong = await open.people['owner-rep'].post(open.path('/tests'), input({ purpose: 'required' }))
    expect(wrong.status).toBe(403)
    expect(wrong.body.message).toBe('A required test is recorded by quality control. Nothing was saved; what you entered was kept.')
    expect((await technician.post(open.path('/tests'), input({ purpose: 'verification' }))).status).toBe(403)
    expect((await open.people['owner-rep'].post(open.path('/tests'), input({ purpose: 'referee', at: middleOf(29) }))).status).toBe(201)
    expect((await technician.post(open.path('/tests'), input({ purpose: 'referee', at: middleOf(29) }))).status).toBe(201)
  })

  it('a test of another site is not there', async () => {
    const elsewhere = await other.people.technician.post(other.path('/tests'), testInput(other))
    expect(elsewhere.status).toBe(201)
    const { id } = elsewhere.body as RecordTestAnswer
    expect((await technician.get(open.path(`/tests/${id}`))).status).toBe(404)
    expect((await open.people['qc-lead'].post(open.path(`/tests/${id}/void`), { reason: 'not ours' })).status).toBe(404)
    const follows = await technician.post(open.path('/tests'), input({ follows: { testId: id, kind: 'retest' } }))
    expect(follows.status).toBe(400)
    expect(pathsOf(follows.body)).toEqual(['body.follows'])
  })
})

describe('POST /api/sites/:siteId/tests, a test that meets', () => {
  it('freezes verdict, criteria and curve, and shows them with the raw sheet', async () => {
    const at = middleOf(4, 7, -3)
    const answer = await record({ at, sheet: drySheet(116.4, 13), remarks: 'Beside the haul road' })
    // 116.4 / 120.0 = 97.0 %, 1 point wet of 12.0 %
    expect(answer).toMatchObject({ outcome: 'pass', headline: 'Meets spec', marked: 0, orderId: null, orderNumber: null })
    expect(answer.number).toMatch(/^T-\d{4}$/)
    const detail = await detailOf(answer.id)
    expect(detail.rc).toBeCloseTo(97, 9)
    expect(detail.moistureDeviation).toBeCloseTo(1, 9)
    expect(detail).toMatchObject({
      cell: 4,
      lift: 1,
      easting: at.easting,
      northing: at.northing,
      sheet: drySheet(116.4, 13),
      remarks: 'Beside the haul road',
      current: true,
      superseded: false,
      voided: false,
      curveCode: open.curve.code,
      recordedBy: { id: technician.user.id, name: technician.user.name },
      follows: null,
      marks: [],
      orderId: null,
      void: null,
    })
    expect(detail.verdict.against.criteria).toEqual([
      { kind: 'rc-min', text: '95' },
      { kind: 'moisture-band', lowText: '-2', highText: '2' },
    ])
    expect(detail.verdict.against.curve.maxDryDensity).toBe(open.curve.pair?.maxDryDensity)
    expect(detail.chain.map((entry) => entry.id)).toEqual([answer.id])
    // six cells of 61.7 yd³ are less than the 500 yd³ a test speaks for
    expect(detail.speaksFor.map((share) => share.cell)).toEqual([0, 1, 2, 3, 4, 5])
    expect(await statesOf(app, open)).toEqual({ 0: 'meets-spec', 1: 'meets-spec', 2: 'meets-spec', 3: 'meets-spec', 4: 'meets-spec', 5: 'meets-spec' })
  })

  it('is written to the audit trail with its sheet, and raises the revision by one', async () => {
    const before = await record({ purpose: 'judgement' })
    const after = await record({ purpose: 'judgement', sheet: drySheet(118, 12.4) })
    expect(after.revision).toBe(before.revision + 1)
    const events = await technician.get(open.path(`/events?subjectType=test&subjectId=${after.id}`))
    expect(events.body.events).toHaveLength(1)
    expect(events.body.events[0]).toMatchObject({ verb: 'test.recorded', payload: { number: after.number, sheet: drySheet(118, 12.4), cell: 'A1', marks: [], verdict: { outcome: 'pass' } } })
  })

  it('sent twice is one test with one answer; another sheet under its id is refused', async () => {
    const body = input({ purpose: 'judgement' })
    const first = await technician.post(open.path('/tests'), body)
    const second = await technician.post(open.path('/tests'), body)
    expect(first.status).toBe(201)
    expect(second.body).toEqual(first.body)
    expect((await rowsOf(app.dataSource.manager, 'field_test', open.siteId)).filter((row) => row.id === body.id)).toHaveLength(1)
    const changed = await technician.post(open.path('/tests'), { ...body, sheet: TOO_LOOSE })
    expect(changed.status).toBe(409)
    expect(changed.body.code).toBe('id_reused')
  })

  it('is saved before any fill is recorded there, and speaks for the fill when it comes', async () => {
    const waiting = await openSite(app)
    const answer = await waiting.people.technician.post(waiting.path('/tests'), testInput(waiting, { at: middleOf(8) }))
    expect(answer.status).toBe(201)
    await placeCells(app, waiting, [7, 8])
    expect(await statesOf(app, waiting)).toEqual({ 7: 'meets-spec', 8: 'meets-spec' })
  })

  it('by a curve that is not approved is flagged', async () => {
    const draft = await technician.post(open.path('/curves'), curveInput({ materialId: open.material.id }))
    const answer = await record({ purpose: 'judgement', curveId: (draft.body as { id: string }).id })
    expect((await detailOf(answer.id)).flags.map((flag) => flag.code)).toContain('curve-draft')
  })
})

describe('POST /api/sites/:siteId/tests, input that cannot be used', () => {
  const refused = async (overrides: Partial<CreateTest> | Record<string, unknown>, path: string) => {
    const before = await rowsOf(app.dataSource.manager, 'field_test', open.siteId)
    const answer = await technician.post(open.path('/tests'), { ...input(), ...overrides })
    expect(answer.status, JSON.stringify(answer.body)).toBe(400)
    expect(pathsOf(answer.body)).toContain(path)
    expect(await rowsOf(app.dataSource.manager, 'field_test', open.siteId)).toHaveLength(before.length)
    return issuesOf(answer.body).find((issue) => issue.path === path)?.message
  }
  const oven = (wetAndTin: number, dryAndTin: number, tin: number): CreateTest['sheet'] => ({
    method: 'plain',
    densityUnit: 'pcf',
    densityIs: 'wet',
    density: 130,
    moisture: { method: 'oven', massUnit: 'g', wetAndTin, dryAndTin, tin },
  })

  it('a reading that is no number names its field', async () => {
    // JSON has no NaN: it arrives as null
    expect(await refused({ sheet: { ...PASSING, density: Number.NaN } }, 'body.sheet.density')).toBe('Give a number')
  })

  it('a negative density, a negative mass and a dry sample heavier than the wet one name their fields', async () => {
    expect(await refused({ sheet: drySheet(-3, 12) }, 'body.sheet.density')).toBe('The dry density must be above zero.')
    await refused({ sheet: oven(320, 290, -30) }, 'body.sheet.moisture.tin')
    await refused({ sheet: oven(290, 320, 30) }, 'body.sheet.moisture.dryAndTin')
  })

  it('a density no soil has is refused with both units', async () => {
    expect(await refused({ sheet: drySheet(1_176, 12) }, 'body.sheet.density')).toMatch(/heavier than solid rock/)
  })

  it('oversize that the curve cannot be corrected for is refused', async () => {
    expect(await refused({ oversizePercent: 12 }, 'body.oversizePercent')).toMatch(/specific gravity of its stones/)
  })

  it('a place off the site is refused', async () => {
    expect(await refused({ at: middleOf(0, -30) }, 'body.at')).toBe('That place is outside every zone of this site. Check easting and northing.')
    await refused({ at: { easting: 0, northing: 0 } }, 'body.at')
    await refused({ at: { easting: 1e308, northing: -1e308 } }, 'body.at')
  })

  it('a lift that is not planned there is refused with those that are', async () => {
    expect(await refused({ lift: 9 }, 'body.lift')).toBe('Lift 9 is not planned in A1. Its lifts are 1 to 4. Choose another lift or place.')
  })

  it('a curve of another site is refused', async () => {
    await refused({ curveId: other.curve.id }, 'body.curveId')
  })

  it('a time to come and a text of a megabyte are refused', async () => {
    expect((await technician.post(open.path('/tests'), input({ sampledAt: '2999-01-01T00:00:00.000Z' }))).status).toBe(400)
    await refused({ remarks: 'x'.repeat(100_000) }, 'body.remarks')
    expect((await technician.post(open.path('/tests'), input({ remarks: 'x'.repeat(1_000_000) }))).status).toBe(413)
  })
})

describe('the lift of a test by its elevation', () => {
  const inLift = (lift: number, intoUm: number): Partial<CreateTest> => ({ purpose: 'judgement', surfaceUm: GROUND_UM + lift * LIFT_UM, depthUm: intoUm })

  it('that disagrees with the lift chosen is asked about, not guessed', async () => {
    const body = input(inLift(2, LIFT_UM))
    const asked = await technician.post(open.path('/tests'), body)
    expect(asked.status).toBe(409)
    expect(asked.body).toMatchObject({ code: 'lift_differs', details: { lift: 2 } })
    const above = await technician.post(open.path('/tests'), input(inLift(9, LIFT_UM)))
    expect(above.body).toMatchObject({ code: 'lift_differs', details: { lift: null } })
    const confirmed = await technician.post(open.path('/tests'), { ...body, liftConfirmed: true })
    expect(confirmed.status).toBe(201)
    expect((await detailOf(body.id)).flags.map((flag) => flag.code)).toContain('lift-confirmed')
  })

  it('that agrees is saved; a depth that stops short or goes through is flagged', async () => {
    const codes = async (intoUm: number) => (await detailOf((await record(inLift(1, intoUm))).id)).flags.map((flag) => flag.code)
    expect(await codes(LIFT_UM)).toEqual([])
    expect(await codes(LIFT_UM / 2)).toEqual(['short-of-layer'])
    expect(await codes(LIFT_UM + 50_800)).toEqual(['into-layer-below'])
  })
})

describe('GET /api/sites/:siteId/tests', () => {
  it('lists by lift, cell, outcome, currency and search, newest first, a page at a time', async () => {
    const listed = await openSite(app)
    const own = listed.people.technician
    await placeCells(app, listed, [0, 1, 2, 3])
    const ids: string[] = []
    for (const overrides of [{}, { at: middleOf(3), sheet: TOO_LOOSE }, { at: middleOf(3), lift: 2 }]) {
      const body = testInput(listed, overrides)
      ids.push(body.id)
      expect((await own.post(listed.path('/tests'), body)).status).toBe(201)
    }
    const list = async (query: string) => testListSchema.parse((await own.get(listed.path(`/tests${query}`))).body)
    const all = await list('')
    expect(all.total).toBe(3)
    expect(all.tests.map((test) => test.id)).toEqual([...ids].reverse())
    expect(all.tests.map((test) => test.seq)).toEqual([3, 2, 1])
    expect((await list('?lift=1')).tests.map((test) => test.id)).toEqual([ids[1], ids[0]])
    expect((await list('?cell=3&outcome=fail')).tests.map((test) => test.id)).toEqual([ids[1]])
    expect((await list('?search=T-0003')).tests.map((test) => test.id)).toEqual([ids[2]])
    expect((await list('?search=%25')).total).toBe(0)
    const page = await list('?limit=1&offset=1')
    expect(page.tests.map((test) => test.id)).toEqual([ids[1]])
    expect(page.total).toBe(3)
    const lotId = all.tests[2]?.lotId
    expect((await list(`?lotId=${lotId}`)).tests.map((test) => test.id)).toEqual([ids[1], ids[0]])
    expect(all.tests[0]?.lotId).toBeNull()
    expect((await own.get(listed.path('/tests?limit=0'))).status).toBe(400)
  })
})

it('the built input is what the schema takes', () => {
  expect(createTestSchema.parse(input())).toMatchObject({ lift: 1, sheet: PASSING })
})
