import fc from 'fast-check'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startOfDay } from '#api/features/tests/register-where.ts'
import { workDay } from '#shared/domain/lots.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import { REGISTER_KEYS, recorderListSchema, registerPageSchema } from '#shared/schemas/test-register.ts'
import type { RegisterKey, RegisterTest } from '#shared/schemas/test-register.ts'
import { curveInput } from '#tests/factories/curve.ts'
import { gaugeInput, gaugeSheet } from '#tests/factories/gauge.ts'
import { materialInput } from '#tests/factories/material.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { cellsRing, specificationInput, zoneInput } from '#tests/factories/site-input.ts'
import { drySheet, middleOf, SUSPECT, testInput, TOO_LOOSE } from '#tests/factories/test-input.ts'
import { placeCells, reportRework } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

/** 95 % above 118 pcf, 93 % below: the small site's curve of 120.0 pcf asks for 95, one of 110 pcf for 93. */
const BY_STEPS = specificationInput({ criteria: [{ kind: 'rc-min-steps', steps: [{ belowMaxDryPcf: 118, text: '93' }, { text: '95.0' }] }] })
const OVEN: CreateTest['sheet'] = { method: 'plain', densityUnit: 'pcf', densityIs: 'wet', density: 131.7, moisture: { method: 'oven', massUnit: 'g', wetAndTin: 142, dryAndTin: 130, tin: 30 } }

let app: TestApp
let open: OpenSite
let all: RegisterTest[]
let ids: Record<'early' | 'onTime' | 'loose' | 'retest' | 'near' | 'suspect' | 'oven' | 'verification' | 'gauge' | 'void', string>
let lightCurve: { id: string; materialId: string }

const list = async (query: string, role: 'technician' | 'superintendent' = 'technician') => {
  const answer = await open.people[role].get(open.path(`/tests?${query}`))
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return registerPageSchema.parse(answer.body)
}
const found = async (query: string) => (await list(query)).tests.map((test) => test.id).sort()

async function record(overrides: Partial<CreateTest>, role: 'technician' | 'owner-rep' = 'technician'): Promise<{ id: string; orderId: string | null }> {
  const answer = await open.people[role].post(open.path('/tests'), testInput(open, overrides))
  expect(answer.status, JSON.stringify(answer.body)).toBe(201)
  return answer.body as { id: string; orderId: string | null }
}

async function openLightCurve(): Promise<typeof lightCurve> {
  const lead = open.people['qc-lead']
  const material = (await lead.post(open.path('/materials'), materialInput({ name: 'Pit sand' }))).body as { id: string }
  const draft = (await lead.post(open.path('/curves'), curveInput({ materialId: material.id, code: 'AA-1' }))).body as { id: string; pairFrom: string }
  await lead.post(open.path(`/curves/${draft.id}/approve`), { use: draft.pairFrom })
  return { id: draft.id, materialId: material.id }
}

beforeAll(async () => {
  app = await testApp()
  open = await openSite(app, { site: { zones: [zoneInput({ name: 'Yard', shortName: 'Yard', ring: [...cellsRing(3, 0, 3, 5)], specification: BY_STEPS }), zoneInput({ ring: [...cellsRing(0, 0, 3, 5)] })] } })
  await placeCells(app, open, [0, 1, 2], { zoneId: open.site.zones.find((zone) => zone.name === 'Pad')?.id ?? '' })
  lightCurve = await openLightCurve()
  // the day the clocks went forward in Los Angeles: its working day begins at 05:00 PDT, 12:00 UTC
  const early = await record({ at: middleOf(0), sampledAt: '2026-03-08T11:59:59.000Z', purpose: 'judgement' })
  const onTime = await record({ at: middleOf(0), sampledAt: '2026-03-08T12:00:00.000Z', lift: 2, purpose: 'judgement' })
  const loose = await record({ at: middleOf(1), sheet: TOO_LOOSE, sampledAt: '2026-03-10T18:00:00.000Z' })
  await reportRework(app, open, loose.orderId ?? '', [], new Date('2026-03-10T19:00:00.000Z'))
  const retest = await record({ at: middleOf(1), sampledAt: '2026-03-10T20:00:00.000Z', follows: { testId: loose.id, kind: 'retest' } })
  const near = await record({ at: middleOf(2), sheet: drySheet(114.2, 12.4), sampledAt: '2026-03-11T18:00:00.000Z' })
  const suspect = await record({ at: middleOf(8), sheet: SUSPECT, sampledAt: '2026-03-11T19:00:00.000Z' })
  const oven = await record({ at: middleOf(4), sheet: OVEN, curveId: lightCurve.id, sampledAt: '2026-03-12T18:00:00.000Z', depthUm: 50_000, surfaceUm: null })
  const verification = await record({ at: middleOf(5), purpose: 'verification', sampledAt: '2026-03-12T19:00:00.000Z' }, 'owner-rep')
  const gauge = (await open.people.technician.post(open.path('/gauges'), gaugeInput({ serial: '4127' }))).body as { id: string }
  const gauged = await record({ at: middleOf(9), sheet: gaugeSheet(gauge.id), sampledAt: '2026-03-13T18:00:00.000Z', purpose: 'judgement' })
  const voided = await record({ at: middleOf(10), sampledAt: '2026-03-13T19:00:00.000Z', purpose: 'judgement' })
  await open.people['qc-lead'].post(open.path(`/tests/${voided.id}/void`), { reason: 'Wrong place written down' })
  ids = { early: early.id, onTime: onTime.id, loose: loose.id, retest: retest.id, near: near.id, suspect: suspect.id, oven: oven.id, verification: verification.id, gauge: gauged.id, void: voided.id }
  all = (await list('')).tests
})

