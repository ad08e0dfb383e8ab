import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { lotListSchema, lotSchema } from '#shared/schemas/lot.ts'
import type { Lot } from '#shared/schemas/lot.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { SITE_COLUMNS, SITE_ROWS } from '#tests/factories/site-input.ts'
import { SUSPECT, TOO_LOOSE, middleOf, testInput } from '#tests/factories/test-input.ts'
import { placeCells, releaseCells } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'

const ALL_CELLS = Array.from({ length: SITE_COLUMNS * SITE_ROWS }, (_, cell) => cell)

let app: TestApp
let open: OpenSite
let technician: SignedIn

beforeAll(async () => {
  app = await testApp()
  open = await openSite(app)
  technician = open.people.technician
  await placeCells(app, open, ALL_CELLS)
})

afterAll(() => app.end())

async function list(query = ''): Promise<Lot[]> {
  const answer = await technician.get(open.path(`/lots${query}`))
  expect(answer.status).toBe(200)
  return lotListSchema.parse(answer.body).lots
}

async function only(): Promise<Lot> {
  const [lot] = await list('?lift=1')
  if (!lot) throw new Error('No lot')
  return lot
}

async function record(overrides: Partial<CreateTest>): Promise<string> {
  const answer = await technician.post(open.path('/tests'), testInput(open, overrides))
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return (answer.body as { id: string }).id
}

const sumOf = (lot: Lot) => lot.blocks.reduce((sum, block) => sum + block.cm3, 0)

describe('GET /api/sites/:siteId/lots', () => {
  it('is for those who work with the records', async () => {
    const stranger = await app.signedIn()
    const { id } = await only()
    for (const path of ['/lots', `/lots/${id}`]) {
      expect((await app.visitor().get(open.path(path))).status).toBe(401)
      expect((await stranger.get(open.path(path))).status).toBe(404)
      expect((await open.people.operator.get(open.path(path))).status).toBe(403)
      expect((await open.people['owner-rep'].get(open.path(path))).status).toBe(200)
    }
    expect((await technician.get(open.path(`/lots/${randomUUID()}`))).status).toBe(404)
    expect((await technician.get(open.path('/lots?lift=one'))).status).toBe(400)
  })

  it('tells name, material, cells and counts, and the volume owed in pieces of what one test speaks for', async () => {
    const lot = await only()
    const zone = open.site.zones[0]
    expect(lot).toMatchObject({ zoneId: zone?.id, lift: 1, materialId: open.material.id, materialName: open.material.name, specificationVersion: 1, cells: ALL_CELLS, required: 4, taken: 0, owed: 4, staked: 0, releasedAt: null, standing: 'owes' })
    expect(lot.name).toMatch(/^Pad L1, [A-Z][a-z]{2} \d{1,2}$/)
    expect(lot.blocks.map(({ testId, state }) => ({ testId, state }))).toEqual(Array.from({ length: 4 }, () => ({ testId: null, state: 'owed' })))
    expect(lot.blocks.slice(0, 3).every((block) => block.cm3 === lot.fCm3)).toBe(true)
    expect(sumOf(lot)).toBe(lot.volumeCm3)
    const one = await technician.get(open.path(`/lots/${lot.id}`))
    expect(lotSchema.parse(one.body)).toEqual(lot)
  })

  it('filters by zone and lift', async () => {
    expect(await list('?lift=2')).toEqual([])
    expect(await list(`?zoneId=${randomUUID()}`)).toEqual([])
    expect(await list(`?zoneId=${open.site.zones[0]?.id}&lift=1`)).toHaveLength(1)
  })

  it('shows each counted test by the volume it holds, in the order taken, and what is left as owed', async () => {
    const pass = await record({ at: middleOf(0) })
    const fail = await record({ at: middleOf(29), sheet: TOO_LOOSE })
    const suspect = await record({ at: middleOf(24), sheet: SUSPECT })
    const lot = await only()
    expect(lot.blocks.map(({ testId, state }) => ({ testId, state }))).toEqual([
      { testId: pass, state: 'meets' },
      { testId: fail, state: 'rework' },
      { testId: suspect, state: 'suspect' },
      { testId: null, state: 'owed' },
    ])
    expect(lot.blocks[0]?.cm3).toBe(lot.fCm3)
    expect(sumOf(lot)).toBe(lot.volumeCm3)
    expect(lot).toMatchObject({ taken: 2, passing: 1, owed: 2, reruns: 1 })
  })

  it('says released, and since when, once every cell is', async () => {
    const small = await openSite(app)
    await placeCells(app, small, [0, 1])
    const { technician: own } = small.people
    await own.post(small.path('/tests'), testInput(small))
    await releaseCells(app, small, [0])
    const view = async () => lotListSchema.parse((await own.get(small.path('/lots'))).body).lots[0]
    expect(await view()).toMatchObject({ standing: 'waiting-release', releasedAt: null, blocks: [{ state: 'meets' }] })
    const before = Date.now()
    await releaseCells(app, small, [1])
    const released = await view()
    expect(released).toMatchObject({ standing: 'released', blocks: [{ state: 'released' }] })
    expect(Math.abs(Date.parse(released?.releasedAt ?? '') - before)).toBeLessThan(60_000)
  })
})
