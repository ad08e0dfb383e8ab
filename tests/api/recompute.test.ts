import { randomUUID } from 'node:crypto'
import fc from 'fast-check'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { AppError } from '#api/errors.ts'
import { findDifferences } from '#api/features/ground/recompute.queries.ts'
import { loadSheet } from '#api/features/ground/sheet.queries.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { recordInspection } from '#api/features/inspections/record-inspection.service.ts'
import { approveCurve, createCurve } from '#api/features/lab/curves.service.ts'
import { recordPlacement } from '#api/features/placements/record-placement.service.ts'
import { voidPlacement } from '#api/features/placements/void-placement.service.ts'
import { rejudgeTests } from '#api/features/rejudge/rejudge.service.ts'
import { supersedeCurve } from '#api/features/rejudge/supersede-curve.service.ts'
import { createRelease } from '#api/features/releases/releases.service.ts'
import { stepOrder } from '#api/features/rework/step-order.service.ts'
import { recordTest } from '#api/features/tests/record-test.service.ts'
import { voidTest } from '#api/features/tests/void-test.service.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { gridToSite } from '#shared/domain/grid.ts'
import { applyPatch, decodePatch, decodeSheet } from '#shared/ground-codec.ts'
import { convertDensity } from '#shared/units/density.ts'
import { curveInput } from '#tests/factories/curve.ts'
import { openSite } from '#tests/factories/open-site.ts'
import type { OpenSite } from '#tests/factories/open-site.ts'
import { asLead } from '#tests/factories/work-on-site.ts'
import { testApp } from '#tests/setup/api.ts'
import type { TestApp } from '#tests/setup/api.ts'

let app: TestApp

beforeAll(async () => {
  app = await testApp()
})
afterAll(() => app.end())

const ALL = Array.from({ length: 30 }, (_, cell) => cell)

/** What people may do, in numbers that a random sequence picks. */
type Act =
  | { readonly kind: 'place'; readonly from: number; readonly size: number; readonly lift: number; readonly quarters: number }
  | { readonly kind: 'test'; readonly cell: number; readonly lift: number; readonly reading: 'pass' | 'near' | 'loose' | 'dry' | 'impossible'; readonly purpose: 'required' | 'judgement' }
  | { readonly kind: 'release'; readonly lift: number }
  | { readonly kind: 'rework' | 'start' }
  | { readonly kind: 'retest' }
  | { readonly kind: 'void-test' | 'void-placement'; readonly pick: number }
  | { readonly kind: 'rejudge'; readonly pcf: number; readonly every: number }

const act: fc.Arbitrary<Act> = fc.oneof(
  { weight: 5, arbitrary: fc.record({ kind: fc.constant('place' as const), from: fc.integer({ min: 0, max: 29 }), size: fc.integer({ min: 1, max: 14 }), lift: fc.integer({ min: 1, max: 3 }), quarters: fc.constantFrom(15, 15, 15, 3) }) },
  {
    weight: 6,
    arbitrary: fc.record({
      kind: fc.constant('test' as const),
      cell: fc.integer({ min: 0, max: 29 }),
      lift: fc.integer({ min: 1, max: 3 }),
      reading: fc.constantFrom('pass' as const, 'pass' as const, 'near' as const, 'loose' as const, 'dry' as const, 'impossible' as const),
      purpose: fc.constantFrom('required' as const, 'required' as const, 'judgement' as const),
    }),
  },
  { weight: 3, arbitrary: fc.record({ kind: fc.constant('release' as const), lift: fc.integer({ min: 1, max: 3 }) }) },
  { weight: 2, arbitrary: fc.constant<Act>({ kind: 'rework' }) },
  { weight: 2, arbitrary: fc.constant<Act>({ kind: 'retest' }) },
  { weight: 1, arbitrary: fc.constant<Act>({ kind: 'start' }) },
  { weight: 2, arbitrary: fc.record({ kind: fc.constant('rejudge' as const), pcf: fc.constantFrom(-8, -3, 2, 6), every: fc.integer({ min: 1, max: 3 }) }) },
  { weight: 1, arbitrary: fc.record({ kind: fc.constantFrom('void-test' as const, 'void-placement' as const), pick: fc.nat() }) },
)

