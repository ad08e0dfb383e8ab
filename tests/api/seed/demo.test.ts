import { pino } from 'pino'
import type { DataSource } from 'typeorm'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { createDataSource } from '#api/data-source.ts'
import { readEnv } from '#api/env.ts'
import { listCalibrations } from '#api/features/calibrations/calibrations.queries.ts'
import { loadGaugeChecks } from '#api/features/gauges/gauge-checks.queries.ts'
import type { GaugeTest } from '#api/features/gauges/gauge-checks.queries.ts'
import { listGauges, loadGaugeDetail } from '#api/features/gauges/gauges.queries.ts'
import { loadBoard } from '#api/features/ground/board.queries.ts'
import { findDifferences } from '#api/features/ground/recompute.queries.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { loadSheet } from '#api/features/ground/sheet.queries.ts'
import { listLots } from '#api/features/lots/lots.queries.ts'
import { verifyChain } from '#api/features/events/verify-chain.ts'
import { createObjectStore } from '#api/files/object-store.ts'
import { silentPublisher } from '#api/realtime/publish.ts'
import { seedDemo } from '#seed/demo.ts'
import { decodeSheet } from '#shared/ground-codec.ts'
import { groundStateCode } from '#shared/domain/ground-state.ts'
import type { GroundState } from '#shared/domain/ground-state.ts'
import { createDatabase, dropDatabases, openTestServer, workerDatabaseName } from '#tests/setup/test-server.ts'

const NOW = new Date('2026-12-01T22:32:00Z')

interface Demo {
  readonly dataSource: DataSource
  readonly siteId: string
}

let adminUrl: string
let stopServer: () => Promise<void>
let demo: Demo

async function makeDemo(tag: string, files: Record<string, string> = inject('objectStore')): Promise<Demo> {
  const name = workerDatabaseName(tag)
  await dropDatabases(adminUrl, name)
  const dataSource = createDataSource(await createDatabase(adminUrl, name))
  await dataSource.initialize()
  await dataSource.runMigrations()
  const env = readEnv({ DATABASE_URL: 'mysql://a:b@127.0.0.1/c', SESSION_SECRET: 'x'.repeat(32), ...files })
  await seedDemo({ env, dataSource, clock: () => NOW, publisher: silentPublisher, logger: pino({ level: 'silent' }), objects: createObjectStore(env) })
  const [site]: { id: string }[] = await dataSource.query("SELECT `id` FROM `site` WHERE `name` = 'Alder Flats yard'")
  return { dataSource, siteId: site?.id ?? '' }
}

const boardOf = async ({ dataSource, siteId }: Demo) => loadBoard(dataSource.manager, await loadSitePlan(dataSource.manager, siteId), NOW, 0)

beforeAll(async () => {
  const server = await openTestServer()
  adminUrl = server.adminUrl
  stopServer = server.stop
  demo = await makeDemo('demo')
}, 240_000)

afterAll(async () => {
  await demo.dataSource.destroy()
  await dropDatabases(adminUrl, workerDatabaseName('demo'))
  await stopServer()
})