afterAll(() => app.end())

const named = (...names: (keyof typeof ids)[]) => names.map((name) => ids[name]).sort()
const butNot = (...names: (keyof typeof ids)[]) => all.map((test) => test.id).filter((id) => !named(...names).includes(id)).sort()
const padId = () => open.site.zones.find((zone) => zone.name === 'Pad')?.id ?? ''
const byId = (id: string) => all.find((test) => test.id === id)

describe('a line of the register', () => {
  it('carries what its verdict used, and the limit as written', () => {
    expect(byId(ids.loose)).toMatchObject({ rcLimit: '95', lotName: expect.stringMatching(/^Pad L1/), materialName: open.material.name, moistureMethod: 'stated', followKind: null, oversizePercent: null })
    expect(byId(ids.loose)?.flags.map((flag) => flag.code)).toEqual(['off-stake'])
    expect(byId(ids.early)).toMatchObject({ flags: [], flagged: false })
    expect(byId(ids.verification)?.rcLimit).toBe('95.0')
    expect(byId(ids.retest)).toMatchObject({ followKind: 'retest', current: true })
    expect(byId(ids.gauge)?.flags.map((flag) => flag.code)).toContain('gauge-not-counted')
    // 131.7 / 1.12 = 117.59 pcf against 120.0 pcf
    expect(byId(ids.oven)).toMatchObject({ moistureMethod: 'oven', rc: expect.closeTo(97.991, 2), optimum: 12, lotId: null, lotName: null, materialName: 'Pit sand' })
  })
})