const READINGS = { pass: [117, 12], near: [114.2, 12], loose: [108, 12], dry: [116, 8.5], impossible: [131, 15] } as const

/** One act through its service; what the site refuses in plain words is no fault. */
async function perform(open: OpenSite, step: Act): Promise<void> {
  try {
    await asLead(app, open, (write) => doAct(open, write, step))
  } catch (error) {
    if (!(error instanceof AppError) || !error.expected) throw error
  }
}

async function doAct(open: OpenSite, write: SiteWrite, step: Act): Promise<unknown> {
  const zoneId = open.site.zones[0]?.id ?? ''
  const happenedAt = write.now.toISOString()
  switch (step.kind) {
    case 'place': {
      const cells = ALL.slice(step.from, step.from + step.size).map((cell) => ({ cell, quarters: step.quarters }))
      return recordPlacement(write, { id: randomUUID(), zoneId, lift: step.lift, cells, materialId: open.material.id, happenedAt, loads: 0, loadVolumeCm3: 0, looseThicknessUm: null, machine: '', passes: null, remarks: '', coverReason: 'Random work' })
    }
    case 'test':
      return test(open, write, step.cell, step.lift, step.reading, step.purpose)
    case 'release': {
      const rows: { cell: number }[] = await write.manager.query("SELECT `cell` FROM `cell_lift` WHERE `site_id` = ? AND `lift` = ? AND `state` = 4", [open.siteId, step.lift])
      if (rows.length === 0) return undefined
      return createRelease(write, { id: randomUUID(), zoneId, lift: step.lift, cells: rows.map((row) => row.cell), happenedAt, overrideReason: 'Random release', remarks: '' })
    }
    case 'rework': {
      const [order]: { id: string }[] = await write.manager.query("SELECT `id` FROM `rework_order` WHERE `site_id` = ? AND `state` IN ('issued', 'working') ORDER BY `seq` LIMIT 1", [open.siteId])
      return order && stepOrder(write, order.id, { id: randomUUID(), kind: 'ready', happenedAt, passes: 4, waterLitres: 0, depthUm: 200_000, remarks: '' }, '0'.repeat(32))
    }
    case 'start': {
      const [order]: { id: string }[] = await write.manager.query("SELECT `id` FROM `rework_order` WHERE `site_id` = ? AND `state` = 'issued' ORDER BY `seq` LIMIT 1", [open.siteId])
      return order && stepOrder(write, order.id, { id: randomUUID(), kind: 'started', happenedAt }, '0'.repeat(32))
    }
    case 'rejudge':
      return rejudge(open, write, step.pcf, step.every)
    case 'retest': {
      const [order]: { cause_test_id: string; cell: number; lift: number }[] = await write.manager.query(
        "SELECT o.`cause_test_id`, c.`cell`, o.`lift` FROM `rework_order` o JOIN `rework_cell` c ON c.`site_id` = o.`site_id` AND c.`order_id` = o.`id` AND c.`left_at` IS NULL WHERE o.`site_id` = ? AND o.`state` = 'ready' ORDER BY o.`seq`, c.`cell` LIMIT 1",
        [open.siteId],
      )
      return order && test(open, write, order.cell, order.lift, 'pass', 'required', { testId: order.cause_test_id, kind: 'retest' })
    }
    case 'void-test':
    case 'void-placement': {
      const table = step.kind === 'void-test' ? 'field_test' : 'placement'
      const rows: { id: string }[] = await write.manager.query(`SELECT \`id\` FROM \`${table}\` WHERE \`site_id\` = ? AND \`voided_at\` IS NULL ORDER BY \`seq\``, [open.siteId])
      const picked = rows[step.pick % Math.max(1, rows.length)]
      if (!picked) return undefined
      return step.kind === 'void-test' ? voidTest(write, picked.id, { reason: 'Random void' }) : voidPlacement(write, picked.id, 'Random void')
    }
  }
}