describe('the demo', () => {
  it('has the work it promises: zones, lifts, failures, retests, stakes and something placed today', async () => {
    const { manager } = demo.dataSource
    const plan = await loadSitePlan(manager, demo.siteId)
    expect(plan.cells.length).toBeGreaterThan(380)
    expect(plan.zones).toHaveLength(3)
    expect(Math.max(...plan.cells.flatMap((cell) => plan.layersOf(cell.cell).map((layer) => layer.lift)))).toBe(11)
    const counts: { outcome: string; follow_kind: string | null; near: number; n: string }[] = await manager.query(
      'SELECT `outcome`, `follow_kind`, `near`, COUNT(*) AS `n` FROM `field_test` WHERE `site_id` = ? GROUP BY 1, 2, 3',
      [demo.siteId],
    )
    const count = (keep: (row: (typeof counts)[number]) => boolean) => counts.filter(keep).reduce((sum, row) => sum + Number(row.n), 0)
    expect(count(() => true)).toBeGreaterThan(200)
    expect(count((row) => row.outcome === 'fail')).toBeGreaterThanOrEqual(8)
    expect(count((row) => row.outcome === 'suspect')).toBe(2)
    expect(count((row) => row.follow_kind === 'retest')).toBeGreaterThanOrEqual(6)
    expect(count((row) => Boolean(row.near))).toBeGreaterThan(5)
    const board = await boardOf(demo)
    expect(board.totals.placedTodayCm3).toBeGreaterThan(0)
    expect(board.totals.testsOwed).toBeGreaterThan(0)
    expect(board.totals.openOrders).toBe(2)
    expect(board.exceptions.map((exception) => exception.kind)).toContain('covered-early')
  })

  it('names a gauge in every gauge test, each with a good count on its day', async () => {
    const { manager } = demo.dataSource
    const byGauge: GaugeTest[] = await manager.query('SELECT `id`, `gauge_id` AS `gaugeId`, `sampled_at` AS `sampledAt` FROM `field_test` WHERE `site_id` = ? AND `method` = ?', [demo.siteId, 'nuclear-gauge'])
    expect(byGauge.length).toBeGreaterThan(150)
    const checks = await loadGaugeChecks(manager, demo.siteId, byGauge)
    expect([...checks.values()].filter((gauge) => gauge.state !== 'good')).toEqual([])
    const gauges = await listGauges(manager, demo.siteId, NOW)
    expect(gauges.map((gauge) => [gauge.serial, gauge.check.state, gauge.corrections.length])).toEqual([['G-41', 'good', 1], ['G-58', 'not-counted', 0]])
    const [main] = gauges
    const { counts } = await loadGaugeDetail(manager, demo.siteId, main?.id ?? '', NOW)
    expect(counts.filter((count) => count.void === null && !count.good).map((count) => count.stands)).toEqual([false])
    expect(counts.filter((count) => count.void !== null)).toHaveLength(1)
    expect(counts.filter((count) => count.stands && count.good)).toHaveLength(37)
  })

  it('tests by cone, balloon and cylinder too, each whose calibration is in force', async () => {
    const { manager } = demo.dataSource
    const rows: { method: string; n: string }[] = await manager.query("SELECT `method`, COUNT(*) AS `n` FROM `field_test` WHERE `site_id` = ? AND `purpose` = 'required' GROUP BY 1", [demo.siteId])
    const counted = new Map(rows.map((row) => [row.method, Number(row.n)]))
    expect(counted.get('sand-cone')).toBeGreaterThanOrEqual(8)
    expect(counted.get('rubber-balloon')).toBeGreaterThanOrEqual(4)
    expect(counted.get('drive-cylinder')).toBeGreaterThanOrEqual(3)
    const calibrations = await listCalibrations(manager, demo.siteId)
    const inForce = calibrations.filter((each) => each.void === null && Date.parse(each.validUntil ?? '') >= NOW.getTime())
    expect(inForce.map((each) => [each.sheet.kind, each.flags]).sort()).toEqual([['balloon', []], ['cone', []], ['cylinder', []], ['sand-density', []]])
    expect(calibrations.filter((each) => each.void !== null)).toHaveLength(1)
    const doubted: { n: string }[] = await manager.query("SELECT COUNT(*) AS `n` FROM `field_test` WHERE `site_id` = ? AND `flags` REGEXP 'calibration-|hole-|not-constant'", [demo.siteId])
    expect(Number(doubted[0]?.n)).toBe(0)
  })

  it('adds up: board, lots, lifts, zones and sheet say the same', async () => {
    const { manager } = demo.dataSource
    const plan = await loadSitePlan(manager, demo.siteId)
    const board = await boardOf(demo)
    const lots = await listLots(manager, demo.siteId, {})
    const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0)
    expect(sum(lots.map((lot) => lot.volumeCm3))).toBe(board.totals.placedCm3)
    expect(sum(lots.map((lot) => lot.spokenCm3))).toBe(board.totals.spokenForCm3)
    expect(sum(lots.map((lot) => lot.required))).toBe(board.totals.testsRequired)
    expect(sum(lots.map((lot) => lot.owed))).toBe(board.totals.testsOwed)
    for (const lot of lots) expect(sum(lot.blocks.map((block) => block.cm3))).toBe(lot.volumeCm3)
    expect(sum(board.zones.map((zone) => zone.placedCm3))).toBe(board.totals.placedCm3)
    expect(sum(board.zones.map((zone) => zone.designCm3))).toBe(sum(plan.zones.map((zone) => zone.designCm3)))
    expect(sum(board.ready.map((group) => group.cm3))).toBe(board.totals.readyCm3)
    expect(sum(board.ready.map((group) => group.cells.length))).toBe(board.totals.readyCells)
    const placed = (state: GroundState) => state !== 'not-placed'
    const inLifts = board.lifts.flatMap((lift) => lift.states)
    expect(sum(inLifts.filter((share) => placed(share.state)).map((share) => share.cm3))).toBe(board.totals.placedCm3)
    expect(sum(inLifts.filter((share) => share.state === 'rework' || share.state === 'awaiting-retest').map((share) => share.cells))).toBe(board.totals.cellsInRework)
    const inZones = plan.cells.filter((cell) => plan.zoneOf(cell.cell)).length
    expect(sum(board.ready.map((group) => group.cells.length)) + sum(board.notYet.map((group) => group.cells.length))).toBe(inZones)
    const sheet = decodeSheet(await loadSheet(manager, plan, { kind: 'surface' }, 0))
    const reworkOnTop = [...sheet.state].filter((state) => state === groundStateCode('rework')).length
    expect(reworkOnTop).toBeLessThanOrEqual(board.totals.cellsInRework)
    expect(reworkOnTop).toBeGreaterThan(0)
  })

  it('has pictures at some tests and a report of a curve, kept in the store', async () => {
    const files: { subject_type: string; kind: string; n: string }[] = await demo.dataSource.query('SELECT `subject_type`, `kind`, COUNT(*) AS `n` FROM `attachment` WHERE `site_id` = ? GROUP BY 1, 2 ORDER BY 1', [demo.siteId])
    expect(files).toEqual([{ subject_type: 'curve', kind: 'document', n: '2' }, { subject_type: 'test', kind: 'photo', n: expect.stringMatching(/^1[0-9]$/) as string }])
  })

  it('is proved by a fresh derivation and by its event chain', async () => {
    const { manager } = demo.dataSource
    expect(await findDifferences(manager, await loadSitePlan(manager, demo.siteId))).toEqual([])
    expect(await verifyChain(manager, demo.siteId)).toMatchObject({ ok: true })
  })

  it('is the same again for the same clock', { timeout: 240_000 }, async () => {
    // without a store for files, which have no say in the figures
    const again = await makeDemo('demo_again', {})
    const figures = async (one: Demo) => {
      const { totals, lifts, zones, ready } = await boardOf(one)
      const tests: unknown[] = await one.dataSource.query('SELECT `number`, `cell`, `lift`, `u`, `v`, `rc`, `outcome`, `sampled_at` FROM `field_test` WHERE `site_id` = ? ORDER BY `seq`', [one.siteId])
      return { totals, lifts, zones, ready, tests }
    }
    const second = await figures(again)
    await again.dataSource.destroy()
    expect(second).toEqual(await figures(demo))
  })
})
