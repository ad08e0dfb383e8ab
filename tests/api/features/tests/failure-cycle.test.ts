import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { GROUND_FLAGS } from '#shared/domain/ground-state.ts'
import type { Role } from '#shared/policies/role.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import { cellsIn, fieldWork, minutesAgo } from '#tests/factories/field-work.ts'
import { openSite, rowsOf } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { PASSING, SUSPECT, TOO_DRY, TOO_LOOSE, drySheet, middleOf, testInput } from '#tests/factories/test-input.ts'
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

describe('a failing test', () => {
  it('marks the ground nearer to it than to a pass, and issues a rework order over it', async () => {
    const failure = await work.passThenFail()
    expect(failure).toMatchObject({ outcome: 'fail', headline: 'Too loose, moisture in range', marked: 3, orderNumber: 'R-001' })
    const states = await statesOf(app, open)
    expect(cellsIn(states, 'rework')).toEqual([0, 1, 2])
    expect(cellsIn(states, 'meets-spec')).toEqual([3, 4, 5])
    const order = await work.orderOf(failure.orderId)
    expect(order).toMatchObject({ state: 'issued', causeTestId: failure.id, actions: ['too-loose'], headline: 'Too loose. Roll again.', lift: 1 })
    expect(await work.stepsOf(failure.orderId)).toEqual(['issued'])
    expect((await rowsOf(app.dataSource.manager, 'rework_cell', open.siteId)).map((row) => row.cell)).toEqual([0, 1, 2])
    const detail = await work.detailOf(failure.id)
    expect(detail.marks).toEqual([{ kind: 'fail', cells: [0, 1, 2] }])
    expect(detail.orderId).toBe(failure.orderId)
    const [lot] = await work.lots()
    expect(lot).toMatchObject({ standing: 'rework', required: 1, taken: 2, passing: 1, owed: 0 })
    const events = await open.people['qc-lead'].get(open.path(`/events?subjectType=order&subjectId=${failure.orderId}`))
    expect(events.body.events[0]).toMatchObject({ verb: 'order.issued', payload: { number: 'R-001', cause: failure.number, cells: ['A1', 'B1', 'C1'] } })
  })

  it('takes back a release that stood on that ground, and no other', async () => {
    await work.record({ at: middleOf(5), sampledAt: minutesAgo(50) })
    await releaseCells(app, open, [0, 1, 2, 3, 4, 5])
    expect(cellsIn(await statesOf(app, open), 'released')).toEqual([0, 1, 2, 3, 4, 5])
    await work.record({ at: middleOf(0), sheet: TOO_DRY })
    const states = await statesOf(app, open)
    expect(cellsIn(states, 'rework')).toEqual([0, 1, 2])
    expect(cellsIn(states, 'released')).toEqual([3, 4, 5])
  })

  it('where nothing is placed yet marks its own cell, which is rework once fill comes', async () => {
    const failure = await work.record({ at: middleOf(20), sheet: TOO_DRY })
    expect(failure.marked).toBe(1)
    expect((await work.orderOf(failure.orderId)).headline).toBe('Too dry. Add water.')
    await placeCells(app, open, [19, 20])
    expect((await statesOf(app, open))[20]).toBe('rework')
  })

  it('says what it would do while it is typed, and does just that', async () => {
    await work.record({ at: middleOf(5), sampledAt: minutesAgo(50) })
    const fail = { at: middleOf(0), sheet: TOO_LOOSE }
    const seen = await work.preview(fail)
    const [lot] = await work.lots()
    expect(seen).toMatchObject({ zoneId: lot?.zoneId, cell: 0, lotName: lot?.name, meets: [] })
    expect(seen.marks.map(({ kind, cells }) => ({ kind, cells }))).toEqual([{ kind: 'fail', cells: [0, 1, 2] }])
    const volumes = (await rowsOf(app.dataSource.manager, 'cell_lift', open.siteId)).filter((row) => Number(row.lift) === 1 && Number(row.cell) <= 2).map((row) => Number(row.volume_cm3))
    expect(volumes).toHaveLength(3)
    expect(seen.marks[0]?.volumeCm3).toBe(volumes.reduce((sum, volume) => sum + volume, 0))
    const saved = await work.record(fail)
    expect((await work.detailOf(saved.id)).marks).toEqual(seen.marks.map(({ kind, cells }) => ({ kind, cells })))
  })
})

describe('a passing test', () => {
  it('says while it is typed which cells it would make meet specification, and does', async () => {
    await placeCells(app, open, [6, 7, 8, 9, 10, 11])
    // 12 cells are 741 yd³, one test speaks for 500 yd³: eight whole cells round A1
    const seen = await work.preview()
    expect(seen.marks).toEqual([])
    expect(seen.meets.length).toBe(8)
    await work.record()
    expect(cellsIn(await statesOf(app, open), 'meets-spec')).toEqual([...seen.meets].sort((a, b) => a - b))
  })

  it('whose sheet is still empty shows what would meet if it passed; off the site there is nothing to say', async () => {
    const empty = await work.preview({ sheet: drySheet(0, 12) })
    expect(empty).toMatchObject({ marks: [], meets: [0, 1, 2, 3, 4, 5] })
    expect(await work.preview({ at: middleOf(0, -500) })).toEqual({ zoneId: null, cell: null, lotName: null, marks: [], meets: [], gauge: null })
    expect(await work.preview({ lift: 9 })).toMatchObject({ cell: 0, marks: [], meets: [] })
    expect((await work.preview({ purpose: 'judgement' })).meets).toEqual([])
  })
})