/** A new curve takes the place of the last one, and every so many of the tests of the first superseded one are judged by it. */
async function rejudge(open: OpenSite, write: SiteWrite, pcf: number, every: number): Promise<unknown> {
  const { manager, siteId } = write
  const last = await manager.findOneByOrFail(ReferenceCurveEntity, { siteId, status: 'approved' })
  const input = curveInput({ materialId: open.material.id, gs: 2.9, reported: { maxDryDensity: convertDensity(120 + pcf, 'pcf', 'kg/m3'), optimumMoisture: 12, reason: 'Random curve' } })
  const { id } = await createCurve(write, input)
  await approveCurve(write, id, 'reported')
  await supersedeCurve(write, last.id, { successorId: id, reason: 'Random curve' })
  const tests: { id: string; curve_id: string }[] = await manager.query(
    "SELECT t.`id`, t.`curve_id` FROM `field_test` t JOIN `reference_curve` k ON k.`site_id` = t.`site_id` AND k.`id` = t.`curve_id` WHERE t.`site_id` = ? AND t.`voided_at` IS NULL AND k.`status` = 'superseded' ORDER BY t.`seq`",
    [siteId],
  )
  const [first] = tests
  const chosen = tests.filter((test, index) => test.curve_id === first?.curve_id && index % every === 0).map((test) => test.id)
  return first && rejudgeTests(write, first.curve_id, { id: randomUUID(), by: id, tests: chosen, reason: 'Random curve' })
}

async function test(
  open: OpenSite,
  write: SiteWrite,
  cell: number,
  lift: number,
  reading: keyof typeof READINGS,
  purpose: 'required' | 'judgement',
  follows: { testId: string; kind: 'retest' } | null = null,
) {
  const plan = await loadSitePlan(write.manager, open.siteId)
  const geometry = plan.cells[cell]
  if (!geometry) return undefined
  const [density, percent] = READINGS[reading]
  return recordTest(write, {
    id: randomUUID(),
    purpose,
    follows,
    stakeId: null,
    at: gridToSite(plan.site.grid, geometry.centroid),
    lift,
    liftConfirmed: true,
    surfaceUm: null,
    depthUm: 150_000,
    sampledAt: new Date(write.now.getTime() + 1).toISOString(),
    curveId: open.curve.id,
    oversizePercent: null,
    sheet: { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density, moisture: { method: 'stated', percent } },
    remarks: '',
  })
}

async function surface(siteId: string) {
  const plan = await loadSitePlan(app.dataSource.manager, siteId)
  const [head]: { revision: string }[] = await app.dataSource.query('SELECT `revision` FROM `site_head` WHERE `site_id` = ?', [siteId])
  return decodeSheet(await loadSheet(app.dataSource.manager, plan, { kind: 'surface' }, Number(head?.revision)))
}

describe('the stored ground', () => {
  it('equals a fresh derivation, and an old sheet with its patches, after any sequence of acts', { timeout: 240_000 }, async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(act, { minLength: 8, maxLength: 22 }), async (acts) => {
        const open = await openSite(app)
        await asLead(app, open, (write) => recordInspection(write, { id: randomUUID(), cells: ALL, happenedAt: write.now.toISOString(), method: 'visual', outcome: 'accepted', remarks: '' }))
        let sheet = await surface(open.siteId)
        const since = sheet.revision
        for (const step of acts) await perform(open, step)
        expect(await findDifferences(app.dataSource.manager, await loadSitePlan(app.dataSource.manager, open.siteId))).toEqual([])

        const patches: { body: Buffer }[] = await app.dataSource.query('SELECT `body` FROM `patch` WHERE `site_id` = ? AND `revision` > ? ORDER BY `revision`', [open.siteId, since])
        for (const { body } of patches) sheet = applyPatch(sheet, decodePatch(new Uint8Array(body))).sheet
        const fresh = await surface(open.siteId)
        expect({ ...sheet, revision: 0 }).toEqual({ ...fresh, revision: 0 })
      }),
      { seed: 20_261_201, numRuns: 40 },
    )
  })

  it('is told apart from a tampered one', async () => {
    const open = await openSite(app)
    await perform(open, { kind: 'place', from: 0, size: 6, lift: 1, quarters: 15 })
    await app.dataSource.query('UPDATE `cell_lift` SET `spoken_cm3` = 1 WHERE `site_id` = ? AND `lift` = 1 AND `cell` = 2', [open.siteId])
    const differences = await findDifferences(app.dataSource.manager, await loadSitePlan(app.dataSource.manager, open.siteId))
    expect(differences).toHaveLength(1)
    expect(differences[0]).toMatch(/^C1 lift 1: stored .* spoken 1 /)
  })
})
