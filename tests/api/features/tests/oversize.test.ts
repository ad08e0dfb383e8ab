import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { recordTestAnswerSchema, testDetailSchema } from '#shared/schemas/field-test.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { curveSchema } from '#shared/schemas/lab.ts'
import type { CreateCurve, Curve } from '#shared/schemas/lab.ts'
import { curveInput } from '#tests/factories/curve.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { testInput } from '#tests/factories/test-input.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite

beforeAll(async () => {
  app = await testApp()
  open = await openSite(app)
})

afterAll(() => app.end())

/** Smith, Elements of Soil Mechanics, example 14.2: 1.91 Mg/m³ at 13.7 %, stones of Gs 2.78 kept on the 20 mm (O-2). */
async function stonyCurve(code: string, coarse: CreateCurve['coarse']): Promise<Curve> {
  const lead = open.people['qc-lead']
  const reported = { maxDryDensity: 1910, optimumMoisture: 13.7, reason: 'Only the pair is published' }
  const draft = await lead.post(open.path('/curves'), curveInput({ materialId: open.material.id, code, procedure: 'C', points: [], reported, coarse }))
  expect(draft.status, JSON.stringify(draft.body)).toBe(201)
  const approved = await lead.post(open.path(`/curves/${(draft.body as Curve).id}/approve`), { use: 'reported' })
  expect(approved.status).toBe(200)
  return curveSchema.parse(approved.body)
}

const field = (curveId: string, oversizePercent: number | null) =>
  testInput(open, {
    purpose: 'judgement',
    curveId,
    oversizePercent,
    sheet: { method: 'plain', densityUnit: 'kg/m3', densityIs: 'dry', density: 1960, moisture: { method: 'stated', percent: 11 } },
  })

async function record(curveId: string, oversizePercent: number | null): Promise<TestDetail> {
  const { technician } = open.people
  const answer = await technician.post(open.path('/tests'), field(curveId, oversizePercent))
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return testDetailSchema.parse((await technician.get(open.path(`/tests/${recordTestAnswerSchema.parse(answer.body).id}`))).body)
}

describe('a reference with stones in it (O-2)', () => {
  let curve: Curve

  beforeAll(async () => {
    curve = await stonyCurve('O-2', { bulkGravity: 2.78, moisture: 0 })
  })

  it('keeps what it was told of the stones', async () => {
    const kept = curveSchema.parse((await open.people.technician.get(open.path(`/curves/${curve.id}`))).body)
    expect(kept.coarse).toEqual({ bulkGravity: 2.78, moisture: 0 })
    expect(open.curve.coarse).toBeNull()
  })

  it('is 2.04 Mg/m³ at 11 % for a field test with 20 % of stones', async () => {
    const saved = await record(curve.id, 20)
    // published 2.04 Mg/m³ and 11 %; unrounded 2,037.5 and 10.96
    // the lead's pair is in force as reported to 0.1 pcf (119.2, 1,909.4 kg/m³), hence 0.6 beside the unrounded value
    expect(saved.verdict.oversizeCorrected).toBe(true)
    expect(saved.verdict.maxDryDensityUsed / 1000).toBeCloseTo(2.04, 2)
    expect(Math.abs(saved.verdict.maxDryDensityUsed - 2037.5)).toBeLessThan(0.7)
    expect(saved.verdict.optimumUsed).toBeCloseTo(10.96, 9)
    expect(saved.rc).toBeCloseTo((100 * 1960) / saved.verdict.maxDryDensityUsed, 9)
    expect(saved.outcome).toBe('pass')
    expect(saved.verdict.against.curve.coarse).toEqual({ bulkGravity: 2.78, moisture: 0, sieve: '3/4-in' })
  })

  it('is left as it is below a share of 5 %', async () => {
    const saved = await record(curve.id, 4.9)
    expect(saved.verdict.oversizeCorrected).toBe(false)
    expect(saved.verdict.optimumUsed).toBe(13.7)
  })

  it('refuses a share beyond the standard’s limit, and stones the curve does not know', async () => {
    const { technician } = open.people
    const beyond = await technician.post(open.path('/tests'), field(curve.id, 31))
    expect(beyond.status).toBe(400)
    expect(JSON.stringify(beyond.body)).toContain('ends at 30 %')
    const bare = await stonyCurve('O-2 bare', null)
    const unknown = await technician.post(open.path('/tests'), field(bare.id, 20))
    expect(unknown.status).toBe(400)
    expect(JSON.stringify(unknown.body)).toContain('oversizePercent')
  })

  it('refuses stones of no real gravity', async () => {
    const answer = await open.people['qc-lead'].post(
      open.path('/curves'),
      curveInput({ materialId: open.material.id, coarse: { bulkGravity: 0.4, moisture: 0 } }),
    )
    expect(answer.status).toBe(400)
    expect(JSON.stringify(answer.body)).toContain('between 1.5 and 6')
  })
})
