import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { drawStakes } from '#api/features/stakes/draw-stakes.service.ts'
import { drawStakesAnswerSchema, lotListSchema, stakeListSchema } from '#shared/schemas/lot.ts'
import type { Lot, Stake } from '#shared/schemas/lot.ts'
import { testDetailSchema } from '#shared/schemas/field-test.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { CELL_FEET, SITE_COLUMNS, SITE_ORIGIN, SITE_ROWS, specificationInput, zoneInput } from '#tests/factories/site-input.ts'
import { SUSPECT, middleOf, testInput } from '#tests/factories/test-input.ts'
import { asLead, placeCells } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { SignedIn, TestApp } from '#tests/setup/api.ts'

const ALL_CELLS = Array.from({ length: SITE_COLUMNS * SITE_ROWS }, (_, cell) => cell)
const SEED = '00112233445566778899aabbccddeeff'

let app: TestApp
let open: OpenSite
let technician: SignedIn
let lot: Lot

beforeAll(async () => {
  app = await testApp()
})

/** The whole small site placed: 1,852 yd³, four tests. */
beforeEach(async () => {
  open = await openSite(app)
  technician = open.people.technician
  await placeCells(app, open, ALL_CELLS)
  lot = await loadLot()
})

afterAll(() => app.end())

async function loadLot(): Promise<Lot> {
  const { lots } = lotListSchema.parse((await technician.get(open.path('/lots'))).body)
  if (!lots[0]) throw new Error('No lot')
  return lots[0]
}

async function standing(): Promise<Stake[]> {
  return stakeListSchema.parse((await open.people.operator.get(open.path('/stakes'))).body).stakes
}

async function draw(): Promise<Stake[]> {
  const answer = await technician.post(open.path('/stakes/draw'), { id: randomUUID(), lotId: lot.id })
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return drawStakesAnswerSchema.parse(answer.body).stakes
}

/** By a fixed seed, so that how near the stakes stand to one another is the same in every run. */
async function drawFixed(): Promise<Stake[]> {
  const { stakes } = await asLead(app, open, (write) => drawStakes(write, { id: randomUUID(), lotId: lot.id }, SEED))
  return stakes
}

const at = (stake: Stake) => ({ easting: stake.easting, northing: stake.northing })

describe('GET /api/sites/:siteId/stakes and POST …/stakes/draw', () => {
  it('show stakes to everyone on the site, and draw them for quality control', async () => {
    const stranger = await app.signedIn()
    const body = { id: randomUUID(), lotId: lot.id }
    expect((await app.visitor().get(open.path('/stakes'))).status).toBe(401)
    expect((await stranger.get(open.path('/stakes'))).status).toBe(404)
    expect((await app.visitor().post(open.path('/stakes/draw'), body)).status).toBe(401)
    expect((await stranger.post(open.path('/stakes/draw'), body)).status).toBe(404)
    expect((await open.people.operator.post(open.path('/stakes/draw'), body)).status).toBe(403)
    expect((await open.people['owner-rep'].post(open.path('/stakes/draw'), body)).status).toBe(403)
    expect((await technician.post(open.path('/stakes/draw'), { ...body, lotId: 'x' })).status).toBe(400)
    expect(await standing()).toEqual([])
  })

  it('draw one for each test owed, inside the lot and off its edge, named N1 on', async () => {
    expect(lot).toMatchObject({ required: 4, owed: 4, staked: 0 })
    const stakes = await draw()
    expect(stakes.map((stake) => stake.label)).toEqual(['N1', 'N2', 'N3', 'N4'])
    expect(await standing()).toEqual(stakes)
    for (const stake of stakes) {
      // set-back 1.5 m of the specification, 4.92 ft
      const right = stake.easting - SITE_ORIGIN.easting
      const down = SITE_ORIGIN.northing - stake.northing
      expect(Math.min(right, down, SITE_COLUMNS * CELL_FEET - right, SITE_ROWS * CELL_FEET - down)).toBeGreaterThan(4.9)
      expect(stake.cell).toBe(Math.floor(down / CELL_FEET) * SITE_COLUMNS + Math.floor(right / CELL_FEET))
      expect(stake).toMatchObject({ lotId: lot.id, lotName: lot.name, lift: 1, drawnBy: technician.user.name })
    }
    expect((await loadLot()).staked).toBe(4)
    expect(new Set(stakes.map((stake) => stake.cell)).size).toBe(4)
  })

  it('refuse, in plain words, where nothing is owed or all is staked', async () => {
    await draw()
    const again = await technician.post(open.path('/stakes/draw'), { id: randomUUID(), lotId: lot.id })
    expect(again.status).toBe(409)
    expect(again.body.message).toBe(`Every test that ${lot.name} owes has its stake already. Nothing was drawn.`)
    const elsewhere = await technician.post(open.path('/stakes/draw'), { id: randomUUID(), lotId: randomUUID() })
    expect(elsewhere.status).toBe(400)
  })

  it('sent twice draw once', async () => {
    const body = { id: randomUUID(), lotId: lot.id }
    const first = await technician.post(open.path('/stakes/draw'), body)
    const second = await technician.post(open.path('/stakes/draw'), body)
    expect(second.body).toEqual(first.body)
    expect(await standing()).toHaveLength(4)
  })

  it('keep the seed and every step in the audit trail: the same seed gives the same places', async () => {
    const drawn = await asLead(app, open, (write) => drawStakes(write, { id: randomUUID(), lotId: lot.id }, SEED))
    const events = await technician.get(open.path(`/events?subjectType=lot&subjectId=${lot.id}&limit=1`))
    const [event] = events.body.events as { verb: string; payload: { seed: string; owed: number; stakes: { label: string; step: { numbers: number[] } }[] } }[]
    expect(event).toMatchObject({ verb: 'stake.drawn', payload: { seed: SEED, owed: 4 } })
    expect(event?.payload.stakes.map((stake) => stake.step.numbers.length)).toEqual([3, 3, 3, 3])
    const twin = await openSite(app)
    await placeCells(app, twin, ALL_CELLS)
    const twinLot = lotListSchema.parse((await twin.people.technician.get(twin.path('/lots'))).body).lots[0]
    const again = await asLead(app, twin, (write) => drawStakes(write, { id: randomUUID(), lotId: twinLot?.id ?? '' }, SEED))
    expect(again.stakes.map(at)).toEqual(drawn.stakes.map(at))
  })
})

