import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { findDifferences } from '#api/features/ground/recompute.queries.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { decodePatch, decodeSheet } from '#shared/ground-codec.ts'
import { groundStateOf } from '#shared/domain/ground-state.ts'
import { cellsRing, siteInput, zoneInput } from '#tests/factories/site-input.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

let app: TestApp

beforeAll(async () => {
  app = await testApp()
})
afterAll(() => app.end())

const WHOLE = 15
const BLOCK = [0, 1, 2, 6, 7, 8]

async function ok<T = { id: string; number: string; revision: number; cells: number }>(request: ReturnType<SignedIn['post']>): Promise<T> {
  const { status, body } = await request
  expect(body).not.toHaveProperty('code')
  expect([200, 201]).toContain(status)
  return body as T
}

const now = () => new Date().toISOString()

/** Four small cells' worth of work: inspect, release the foundation, place a lift. */
async function place(open: OpenSite, cells: readonly number[], lift: number, coverReason: string | null = null) {
  return ok(
    open.people.superintendent.post(open.path('/placements'), {
      id: randomUUID(),
      zoneId: open.site.zones[0]!.id,
      lift,
      cells: cells.map((cell) => ({ cell, quarters: WHOLE })),
      materialId: open.material.id,
      happenedAt: now(),
      loads: 20,
      loadVolumeCm3: 12 * 764_555,
      looseThicknessUm: 254_000,
      machine: 'Padfoot roller',
      passes: 6,
      remarks: '',
      coverReason,
    }),
  )
}

async function prepare(open: OpenSite, cells: readonly number[]) {
  await ok(open.people.technician.post(open.path('/inspections'), { id: randomUUID(), cells, happenedAt: now(), method: 'proof-roll', outcome: 'accepted', remarks: '' }))
  await release(open, cells, 0)
}

async function release(open: OpenSite, cells: readonly number[], lift: number, who: SignedIn = open.people['qc-lead']) {
  return ok(who.post(open.path('/releases'), { id: randomUUID(), zoneId: open.site.zones[0]!.id, lift, cells, happenedAt: now(), overrideReason: null, remarks: '' }))
}

/** Dry unit weight in pcf against a curve of 120.0 pcf at 12.0 %. */
async function test(open: OpenSite, at: { easting: number; northing: number }, pcf: number, moisture: number, extra: object = {}) {
  return ok<{ id: string; number: string; outcome: string; orderId: string | null; orderNumber: string | null; marked: number }>(
    open.people.technician.post(open.path('/tests'), {
      id: randomUUID(),
      purpose: 'required',
      follows: null,
      stakeId: null,
      at,
      lift: 1,
      liftConfirmed: false,
      surfaceUm: null,
      depthUm: 150_000,
      sampledAt: now(),
      curveId: open.curve.id,
      oversizePercent: null,
      sheet: { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: pcf, moisture: { method: 'stated', percent: moisture } },
      remarks: '',
      ...extra,
    }),
  )
}

const centreOf = (column: number, row: number) => ({ easting: 1_300_000 + column * 50 + 25, northing: 400_250 - row * 50 - 25 })

async function surface(open: OpenSite) {
  const { body } = await open.people.operator.get(open.path('/ground?cut=surface')).buffer(true).parse((res, done) => {
    const parts: Buffer[] = []
    res.on('data', (part: Buffer) => parts.push(part))
    res.on('end', () => done(null, Buffer.concat(parts)))
  })
  const sheet = decodeSheet(new Uint8Array(body as Buffer))
  return { sheet, state: (cell: number) => groundStateOf(sheet.state[cell]!), lift: (cell: number) => sheet.lift[cell]! }
}

async function proved(open: OpenSite) {
  const plan = await loadSitePlan(app.dataSource.manager, open.siteId)
  return findDifferences(app.dataSource.manager, plan)
}

