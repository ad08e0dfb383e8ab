import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { cellsIn, fieldWork, minutesAgo } from '#tests/factories/field-work.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { TOO_LOOSE, middleOf } from '#tests/factories/test-input.ts'
import { placeCells, releaseCells, reportRework, statesOf } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let work: ReturnType<typeof fieldWork>

beforeAll(async () => {
  app = await testApp()
})

/** Row 1 of the small site, A1 to F1, placed at lift 1: 370 yd³, one test's worth. */
beforeEach(async () => {
  open = await openSite(app)
  work = fieldWork(app, open)
  await placeCells(app, open, [0, 1, 2, 3, 4, 5])
})

afterAll(() => app.end())

describe('POST /api/sites/:siteId/tests/:id/void', () => {
  it('takes a failure out with its order, keeps its number, and says so among the exceptions', async () => {
    const failure = await work.passThenFail()
    expect((await open.people.technician.post(open.path(`/tests/${failure.id}/void`), { reason: 'Not allowed to' })).status).toBe(403)
    expect((await open.people['owner-rep'].post(open.path(`/tests/${failure.id}/void`), { reason: 'Not allowed to' })).status).toBe(403)
    expect((await open.people['qc-lead'].post(open.path(`/tests/${failure.id}/void`), { reason: '' })).status).toBe(400)
    expect(await work.voidTest(failure.id)).toMatchObject({ number: failure.number, currentId: null })
    expect((await work.orderOf(failure.orderId)).state).toBe('withdrawn')
    expect(await work.stepsOf(failure.orderId)).toEqual(['issued', 'withdrawn'])
    expect(cellsIn(await statesOf(app, open), 'meets-spec')).toEqual([0, 1, 2, 3, 4, 5])
    const detail = await work.detailOf(failure.id)
    expect(detail).toMatchObject({ voided: true, current: false, speaksFor: [], void: { reason: 'Wrong sheet copied', by: { id: open.people['qc-lead'].user.id } } })
    const events = await open.people['qc-lead'].get(open.path(`/events?subjectType=test&subjectId=${failure.id}`))
    expect(events.body.events[0]).toMatchObject({ verb: 'test.voided', payload: { number: failure.number, exception: true, reason: 'Wrong sheet copied' } })
    const twice = await open.people['qc-lead'].post(open.path(`/tests/${failure.id}/void`), { reason: 'Once more' })
    expect(twice.status).toBe(409)
    const next = await work.record({ at: middleOf(3) })
    expect(next.number).toBe('T-0003')
  })

  it('takes back a release that stood on the result', async () => {
    const pass = await work.record({ sampledAt: minutesAgo(20) })
    await releaseCells(app, open, [0, 1, 2, 3, 4, 5])
    await work.voidTest(pass.id)
    expect(cellsIn(await statesOf(app, open), 'awaiting-test')).toEqual([0, 1, 2, 3, 4, 5])
    expect((await work.lots())[0]).toMatchObject({ owed: 1, taken: 0, standing: 'owes' })
  })

  it('of a failing retest gives the order back as it was: rework reported, waiting for its retest', async () => {
    const failure = await work.passThenFail()
    await reportRework(app, open, failure.orderId ?? '', await work.lotIds(), new Date(minutesAgo(30)))
    const again = await work.record({ sheet: TOO_LOOSE, sampledAt: minutesAgo(20), follows: { testId: failure.id, kind: 'retest' } })
    expect(await work.voidTest(again.id)).toMatchObject({ currentId: failure.id })
    expect(await work.orderOf(failure.orderId)).toMatchObject({ state: 'ready', causeTestId: failure.id })
    expect(cellsIn(await statesOf(app, open), 'awaiting-retest')).toEqual([0, 1, 2])
    const next = await work.record({ sampledAt: minutesAgo(10), follows: { testId: failure.id, kind: 'retest' } })
    expect(next.number).toBe(`${failure.number}-R2`)
    expect((await work.orderOf(failure.orderId)).state).toBe('closed')
  })

  it('of the pass that closed an order opens it again', async () => {
    const failure = await work.passThenFail()
    await reportRework(app, open, failure.orderId ?? '', await work.lotIds(), new Date(minutesAgo(30)))
    const passed = await work.record({ sampledAt: minutesAgo(20), follows: { testId: failure.id, kind: 'retest' } })
    expect((await work.orderOf(failure.orderId)).state).toBe('closed')
    await work.voidTest(passed.id)
    expect(await work.orderOf(failure.orderId)).toMatchObject({ state: 'ready', closedAt: null })
    expect(cellsIn(await statesOf(app, open), 'awaiting-retest')).toEqual([0, 1, 2])
  })
})