describe('a required test at a stake', () => {
  it('retires the stake; the others never move, and its name is free again', async () => {
    const [n1, n2, n3, n4] = await drawFixed()
    if (!n1 || !n2 || !n3 || !n4) throw new Error('Four stakes were to be drawn')
    const saved = await technician.post(open.path('/tests'), testInput(open, { at: at(n2), stakeId: n2.id }))
    expect(saved.status).toBe(201)
    const detail = testDetailSchema.parse((await technician.get(open.path(`/tests/${saved.body.id}`))).body)
    expect(detail).toMatchObject({ stakeLabel: 'N2', flags: [] })
    expect(await standing()).toEqual([n1, n3, n4])
    const events = await technician.get(open.path(`/events?subjectType=stake&subjectId=${n2.id}`))
    expect(events.body.events[0]).toMatchObject({ verb: 'stake.retired', payload: { label: 'N2', retiredBy: saved.body.number } })
    expect((await technician.post(open.path(`/tests`), testInput(open, { at: at(n2), stakeId: n2.id }))).status).toBe(400)
    await open.people['qc-lead'].post(open.path(`/tests/${saved.body.id}/void`), { reason: 'Wrong day' })
    expect((await drawFixed()).map((stake) => stake.label)).toEqual(['N2'])
  })

  it('taken elsewhere is flagged; a judgement test leaves the stake', async () => {
    const [n1] = await drawFixed()
    if (!n1) throw new Error('Stakes were to be drawn')
    await technician.post(open.path('/tests'), testInput(open, { at: at(n1), purpose: 'judgement' }))
    expect(await standing()).toHaveLength(4)
    const away = await technician.post(open.path('/tests'), testInput(open, { at: farFrom(await standing()) }))
    expect(testDetailSchema.parse((await technician.get(open.path(`/tests/${away.body.id}`))).body).flags.map((flag) => flag.code)).toEqual(['off-stake'])
    expect((await loadLot()).owed).toBe(3)
  })

  it('that is suspect is re-run at its place and needs no new stake', async () => {
    const [n1] = await drawFixed()
    if (!n1) throw new Error('Stakes were to be drawn')
    await technician.post(open.path('/tests'), testInput(open, { at: at(n1), stakeId: n1.id, sheet: SUSPECT }))
    expect(await loadLot()).toMatchObject({ owed: 4, reruns: 1, staked: 3 })
    expect((await technician.post(open.path('/stakes/draw'), { id: randomUUID(), lotId: lot.id })).status).toBe(409)
  })

  it('the last one owed takes out what still stands in the lot', async () => {
    await drawFixed()
    for (const cell of [0, 5, 24]) {
      expect((await technician.post(open.path('/tests'), testInput(open, { at: middleOf(cell) }))).status).toBe(201)
    }
    await technician.post(open.path('/tests'), testInput(open, { at: middleOf(29) }))
    expect(await loadLot()).toMatchObject({ owed: 0, staked: 0 })
    expect(await standing()).toEqual([])
    const none = await technician.post(open.path('/stakes/draw'), { id: randomUUID(), lotId: lot.id })
    expect(none.status).toBe(409)
    expect(none.body.message).toBe(`${lot.name} owes no test that needs a stake. Nothing was drawn.`)
  })
})

describe('a specification that takes required tests at stakes only', () => {
  it('refuses one elsewhere, and takes retests, judgement tests and those at a stake', async () => {
    const strict = await openSite(app, { site: { zones: [zoneInput({ specification: specificationInput({ requiredOnlyAtStakes: true }) })] } })
    await placeCells(app, strict, ALL_CELLS)
    const own = strict.people.technician
    const refused = await own.post(strict.path('/tests'), testInput(strict))
    expect(refused.status).toBe(400)
    expect(refused.body.message).toMatch(/at drawn stakes only/)
    expect((await own.post(strict.path('/tests'), testInput(strict, { purpose: 'judgement' }))).status).toBe(201)
    const strictLot = lotListSchema.parse((await own.get(strict.path('/lots'))).body).lots[0]
    const drawn = await own.post(strict.path('/stakes/draw'), { id: randomUUID(), lotId: strictLot?.id })
    const stake = drawStakesAnswerSchema.parse(drawn.body).stakes[0]
    if (!stake) throw new Error('A stake was to be drawn')
    expect((await own.post(strict.path('/tests'), testInput(strict, { at: at(stake), stakeId: stake.id }))).status).toBe(201)
  })
})

/** A cell's middle that is more than a cell away from every stake. */
function farFrom(stakes: readonly Stake[]) {
  const place = ALL_CELLS.map((cell) => middleOf(cell)).find((middle) =>
    stakes.every((stake) => Math.hypot(stake.easting - middle.easting, stake.northing - middle.northing) > CELL_FEET),
  )
  if (!place) throw new Error('Every cell is near a stake')
  return place
}