describe('retests', () => {
  it('turn the cycle: failed again the order is open again, passed it closes and the ground meets', async () => {
    const failure = await work.passThenFail()
    await reportRework(app, open, failure.orderId ?? '', await work.lotIds(), new Date(minutesAgo(30)))
    expect(cellsIn(await statesOf(app, open), 'awaiting-retest')).toEqual([0, 1, 2])

    const again = await work.record({ sheet: TOO_LOOSE, sampledAt: minutesAgo(20), follows: { testId: failure.id, kind: 'retest' } })
    expect(again).toMatchObject({ number: `${failure.number}-R1`, outcome: 'fail', orderId: failure.orderId })
    expect(await work.orderOf(failure.orderId)).toMatchObject({ state: 'issued', reportedAt: null, workingSince: null })
    expect(await work.stepsOf(failure.orderId)).toEqual(['issued', 'ready', 'reopened'])
    expect(cellsIn(await statesOf(app, open), 'rework')).toEqual([0, 1, 2])
    expect((await work.detailOf(failure.id)).current).toBe(false)

    await reportRework(app, open, failure.orderId ?? '', await work.lotIds(), new Date(minutesAgo(10)))
    const retest = { sheet: PASSING, sampledAt: minutesAgo(5), follows: { testId: again.id, kind: 'retest' as const } }
    const seen = await work.preview(retest)
    expect([...seen.meets].sort((a, b) => a - b)).toEqual([0, 1, 2])
    const passed = await work.record(retest)
    expect(passed).toMatchObject({ number: `${failure.number}-R2`, outcome: 'pass' })
    expect((await work.orderOf(failure.orderId)).state).toBe('closed')
    expect(await work.stepsOf(failure.orderId)).toEqual(['issued', 'ready', 'reopened', 'ready', 'closed'])
    expect(cellsIn(await statesOf(app, open), 'meets-spec')).toEqual([0, 1, 2, 3, 4, 5])
    const detail = await work.detailOf(passed.id)
    expect(detail.chain.map((entry) => entry.number)).toEqual([failure.number, `${failure.number}-R1`, `${failure.number}-R2`])
    expect(detail.flags).toEqual([])
    expect(detail.orderId).toBe(failure.orderId)
  })

  it('without rework reported are saved and flagged, and close nothing', async () => {
    const failure = await work.passThenFail()
    const retest = await work.record({ follows: { testId: failure.id, kind: 'retest' } })
    expect((await work.detailOf(retest.id)).flags.map((flag) => flag.code)).toEqual(['retest-without-rework'])
    expect((await work.orderOf(failure.orderId)).state).toBe('issued')
    expect(cellsIn(await statesOf(app, open), 'rework')).toEqual([0, 1, 2])
  })

  it('belong to the lift of the test they follow, come after it, and to its side', async () => {
    const failure = await work.passThenFail()
    const follows = { testId: failure.id, kind: 'retest' as const }
    const refusal = async (overrides: Partial<CreateTest>, role: Role = 'technician') => {
      const answer = await open.people[role].post(open.path('/tests'), testInput(open, { follows, ...overrides }))
      expect(answer.status).toBe(400)
      return (answer.body as { message: string }).message
    }
    expect(await refusal({ lift: 2 })).toMatch(/was taken in lift 1/)
    expect(await refusal({ sampledAt: minutesAgo(55) })).toMatch(/was sampled later than this/)
    expect(await refusal({ purpose: 'verification' }, 'owner-rep')).toMatch(/is a required test/)
  })
})

