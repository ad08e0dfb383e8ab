import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { verifyChain } from '#api/features/events/verify-chain.ts'
import { calibrationListSchema, calibrationSchema } from '#shared/schemas/calibration.ts'
import type { CreateCalibration } from '#shared/schemas/calibration.ts'
import { calibrationInput, coneSheet } from '#tests/factories/calibration.ts'
import { fieldWork, minutesAgo } from '#tests/factories/field-work.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { testInput } from '#tests/factories/test-input.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp
let open: OpenSite
let work: ReturnType<typeof fieldWork>

beforeAll(async () => {
  app = await testApp()
})
beforeEach(async () => {
  open = await openSite(app)
  work = fieldWork(app, open)
})
afterAll(() => app.end())

async function record(overrides: Partial<CreateCalibration> = {}) {
  const { status, body } = await open.people.technician.post(open.path('/calibrations'), calibrationInput(overrides))
  if (status !== 201) throw new Error(`Answered ${status}: ${JSON.stringify(body)}`)
  return calibrationSchema.parse(body)
}
const list = async () => calibrationListSchema.parse((await open.people['owner-rep'].get(open.path('/calibrations'))).body).calibrations

describe('POST /api/sites/:siteId/calibrations', () => {
  it('is for those who record quality control, and read by all who see the registers', async () => {
    const path = open.path('/calibrations')
    expect((await app.visitor().post(path, calibrationInput())).status).toBe(401)
    expect((await open.people.superintendent.post(path, calibrationInput())).status).toBe(403)
    expect((await open.people['owner-rep'].post(path, calibrationInput())).status).toBe(403)
    expect((await open.people.operator.get(path)).status).toBe(403)
    const stranger = await app.signedIn()
    expect((await stranger.post(path, calibrationInput())).status).toBe(404)
    expect((await stranger.get(path)).status).toBe(404)
    expect(await list()).toEqual([])
  })

  it('keeps the measurements as entered with what they come to', async () => {
    const input = calibrationInput()
    const kept = await record(input)
    expect(kept).toMatchObject({ apparatus: 'Sand, batch 4', sheet: input.sheet, value: 1418, flags: [], void: null, recordedBy: { id: open.people.technician.user.id } })
    expect(kept.spreadPercent).toBeCloseTo(100 / 1418, 9)
    expect(await list()).toEqual([kept])
  })

  it('answers a repeated request with the first answer, and another under the same id with 409', async () => {
    const input = calibrationInput()
    await record(input)
    expect((await open.people.technician.post(open.path('/calibrations'), input)).status).toBe(201)
    expect((await open.people.technician.post(open.path('/calibrations'), { ...input, apparatus: 'Another' })).status).toBe(409)
    expect(await list()).toHaveLength(1)
  })

  it('names the measurement that cannot be, and stores nothing', async () => {
    const empty = await open.people.technician.post(open.path('/calibrations'), calibrationInput({ sheet: { kind: 'cone', massUnit: 'g', trials: [{ before: 3000, after: 4000 }] } }))
    expect(empty.status).toBe(400)
    expect(JSON.stringify(empty.body)).toContain('body.sheet.trials.0.after')
    const ended = await open.people.technician.post(open.path('/calibrations'), calibrationInput({ validUntil: minutesAgo(120) }))
    expect(JSON.stringify(ended.body)).toContain('body.validUntil')
    expect((await open.people.technician.post(open.path('/calibrations'), calibrationInput({ performedAt: new Date(Date.now() + 7_200_000).toISOString() }))).status).toBe(400)
    expect(await list()).toEqual([])
  })
})

describe('POST /api/sites/:siteId/calibrations/:id/void', () => {
  it('keeps it in the register with the reason, once', async () => {
    const { id } = await record()
    const path = open.path(`/calibrations/${id}/void`)
    expect((await open.people.superintendent.post(path, { reason: 'Wet sand' })).status).toBe(403)
    expect((await open.people.technician.post(open.path(`/calibrations/${randomUUID()}/void`), { reason: 'Wet sand' })).status).toBe(404)
    expect((await open.people.technician.post(path, { reason: '' })).status).toBe(400)
    const voided = calibrationSchema.parse((await open.people.technician.post(path, { reason: 'Wet sand' })).body)
    expect(voided.void).toMatchObject({ reason: 'Wet sand', by: open.people.technician.user.name })
    expect((await open.people.technician.post(path, { reason: 'Wet sand' })).status).toBe(409)
    expect(await list()).toHaveLength(1)
    expect(await verifyChain(app.dataSource.manager, open.siteId)).toMatchObject({ ok: true })
  })
})

describe('a test that names its calibrations', () => {
  const flagsOf = async (calibrationIds: string[], change: Parameters<typeof coneSheet>[1] = {}) => {
    const { id } = await work.record({ sheet: coneSheet(calibrationIds, change) })
    return (await work.detailOf(id)).flags.map((flag) => flag.code).filter((code) => code.startsWith('calibration-'))
  }

  it('is recorded with them, unflagged where the sheet carries their values', async () => {
    const sand = await record()
    const cone = await record({ apparatus: 'Cone 2', sheet: { kind: 'cone', massUnit: 'g', trials: [{ before: 5000, after: 3452 }, { before: 4000, after: 2452 }, { before: 4500, after: 2952 }] } })
    expect(await flagsOf([sand.id, cone.id])).toEqual([])
  })

  it('is flagged where the value is another, the calibration was out of date, or came only later', async () => {
    const sand = await record()
    expect(await flagsOf([sand.id], { sandDensity: 1.43 })).toEqual(['calibration-differs'])
    const old = await record({ performedAt: minutesAgo(9000), validUntil: minutesAgo(8000) })
    expect(await flagsOf([old.id])).toEqual(['calibration-expired'])
    const later = await record({ performedAt: minutesAgo(0.1) })
    expect(await flagsOf([later.id])).toEqual(['calibration-later'])
  })

  it('is refused with another site’s, a void one or one of another apparatus, and nothing is stored', async () => {
    const send = (id: string) => open.people.technician.post(open.path('/tests'), testInput(open, { sheet: coneSheet([id]) }))
    const other = await openSite(app)
    const foreign = calibrationInput()
    expect((await other.people.technician.post(other.path('/calibrations'), foreign)).status).toBe(201)
    const { id } = await record()
    await open.people.technician.post(open.path(`/calibrations/${id}/void`), { reason: 'Wet sand' })
    const cylinder = await record({ apparatus: 'Cylinder 7', sheet: { kind: 'cylinder', lengthUnit: 'in', diameters: [4], heights: [4.584] } })
    for (const refused of [foreign.id, id, cylinder.id]) {
      const { status, body } = await send(refused)
      expect(status).toBe(400)
      expect(JSON.stringify(body)).toContain('body.sheet.calibrationIds')
    }
  })
})