describe('the cycle of a lift', () => {
  it('turns from bare ground through test and release to ready for the next lift', async () => {
    const open = await openSite(app)
    expect((await surface(open)).state(0)).toBe('awaiting-test')
    await prepare(open, BLOCK)
    const before = await open.people.superintendent.get(open.path('/board'))
    expect(before.body.totals.readyCells).toBe(6)
    expect(before.body.ready[0].lift).toBe(1)

    await place(open, BLOCK, 1)
    expect((await surface(open)).state(7)).toBe('awaiting-test')
    await test(open, centreOf(1, 0), 117, 12)
    expect((await surface(open)).state(7)).toBe('meets-spec')
    await release(open, BLOCK, 1)
    const after = await surface(open)
    expect(after.state(7)).toBe('released')
    expect(after.lift(7)).toBe(1)
    const board = (await open.people.superintendent.get(open.path('/board'))).body
    expect(board.totals).toMatchObject({ readyCells: 6, testsRequired: 1, testsTaken: 1, testsOwed: 0, cellsInRework: 0 })
    expect(board.totals.spokenForCm3).toBe(board.totals.placedCm3)
    expect(board.ready[0]).toMatchObject({ lift: 2, cells: BLOCK })
    expect(await proved(open)).toEqual([])
  })

  it('carries a failure through rework, retest and closing', async () => {
    const open = await openSite(app)
    await prepare(open, BLOCK)
    await place(open, BLOCK, 1)
    const failed = await test(open, centreOf(1, 0), 108, 8)
    expect(failed).toMatchObject({ outcome: 'fail', orderNumber: 'R-001' })
    expect((await surface(open)).state(1)).toBe('rework')
    const order = (await open.people.operator.get(open.path(`/rework/${failed.orderId}`))).body
    expect(order).toMatchObject({ state: 'issued', headline: 'Too dry and too loose. Add water, then roll again.', machine: 'Padfoot roller', passesWanted: 6 })
    expect(order.waterLitres).toBeGreaterThan(0)

    await ok(open.people.operator.post(open.path(`/rework/${failed.orderId}/steps`), { id: randomUUID(), kind: 'started', happenedAt: now() }))
    await ok(open.people.operator.post(open.path(`/rework/${failed.orderId}/steps`), { id: randomUUID(), kind: 'ready', happenedAt: now(), passes: 6, waterLitres: 900, depthUm: 203_200, remarks: '' }))
    expect((await surface(open)).state(1)).toBe('awaiting-retest')
    const ready = (await open.people.technician.get(open.path(`/rework/${failed.orderId}`))).body
    expect(ready.retestPoints).toHaveLength(ready.retestsWanted)
    const point = ready.retestPoints[0]
    const retest = await test(open, { easting: point.easting, northing: point.northing }, 117, 12, { follows: { testId: failed.id, kind: 'retest' } })
    expect(retest.number).toBe('T-0001-R1')
    const closed = (await open.people.technician.get(open.path(`/rework/${failed.orderId}`))).body
    expect(closed.state).toBe('closed')
    expect((await surface(open)).state(1)).toBe('meets-spec')
    expect(await proved(open)).toEqual([])
  })

  it('waits at a hold point for the owner, who may decline with a reason', async () => {
    const open = await openSite(app, { site: { zones: [zoneInput({ holds: { foundation: false, firstLift: true, everyLift: false, finalGrade: false } })] } })
    await prepare(open, BLOCK)
    await place(open, BLOCK, 1)
    await test(open, centreOf(1, 0), 117, 12)
    const waiting = await release(open, BLOCK, 1)
    expect((await surface(open)).state(1)).toBe('meets-spec')
    expect((await open.people['qc-lead'].post(open.path(`/releases/${waiting.id}/accept`), {})).status).toBe(403)
    await ok(open.people['owner-rep'].post(open.path(`/releases/${waiting.id}/decline`), { reason: 'Soft spot at B1' }))
    const again = await release(open, BLOCK, 1)
    await ok(open.people['owner-rep'].post(open.path(`/releases/${again.id}/accept`), {}))
    expect((await surface(open)).state(1)).toBe('released')
    expect(await proved(open)).toEqual([])
  })

  it('asks before fill covers ground that is not released, and keeps the doubt', async () => {
    const open = await openSite(app)
    await prepare(open, BLOCK)
    await place(open, BLOCK, 1)
    const body = { id: randomUUID(), zoneId: open.site.zones[0]!.id, lift: 2, cells: [{ cell: 1, quarters: WHOLE }], materialId: open.material.id, happenedAt: now(), loads: 0, loadVolumeCm3: 0, looseThicknessUm: null, machine: '', passes: null, remarks: '', coverReason: null }
    const refused = await open.people.superintendent.post(open.path('/placements'), body)
    expect(refused.status).toBe(409)
    expect(refused.body).toMatchObject({ code: 'covered_too_early', details: { cells: [1] } })
    await place(open, [1], 2, 'Trucks were on the ramp')
    const column = (await open.people.operator.get(open.path('/columns/1'))).body
    expect(column.blockedBy).toMatchObject({ lift: 1, reason: 'Waiting for a test (lift 1)' })
    const board = (await open.people['owner-rep'].get(open.path('/board'))).body
    expect(board.exceptions[0]).toMatchObject({ kind: 'covered-early', text: '1 cell covered too early', cells: [1] })
    expect(await proved(open)).toEqual([])
  })

  it('revokes a release whose result is voided, and gives the ground back to testing', async () => {
    const open = await openSite(app)
    await prepare(open, BLOCK)
    await place(open, BLOCK, 1)
    const passed = await test(open, centreOf(1, 0), 117, 12)
    await release(open, BLOCK, 1)
    await ok(open.people['qc-lead'].post(open.path(`/tests/${passed.id}/void`), { reason: 'Wrong tin weighed' }))
    expect((await surface(open)).state(1)).toBe('awaiting-test')
    const releases = (await open.people['owner-rep'].get(open.path('/releases'))).body.releases
    expect(releases[0].cells[0].revoked.reason).toContain('T-0001')
    expect(await proved(open)).toEqual([])
  })

  it('takes a voided placement out of lots, totals and the Ground', async () => {
    const open = await openSite(app)
    await prepare(open, BLOCK)
    const placed = await place(open, BLOCK, 1)
    await test(open, centreOf(1, 0), 117, 12)
    await ok(open.people['qc-lead'].post(open.path(`/placements/${placed.id}/void`), { reason: 'Entered on the wrong zone' }))
    const after = await surface(open)
    expect(after.lift(1)).toBe(0)
    expect(after.state(1)).toBe('released')
    const board = (await open.people.superintendent.get(open.path('/board'))).body
    expect(board.totals).toMatchObject({ placedCm3: 0, testsRequired: 0, readyCells: 6 })
    expect(await proved(open)).toEqual([])
  })

  it('keeps both when two people save into the same lot at once', async () => {
    const open = await openSite(app)
    await prepare(open, BLOCK)
    await Promise.all([place(open, [0, 1, 2], 1), place(open, [6, 7, 8], 1)])
    await Promise.all([test(open, centreOf(0, 0), 117, 12), test(open, centreOf(2, 1), 108, 12), test(open, centreOf(1, 1), 118, 12.5)])
    const lots = (await open.people['qc-lead'].get(open.path('/lots'))).body.lots
    expect(lots).toHaveLength(1)
    expect(lots[0].cells).toHaveLength(6)
    const tests = (await open.people['qc-lead'].get(open.path('/tests'))).body
    expect(tests.total).toBe(3)
    expect(await proved(open)).toEqual([])
  })

  it('sends patches that bring an old sheet to the fresh one', async () => {
    const open = await openSite(app)
    await prepare(open, BLOCK)
    const { sheet } = await surface(open)
    await place(open, BLOCK, 1)
    await test(open, centreOf(1, 0), 108, 8)
    const answer = (await open.people.operator.get(open.path(`/ground/patches?since=${sheet.revision}`))).body
    expect(answer.reset).toBe(false)
    for (const text of answer.patches as string[]) {
      const patch = decodePatch(new Uint8Array(Buffer.from(text, 'base64')))
      for (const { cell, surface: shown } of patch.entries) {
        sheet.state[cell] = shown.state
        sheet.flags[cell] = shown.flags
        sheet.lift[cell] = shown.lift
        sheet.top[cell] = shown.top
        sheet.lot[cell] = shown.lot
        sheet.test[cell] = shown.test
      }
    }
    const { sheet: fresh } = await surface(open)
    expect({ ...sheet, revision: 0 }).toEqual({ ...fresh, revision: 0 })
  })

  it('counts a placement of quarters as part of a cell, never ready', async () => {
    const open = await openSite(app, { site: siteInput({ boundary: [...cellsRing(0, 0, 6, 5)] }) })
    await prepare(open, BLOCK)
    const half = { id: randomUUID(), zoneId: open.site.zones[0]!.id, lift: 1, cells: [{ cell: 0, quarters: 3 }], materialId: open.material.id, happenedAt: now(), loads: 0, loadVolumeCm3: 0, looseThicknessUm: null, machine: '', passes: null, remarks: '', coverReason: null }
    await ok(open.people.superintendent.post(open.path('/placements'), half))
    const column = (await open.people.superintendent.get(open.path('/columns/0'))).body
    expect(column.rows.find((row: { lift: number }) => row.lift === 1).why).toContain('partly placed')
    expect(column.ready).toBe(false)
    await ok(open.people.superintendent.post(open.path('/placements'), { ...half, id: randomUUID(), cells: [{ cell: 0, quarters: 15 }] }))
    const board = (await open.people.superintendent.get(open.path('/board'))).body
    const whole = board.lifts.find((lift: { lift: number }) => lift.lift === 1).states.find((state: { state: string }) => state.state === 'awaiting-test')
    expect(whole.cells).toBe(1)
    expect(await proved(open)).toEqual([])
  })
})