describe('a suspect test', () => {
  it('marks its ground suspect until a re-run within a metre settles it', async () => {
    const suspect = await work.record({ sheet: SUSPECT, sampledAt: minutesAgo(20) })
    expect(suspect).toMatchObject({ outcome: 'suspect', marked: 6, orderId: null })
    expect(cellsIn(await statesOf(app, open), 'suspect')).toEqual([0, 1, 2, 3, 4, 5])
    expect((await work.lots())[0]).toMatchObject({ reruns: 1, taken: 0, standing: 'suspect' })
    // 2 ft are within 1 m, 4 ft are not
    const rerun = await work.record({ at: middleOf(0, 2), follows: { testId: suspect.id, kind: 'rerun' } })
    expect(rerun.number).toBe(`${suspect.number}-C1`)
    expect((await work.detailOf(rerun.id)).flags).toEqual([])
    expect(cellsIn(await statesOf(app, open), 'meets-spec')).toEqual([0, 1, 2, 3, 4, 5])
  })

  it('re-run elsewhere is flagged', async () => {
    const suspect = await work.record({ sheet: SUSPECT, sampledAt: minutesAgo(20) })
    const rerun = await work.record({ at: middleOf(0, 4), follows: { testId: suspect.id, kind: 'rerun' } })
    expect((await work.detailOf(rerun.id)).flags.map((flag) => flag.code)).toEqual(['rerun-elsewhere'])
  })

  it('a result that is not in doubt is not run again', async () => {
    const failure = await work.passThenFail()
    const answer = await open.people.technician.post(open.path('/tests'), testInput(open, { follows: { testId: failure.id, kind: 'rerun' } }))
    expect(answer.status).toBe(400)
    expect(answer.body.message).toMatch(/is not in doubt/)
  })

  it('below the density limit is a failure until a re-run and a recorded cause refute it', async () => {
    // 92 % of the maximum at 22 % moisture: above the zero-air-voids line of Gs 2.70
    const doubtful = { sheet: drySheet(110.4, 22), sampledAt: minutesAgo(20) }
    const first = await work.record(doubtful)
    expect(first).toMatchObject({ outcome: 'suspect', marked: 6, orderNumber: 'R-001' })
    expect(cellsIn(await statesOf(app, open), 'rework')).toEqual([0, 1, 2, 3, 4, 5])
    const rerun = await work.record({ follows: { testId: first.id, kind: 'rerun' } })
    expect((await work.detailOf(rerun.id)).flags.map((flag) => flag.code)).toEqual(['cause-not-recorded'])
    expect((await work.orderOf(first.orderId)).state).toBe('issued')
    expect(cellsIn(await statesOf(app, open), 'rework')).toEqual([0, 1, 2, 3, 4, 5])
  })

  it('refuted by a re-run and its cause gives its order up', async () => {
    const first = await work.record({ sheet: drySheet(110.4, 22), sampledAt: minutesAgo(20) })
    await work.record({ follows: { testId: first.id, kind: 'rerun' }, remarks: 'Moisture read in the wrong mode' })
    expect((await work.orderOf(first.orderId)).state).toBe('withdrawn')
    expect(cellsIn(await statesOf(app, open), 'meets-spec')).toEqual([0, 1, 2, 3, 4, 5])
  })
})

describe("the owner's tests", () => {
  const held = async () => (await rowsOf(app.dataSource.manager, 'cell_lift', open.siteId)).filter((row) => Number(row.lift) === 1 && Number(row.flags) & GROUND_FLAGS.hold).map((row) => row.cell)

  it('failing on released ground put it on hold, and take nothing back until a retest decides', async () => {
    await work.record({ at: middleOf(5), sampledAt: minutesAgo(50) })
    await releaseCells(app, open, [0, 1, 2, 3, 4, 5])
    const verification = await work.record({ purpose: 'verification', sheet: TOO_LOOSE, sampledAt: minutesAgo(20) }, 'owner-rep')
    expect(verification).toMatchObject({ outcome: 'fail', marked: 3, orderId: null })
    expect((await work.detailOf(verification.id)).marks).toEqual([{ kind: 'hold', cells: [0, 1, 2] }])
    expect(cellsIn(await statesOf(app, open), 'released')).toEqual([0, 1, 2, 3, 4, 5])
    expect(await held()).toEqual([0, 1, 2])
    await work.record({ purpose: 'verification', follows: { testId: verification.id, kind: 'retest' } }, 'owner-rep')
    expect(await held()).toEqual([])
  })

  it('failing elsewhere send the ground to rework and never count toward the frequency', async () => {
    const verification = await work.record({ purpose: 'verification', sheet: TOO_LOOSE }, 'owner-rep')
    expect(verification.orderNumber).toBe('R-001')
    expect(cellsIn(await statesOf(app, open), 'rework')).toEqual([0, 1, 2, 3, 4, 5])
    expect((await work.lots())[0]).toMatchObject({ required: 1, taken: 0, owed: 1 })
  })

  it('are voided by the owner’s representative only', async () => {
    const { id } = await work.record({ purpose: 'verification', sheet: TOO_LOOSE }, 'owner-rep')
    const lead = await open.people['qc-lead'].post(open.path(`/tests/${id}/void`), { reason: 'Not ours to void' })
    expect(lead.status).toBe(403)
    await work.voidTest(id, 'owner-rep')
    expect(cellsIn(await statesOf(app, open), 'awaiting-test')).toEqual([0, 1, 2, 3, 4, 5])
  })
})

describe('two people saving into one lot at once', () => {
  it('are both kept, with numbers of their own', async () => {
    await placeCells(app, open, [6, 7, 8, 9, 10, 11])
    const [a, b] = await Promise.all([work.record({ at: middleOf(0) }), work.record({ at: middleOf(11), sheet: TOO_LOOSE }, 'qc-lead')])
    expect([a.number, b.number].sort()).toEqual(['T-0001', 'T-0002'])
    expect((await work.lots())[0]).toMatchObject({ required: 2, taken: 2, passing: 1, standing: 'rework' })
  })
})