describe('filtering', () => {
  it.each([
    ['zone', () => `zoneId=${padId()}`, () => butNot('oven', 'verification', 'gauge', 'void')],
    ['lift', () => 'lift=2', () => named('onTime')],
    ['cell', () => 'cell=1', () => named('loose', 'retest')],
    ['lot', () => `lotId=${byId(ids.near)?.lotId ?? ''}`, () => named('early', 'loose', 'retest', 'near')],
    ['one outcome', () => 'outcome=fail', () => named('loose')],
    ['several outcomes', () => 'outcome=fail,suspect', () => named('loose', 'suspect')],
    ['purposes', () => 'purpose=judgement,verification', () => named('early', 'onTime', 'verification', 'gauge', 'void')],
    ['method', () => 'method=nuclear-gauge', () => named('gauge')],
    ['moisture method', () => 'moistureMethod=oven', () => named('oven')],
    ['material', () => `materialId=${lightCurve.materialId}`, () => named('oven')],
    ['curve', () => `curveId=${open.curve.id}`, () => butNot('oven')],
    ['who recorded it', () => `technicianId=${open.people['owner-rep'].user.id}`, () => named('verification')],
    ['first working day', () => 'from=2026-03-12', () => named('oven', 'verification', 'gauge', 'void')],
    ['last working day, by the cut on the site’s clock', () => 'to=2026-03-07', () => named('early')],
    ['one working day', () => 'from=2026-03-08&to=2026-03-08', () => named('onTime')],
    ['counting', () => 'current=true', () => butNot('loose', 'void')],
    ['not counting', () => 'current=false', () => named('loose', 'void')],
    ['void', () => 'voided=true', () => named('void')],
    ['not void', () => 'voided=false', () => butNot('void')],
    ['near a limit', () => 'near=true', () => all.filter((test) => test.near).map((test) => test.id).sort()],
    ['out of force by rework', () => 'superseded=true', () => named('loose')],
    ['in force', () => 'superseded=false', () => butNot('loose')],
    ['flagged, by its sheet or its gauge', () => 'flagged=true', () => all.filter((test) => test.flagged).map((test) => test.id).sort()],
    ['not flagged', () => 'flagged=false', () => all.filter((test) => !test.flagged).map((test) => test.id).sort()],
    ['retests', () => 'retest=true', () => named('retest')],
    ['no retests', () => 'retest=false', () => butNot('retest')],
    ['number', () => 'search=t-0003', () => named('loose', 'retest')],
    ['several together', () => `zoneId=${padId()}&lift=1&outcome=pass&to=2026-03-10`, () => named('early', 'retest')],
  ])('by %s', async (_, query, expected) => {
    const wanted = expected()
    expect(wanted.length).toBeGreaterThan(0)
    expect(wanted.length).toBeLessThan(all.length)
    expect(await found(query())).toEqual(wanted)
  })

  it('the gauge’s flag is among the flagged, and the near one among the near', () => {
    expect(byId(ids.gauge)?.flagged).toBe(true)
    expect(byId(ids.near)?.near).toBe(true)
  })

  it('counts outcomes of everything but the outcomes asked for', async () => {
    const { counts, total } = await list('outcome=fail')
    expect(counts).toEqual({ pass: 8, fail: 1, suspect: 1 })
    expect(total).toBe(1)
    expect(await list('outcome=fail,suspect&zoneId=nowhere')).toEqual({ tests: [], total: 0, counts: { pass: 0, fail: 0, suspect: 0 } })
    expect((await list('retest=true')).counts).toEqual({ pass: 1, fail: 0, suspect: 0 })
  })

  it.each(['sort=colour', 'sort=', 'direction=up', 'outcome=good', 'outcome=fail,', 'purpose=', 'method=spade', 'moistureMethod=thumb', 'lift=', 'lift=two', 'lift=-1', 'from=2026-02-30', 'from=yesterday', 'from=2026-03-09&to=2026-03-08', 'current=yes', 'limit=0', 'limit=5001', 'offset=-1', 'colour=red', `search=${'x'.repeat(41)}`])('refuses %s', async (query) => {
    const answer = await open.people.technician.get(open.path(`/tests?${query}`))
    expect(answer.status).toBe(400)
    expect((answer.body as { code: string }).code).toBe('invalid')
  })
})

/** What a column is sorted by, read from the lines themselves. */
const VALUE: Record<RegisterKey, (test: RegisterTest) => string | number | null> = {
  number: (test) => test.number,
  sampled: (test) => test.sampledAt,
  zone: (test) => open.site.zones.findIndex((zone) => zone.id === test.zoneId),
  lift: (test) => test.lift,
  cell: (test) => (test.cell % 6) * 100 + Math.floor(test.cell / 6),
  lot: (test) => test.lotName,
  purpose: (test) => test.purpose,
  method: (test) => test.method,
  moistureMethod: (test) => test.moistureMethod,
  wetDensity: (test) => test.wetDensity,
  dryDensity: (test) => test.dryDensity,
  moisture: (test) => test.moisture,
  optimum: (test) => test.optimum,
  deviation: (test) => test.moistureDeviation,
  maxDryDensity: (test) => test.maxDryDensity,
  curve: (test) => test.curveCode,
  material: (test) => test.materialName,
  oversize: (test) => test.oversizePercent,
  rc: (test) => test.rc,
  rcLimit: (test) => (test.rcLimit === null ? null : Number(test.rcLimit)),
  saturation: (test) => test.saturation,
  airVoids: (test) => test.airVoids,
  outcome: (test) => ['fail', 'suspect', 'pass'].indexOf(test.outcome) * 4 + (test.treatedAsFail ? 0 : 2) + (test.near ? 0 : 1),
  flags: (test) => test.flags.length,
  technician: (test) => test.recordedBy.name,
  recorded: (test) => test.seq,
}

