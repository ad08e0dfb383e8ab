import { randomUUID } from 'node:crypto'
import fc from 'fast-check'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { verifyChain } from '#api/features/events/verify-chain.ts'
import { testDetailSchema } from '#shared/schemas/field-test.ts'
import type { CreateTest, TestDetail } from '#shared/schemas/field-test.ts'
import { hostileSheet, likelySheet } from '#tests/factories/hostile-sheet.ts'
import { openSite, rowsOf } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { middleOf, testInput } from '#tests/factories/test-input.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

const SEED = 20261201
const LIKELY = 24
const HOSTILE = 66

const refusalSchema = z.object({ details: z.object({ issues: z.array(z.object({ path: z.string(), message: z.string().min(1) })).min(1) }) })

let app: TestApp
let open: OpenSite

beforeAll(async () => {
  app = await testApp()
  open = await openSite(app)
})
afterAll(() => app.end())

/** As the body arrives: what JSON cannot carry is null there. */
const asSent = (input: object): Record<string, unknown> => JSON.parse(JSON.stringify(input)) as Record<string, unknown>
const send = (body: object) => open.people.technician.post(open.path('/tests'), body)
const stored = async () => (await rowsOf(app.dataSource.manager, 'field_test', open.siteId)).length

/** What stands beside the sheet, as it must come back. */
const beside = ({ id, purpose, lift, depthUm, surfaceUm, oversizePercent, easting, northing, sampledAt }: Pick<TestDetail, 'id' | 'purpose' | 'lift' | 'depthUm' | 'surfaceUm' | 'oversizePercent' | 'easting' | 'northing' | 'sampledAt'>) => ({ id, purpose, lift, depthUm, surfaceUm, oversizePercent, easting, northing, sampledAt })

/** Sends one body; it is either saved and read back as sent, or refused with a field named and nothing stored. */
async function saveOrRefuse(input: CreateTest): Promise<'saved' | 'refused'> {
  const before = await stored()
  const sent = asSent(input)
  const { status, body } = await send(sent)
  const words = `${status}: ${JSON.stringify(body)} for ${JSON.stringify(sent)}`
  const detail = await open.people.technician.get(open.path(`/tests/${input.id}`))
  if (status === 201) {
    const kept = testDetailSchema.parse(detail.body)
    expect(kept.sheet, words).toEqual(sent.sheet)
    expect(beside(kept), words).toEqual(asSent(beside({ ...input, ...input.at })))
    expect(kept.remarks, words).toBe(input.remarks.trim())
    expect(JSON.stringify(kept), words).not.toMatch(/NaN|Infinity/)
    expect(await stored(), words).toBe(before + 1)
    return 'saved'
  }
  expect(status, words).toBe(400)
  for (const issue of refusalSchema.parse(body).details.issues) expect(issue.path, words).toMatch(/^body\.\w+/)
  expect(detail.status, words).toBe(404)
  expect(await stored(), words).toBe(before)
  return 'refused'
}

async function tally(inputs: readonly CreateTest[]): Promise<Record<'saved' | 'refused', number>> {
  const counts = { saved: 0, refused: 0 }
  for (const input of inputs) counts[await saveOrRefuse(input)]++
  return counts
}

const judged = (sheet: CreateTest['sheet'], index: number) => testInput(open, { purpose: 'judgement', at: middleOf(index % 30), sheet })
/** The schema's sheet is the domain's with its lists open to change. */
const sheetsOf = (from: typeof hostileSheet, count: number): CreateTest['sheet'][] => fc.sample(from, { seed: SEED, numRuns: count }).map((sheet) => structuredClone(sheet) as CreateTest['sheet'])

describe('POST /api/sites/:siteId/tests with sheets good and bad', () => {
  it('loses none: each is saved and read back as sent, or refused with its field and nothing stored', async () => {
    const likely = await tally(sheetsOf(likelySheet, LIKELY).map(judged))
    const hostile = await tally(sheetsOf(hostileSheet, HOSTILE).map(judged))
    // both ways are trodden
    expect(likely.saved).toBeGreaterThan(LIKELY * 0.7)
    expect(hostile.saved).toBeGreaterThan(10)
    expect(hostile.refused).toBeGreaterThan(10)
    expect(await verifyChain(app.dataSource.manager, open.siteId)).toMatchObject({ ok: true })
  }, 180_000)

  it('takes or refuses what stands around the sheet in the same way', async () => {
    const around: readonly Partial<CreateTest>[] = [
      { at: { easting: 1e308, northing: -1e308 } },
      { at: { easting: 0, northing: 0 } },
      { at: { easting: Number.NaN, northing: 1 } },
      { lift: 0 },
      { lift: 400 },
      { lift: 1.5 },
      { surfaceUm: 1e300 },
      { surfaceUm: 0.5 },
      { depthUm: -1 },
      { depthUm: 3_000_001 },
      { depthUm: 0 },
      { oversizePercent: -0.001 },
      { oversizePercent: 100 },
      { oversizePercent: 4.999 },
      { oversizePercent: Number.POSITIVE_INFINITY },
      { sampledAt: '2026-13-45T99:00:00Z' },
      { sampledAt: '9999-12-31T23:59:59Z' },
      { sampledAt: '0001-01-01T00:00:00Z' },
      { curveId: randomUUID() },
      { curveId: 'RB-3' },
      { stakeId: randomUUID() },
      { follows: { testId: randomUUID(), kind: 'retest' } },
      { remarks: '\u0000\u0007 <b>κλίση</b> 測定 👷🏽\u200d♀️ \'; DROP TABLE field_test; --' },
      { remarks: 'x'.repeat(2001) },
      { id: 'not-an-id' },
    ]
    const counts = await tally(around.map((change) => testInput(open, { purpose: 'judgement', ...change })))
    expect(counts.refused).toBeGreaterThan(15)
    expect(counts.saved).toBeGreaterThan(2)
  }, 120_000)

  it.each([
    ['a list for a sheet', []],
    ['nothing for a sheet', null],
    ['an unknown method', { method: 'guess' }],
    ['text for a mass', { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: '117.6', moisture: { method: 'stated', percent: 12 } }],
    ['a unit that is none', { method: 'plain', densityUnit: 'stone', densityIs: 'dry', density: 117.6, moisture: { method: 'stated', percent: 12 } }],
    ['no moisture', { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: 117.6 }],
    ['calibrations without end', { method: 'rubber-balloon', volumeUnit: 'cm3', volumeBefore: 500, volumeAfter: 2500, massUnit: 'g', moistSoil: 4200, lengthUnit: 'mm', calibrationIds: Array.from({ length: 50 }, () => randomUUID()), moisture: { method: 'stated', percent: 12 } }],
  ])('refuses %s by its field', async (_what, sheet) => {
    const { status, body } = await send({ ...asSent(testInput(open)), sheet })
    expect(status).toBe(400)
    expect(refusalSchema.parse(body).details.issues.every((issue) => issue.path.startsWith('body.sheet'))).toBe(true)
  })
})
