import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { boardSchema } from '#shared/schemas/ground.ts'
import { frequencySeriesSchema } from '#shared/schemas/lot.ts'
import type { FrequencySeries } from '#shared/schemas/lot.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { SUSPECT, TOO_LOOSE, middleOf, testInput } from '#tests/factories/test-input.ts'
import { placeCells, releaseCells } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'

const HOUR = 3_600_000
const noonDaysAgo = (days: number, minutes = 0) => new Date(Math.floor(Date.now() / (24 * HOUR)) * 24 * HOUR - days * 24 * HOUR + 19 * HOUR + minutes * 60_000).toISOString()

let app: TestApp
let open: OpenSite

beforeAll(async () => {
  app = await testApp()
  open = await openSite(app)
})

afterAll(() => app.end())

async function series(query = ''): Promise<FrequencySeries['days']> {
  const answer = await open.people['owner-rep'].get(open.path(`/frequency/series${query}`))
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return frequencySeriesSchema.parse(answer.body).days
}

async function totals() {
  return boardSchema.parse((await open.people['owner-rep'].get(open.path('/board'))).body).totals
}

async function record(overrides: Partial<CreateTest>): Promise<void> {
  const answer = await open.people.technician.post(open.path('/tests'), testInput(open, overrides))
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
}

describe('GET /api/sites/:siteId/frequency/series', () => {
  it('is for those who work with the records', async () => {
    const path = open.path('/frequency/series')
    expect((await app.visitor().get(path)).status).toBe(401)
    expect((await (await app.signedIn()).get(path)).status).toBe(404)
    expect((await open.people.operator.get(path)).status).toBe(403)
    expect((await open.people.technician.get(path)).status).toBe(200)
  })

  it('has no day before anything is placed', async () => {
    expect(await series()).toEqual([])
  })

  it('sums up placed and spoken for by working day and ends on the totals of the board', async () => {
    await placeCells(app, open, [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11], { happenedAt: noonDaysAgo(4) })
    await record({ at: middleOf(0), sampledAt: noonDaysAgo(3) })
    await placeCells(app, open, [24, 25, 26], { happenedAt: noonDaysAgo(2) })
    await record({ at: middleOf(24), sampledAt: noonDaysAgo(1), sheet: TOO_LOOSE })
    await record({ at: middleOf(11), sampledAt: noonDaysAgo(1, 5), sheet: SUSPECT })

    const days = await series()
    const board = await totals()
    expect(days).toHaveLength(3)
    expect(days.at(-1)).toMatchObject({ placedCm3: board.placedCm3, spokenCm3: board.spokenForCm3 })
    expect(days.map((day) => day.day)).toEqual([4, 3, 2].map((ago) => noonDaysAgo(ago).slice(0, 10)))
    expect(days[0]).toMatchObject({ spokenCm3: 0 })
    expect(days[1]?.placedCm3).toBe(days[0]?.placedCm3)
    expect(days[1]?.spokenCm3).toBe(board.spokenForCm3)
    expect(board.spokenForCm3).toBeGreaterThan(0)
  })

  it('keeps to the totals when ground is released', async () => {
    await record({ at: middleOf(5), sampledAt: noonDaysAgo(1, 20) })
    await releaseCells(app, open, [0])
    const days = await series()
    const board = await totals()
    expect(days.at(-1)).toMatchObject({ placedCm3: board.placedCm3, spokenCm3: board.spokenForCm3 })
  })

  it('can be of one zone alone', async () => {
    const [zone] = open.site.zones
    expect(await series(`?zoneId=${zone?.id ?? ''}`)).toEqual(await series())
    expect(await series('?zoneId=another')).toEqual([])
  })
})
