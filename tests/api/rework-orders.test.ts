import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { findDifferences } from '#api/features/ground/recompute.queries.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { placeCells, statesOf } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp

beforeAll(async () => {
  app = await testApp()
})
afterAll(() => app.end())

const ROW = [0, 1, 2, 3, 4, 5]

async function siteWithFill(): Promise<OpenSite> {
  const open = await openSite(app)
  await placeCells(app, open, ROW)
  return open
}

const byHand = (open: OpenSite, cells: readonly number[]) => ({ id: randomUUID(), zoneId: open.site.zones[0]?.id, lift: 1, cells, actions: ['other'], remarks: 'Pumps under the truck' })

async function proved(open: OpenSite) {
  return findDifferences(app.dataSource.manager, await loadSitePlan(app.dataSource.manager, open.siteId))
}

describe('POST /rework', () => {
  it('puts ground that no test marked to rework, by the lead only', async () => {
    const open = await siteWithFill()
    expect((await open.people.technician.post(open.path('/rework'), byHand(open, [1, 2]))).status).toBe(403)
    const answer = await open.people['qc-lead'].post(open.path('/rework'), byHand(open, [1, 2]))
    expect(answer.status).toBe(201)
    expect(await statesOf(app, open)).toMatchObject({ 0: 'awaiting-test', 1: 'rework', 2: 'rework', 3: 'awaiting-test' })
    expect(await proved(open)).toEqual([])
  })

  it('refuses cells without fill, cells of two lots and cells of nowhere, each in plain words', async () => {
    const open = await siteWithFill()
    await placeCells(app, open, [24, 25])
    const lead = open.people['qc-lead']
    const bare = await lead.post(open.path('/rework'), byHand(open, [1, 12]))
    expect(bare.body).toMatchObject({ code: 'conflict', message: expect.stringMatching(/^Nothing is placed at lift 1 in A3\./) })
    const apart = await lead.post(open.path('/rework'), byHand(open, [1, 24]))
    expect(apart.body.message).toMatch(/more than one lot/)
    const nowhere = await lead.post(open.path('/rework'), byHand(open, [999]))
    expect(nowhere.status).toBe(400)
    expect((await lead.get(open.path('/rework'))).body.orders).toEqual([])
  })
})

describe('PATCH /rework/:id', () => {
  it('lets cells join, and leave where no failing test keeps them', async () => {
    const open = await siteWithFill()
    const lead = open.people['qc-lead']
    const { body } = await lead.post(open.path('/rework'), byHand(open, [1, 2]))
    expect((await lead.patch(open.path(`/rework/${body.id}`), { cells: [2, 3], reason: 'Looked at again' })).status).toBe(200)
    expect(await statesOf(app, open)).toMatchObject({ 1: 'awaiting-test', 2: 'rework', 3: 'rework' })
    expect((await lead.get(open.path(`/rework/${body.id}`))).body.steps.at(-1)).toMatchObject({ kind: 'edited', text: 'B1 left; D1 joined; Looked at again' })
    expect(await proved(open)).toEqual([])
  })

  it('keeps a cell that a failing test marked until a pass sampled after it bounds it', async () => {
    const open = await siteWithFill()
    const fail = await open.people.technician.post(open.path('/tests'), {
      id: randomUUID(),
      purpose: 'required',
      follows: null,
      stakeId: null,
      at: { easting: 1_300_075, northing: 400_225 },
      lift: 1,
      liftConfirmed: false,
      surfaceUm: null,
      depthUm: 150_000,
      sampledAt: new Date(Date.now() - 60_000).toISOString(),
      curveId: open.curve.id,
      oversizePercent: null,
      sheet: { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: 108, moisture: { method: 'stated', percent: 12 } },
      remarks: '',
    })
    const order = (await open.people['qc-lead'].get(open.path(`/rework/${fail.body.orderId}`))).body
    const refused = await open.people['qc-lead'].patch(open.path(`/rework/${order.id}`), { cells: order.cells.filter((cell: number) => cell !== 5), reason: 'Looks fine' })
    expect(refused.status).toBe(409)
    expect(refused.body.message).toMatch(/^F1 cannot leave yet: no passing test sampled after T-0001/)
  })
})

describe('POST /rework/:id/withdraw', () => {
  it('takes back an order by hand, and no order that a failure stands behind', async () => {
    const open = await siteWithFill()
    const lead = open.people['qc-lead']
    const { body } = await lead.post(open.path('/rework'), byHand(open, [1]))
    expect((await open.people.superintendent.post(open.path(`/rework/${body.id}/withdraw`), { reason: 'Not needed' })).status).toBe(403)
    expect((await lead.post(open.path(`/rework/${body.id}/withdraw`), { reason: 'Not needed' })).status).toBe(200)
    expect((await lead.get(open.path(`/rework/${body.id}`))).body.state).toBe('withdrawn')
    expect((await lead.post(open.path(`/rework/${body.id}/withdraw`), { reason: 'Again' })).status).toBe(409)
    expect(await statesOf(app, open)).toMatchObject({ 1: 'awaiting-test' })
    expect(await proved(open)).toEqual([])
  })
})

describe('POST /dispositions', () => {
  it('accepts ground as it is, by the owner only and with the engineer’s name and document', async () => {
    const open = await siteWithFill()
    const disposition = { id: randomUUID(), lift: 1, cells: [1, 2], reason: 'Below the footing line', engineer: 'P. Example, PE', document: 'Letter 14' }
    expect((await open.people['qc-lead'].post(open.path('/dispositions'), disposition)).status).toBe(403)
    const unnamed = await open.people['owner-rep'].post(open.path('/dispositions'), { ...disposition, engineer: '' })
    expect(unnamed.body.details.issues).toEqual([{ path: 'body.engineer', message: 'Give the engineer\'s name' }])
    expect((await open.people['owner-rep'].post(open.path('/dispositions'), disposition)).status).toBe(201)
    expect(await statesOf(app, open)).toMatchObject({ 0: 'awaiting-test', 1: 'accepted-as-is', 2: 'accepted-as-is' })
    const bare = await open.people['owner-rep'].post(open.path('/dispositions'), { ...disposition, id: randomUUID(), cells: [20] })
    expect(bare.body).toMatchObject({ code: 'conflict', message: expect.stringMatching(/^Nothing is placed at lift 1 in C4/) })
    expect(await proved(open)).toEqual([])
  })
})