/** The last digits of a quotient are noise. */
const settled = (value: string | number | null) => (typeof value === 'number' ? Number(value.toFixed(9)) : value)

describe('sorting', () => {
  it.each(REGISTER_KEYS.flatMap((key) => [[key, 'asc'] as const, [key, 'desc'] as const]))('by %s %s, nothing to say last, the newest first among equals', async (key, direction) => {
    const value = VALUE[key]
    const { tests } = await list(`sort=${key}&direction=${direction}`)
    expect(tests.map((test) => test.id).sort()).toEqual(all.map((test) => test.id).sort())
    const compare = (a: RegisterTest, b: RegisterTest): number => {
      const [left, right] = [settled(value(a)), settled(value(b))]
      if (left === right) return b.seq - a.seq
      if (left === null || right === null) return left === null ? 1 : -1
      return (left < right ? -1 : 1) * (direction === 'asc' ? 1 : -1)
    }
    expect(tests.map((test) => test.number)).toEqual(tests.toSorted(compare).map((test) => test.number))
  })

  it('pages through every test once, whatever is equal', async () => {
    const pages = await Promise.all([0, 3, 6, 9].map((offset) => list(`sort=lift&direction=asc&limit=3&offset=${offset}`)))
    expect(pages.map((page) => page.total)).toEqual([10, 10, 10, 10])
    expect(pages.flatMap((page) => page.tests.map((test) => test.id))).toEqual((await list('sort=lift&direction=asc')).tests.map((test) => test.id))
  })
})

describe('who recorded tests', () => {
  it('are named once each, to those who see the registers', async () => {
    const { people } = recorderListSchema.parse((await open.people.superintendent.get(open.path('/tests/recorders'))).body)
    expect(people.map((person) => person.id).sort()).toEqual([open.people.technician.user.id, open.people['owner-rep'].user.id].sort())
    expect((await open.people.operator.get(open.path('/tests/recorders'))).status).toBe(403)
    expect((await app.visitor().get(open.path('/tests/recorders'))).status).toBe(401)
    expect((await (await app.signedIn()).get(open.path('/tests/recorders'))).status).toBe(404)
  })
})

describe('another site', () => {
  it('shows none of these tests, whatever is asked of it', async () => {
    const other = await openSite(app)
    for (const query of ['', `curveId=${open.curve.id}`, `zoneId=${padId()}`, `lotId=${byId(ids.near)?.lotId ?? ''}`, `technicianId=${open.people.technician.user.id}`, `materialId=${open.material.id}`, 'flagged=true', 'search=T-0']) {
      expect(registerPageSchema.parse((await other.people.technician.get(other.path(`/tests?${query}`))).body)).toEqual({ tests: [], total: 0, counts: { pass: 0, fail: 0, suspect: 0 } })
    }
    expect((await other.people.technician.get(other.path('/tests/recorders'))).body).toEqual({ people: [] })
  })
})

describe('the beginning of a working day', () => {
  it('is the first instant that counts for it, summer time or not', () => {
    const zones = fc.constantFrom('America/Los_Angeles', 'America/New_York', 'Europe/Berlin', 'Australia/Sydney', 'UTC', 'Asia/Kolkata')
    const days = fc.date({ min: new Date('2024-01-01'), max: new Date('2028-12-31'), noInvalidDate: true }).map((date) => date.toISOString().slice(0, 10))
    fc.assert(
      fc.property(zones, fc.oneof(fc.integer({ min: 0, max: 23 }), fc.integer({ min: 0, max: 4 })), fc.oneof(days, fc.constantFrom('2026-03-08', '2026-11-01', '2026-03-29', '2026-10-25', '2026-04-05', '2026-10-04')), (timeZone, dayCutHour, day) => {
        const start = startOfDay(day, { timeZone, dayCutHour }).getTime()
        expect(workDay(start, timeZone, dayCutHour)).toBe(day)
        expect(workDay(start - 1, timeZone, dayCutHour) < day).toBe(true)
        expect(startOfDay(day, { timeZone, dayCutHour }, 1).getTime() - start).toBeGreaterThanOrEqual(22 * 3_600_000)
      }),
      { numRuns: 400 },
    )
  })
})
