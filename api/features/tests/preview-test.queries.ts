import type { EntityManager } from 'typeorm'
import type { DerivedLot } from '#api/features/ground/change-ground.ts'
import { deriveLotNow } from '#api/features/ground/change-ground.ts'
import { loadGaugeChecks } from '#api/features/gauges/gauge-checks.queries.ts'
import { layerOf, loadSitePlan } from '#api/features/ground/site-plan.ts'
import { loadLotsOfCells } from '#api/features/lots/lots-of-cells.queries.ts'
import type { SiteRead } from '#api/features/site-head/site-write.ts'
import { findOpenOrder } from '#api/features/tests/failure-order.ts'
import { judgeSheet, loadCurve } from '#api/features/tests/judge-sheet.ts'
import { locateTest } from '#api/features/tests/locate-test.ts'
import { marksOf } from '#api/features/tests/mark-ground.ts'
import { loadChain } from '#api/features/tests/test-chain.ts'
import type { Chain } from '#api/features/tests/test-chain.ts'
import { deriveLot } from '#shared/domain/derive-lot.ts'
import { gaugeIdOf, usesGauge } from '#shared/domain/gauge-check.ts'
import type { LotFacts, LotTest } from '#shared/domain/lot-facts.ts'
import { layerVolumeCm3 } from '#shared/domain/placement-volume.ts'
import type { PreviewTest, TestPreview } from '#shared/schemas/field-test.ts'

const NOWHERE: TestPreview = { zoneId: null, cell: null, lotName: null, marks: [], meets: [], gauge: null }
/** Stands for the test that has no id yet. */
const PREVIEWED = '00000000-0000-0000-0000-000000000000'

/**
 * What saving a test would do to the ground, asked for while it is typed: the cells it would mark, or those that would meet
 * specification by it; while the sheet cannot be computed yet, those that would if it passed. Nothing is locked or stored.
 */
export async function previewTest(read: SiteRead, input: PreviewTest): Promise<TestPreview> {
  const { manager, siteId } = read
  const plan = await loadSitePlan(manager, siteId)
  const located = locateTest(plan, input.at)
  if (!located) return NOWHERE
  const { cell, zone, at } = located
  const layer = layerOf(plan, cell, input.lift)
  const [lotId] = await loadLotsOfCells(manager, siteId, input.lift, [cell])
  const lot = lotId === undefined ? undefined : await deriveLotNow(manager, plan, lotId)
  const place = { zoneId: zone.id, cell, lotName: lot?.lot.name ?? null, gauge: await previewGauge(read, input) }
  if (!layer) return { ...NOWHERE, ...place }

  const curve = await loadCurve(manager, siteId, input.curveId)
  const chain = await loadChain(manager, siteId, input.follows)
  const judged = judgeSheet(input, plan, curve, lot?.specification ?? zone.specification)
  const verdict = judged.ok ? judged.verdict : ({ outcome: 'pass', treatedAsFail: false, near: false } as const)
  const marks = marksOf({ verdict, purpose: input.purpose, cell, at, replacesId: chain?.current?.id ?? null, lot })
  const volumes = new Map(lot?.derived.cells.map((other) => [other.cell, other.volumeCm3]))
  const volumeOf = (marked: number) => volumes.get(marked) ?? layerVolumeCm3(plan.cells[marked]?.areaMm2 ?? 0, layer.topUm - layer.bottomUm)
  const counts = verdict.outcome === 'pass' && input.purpose === 'required' && lot
  return {
    ...place,
    marks: marks.map(({ kind, cells }) => ({ kind, cells: [...cells], volumeCm3: cells.reduce((sum, marked) => sum + volumeOf(marked), 0) })),
    meets: counts ? await newlyMeeting(read, lot, chain, { ...input, cell, at, near: verdict.near }) : [],
  }
}

/** The gauge the sheet names, as it stands at the time of sampling. */
async function previewGauge({ manager, siteId }: SiteRead, { sheet, sampledAt }: PreviewTest): Promise<TestPreview['gauge']> {
  if (!usesGauge(sheet)) return null
  const checks = await loadGaugeChecks(manager, siteId, [{ id: PREVIEWED, gaugeId: gaugeIdOf(sheet), sampledAt: new Date(sampledAt) }])
  return checks.get(PREVIEWED) ?? null
}

interface Passing extends Pick<PreviewTest, 'lift' | 'sampledAt' | 'follows'>, Pick<LotTest, 'cell' | 'at' | 'near'> {}

/** Cells of the lot that would meet specification with this pass and do not now. */
async function newlyMeeting(read: SiteRead, lot: DerivedLot, chain: Chain | null, pass: Passing): Promise<number[]> {
  const { manager, siteId } = read
  const replaced = chain?.current?.id
  const sampledAt = Date.parse(pass.sampledAt)
  const test: LotTest = {
    testId: PREVIEWED,
    seq: Number.MAX_SAFE_INTEGER,
    at: pass.at,
    cell: pass.cell,
    sampledAt,
    purpose: 'required',
    outcome: 'pass',
    near: pass.near,
    superseded: await isSuperseded(manager, siteId, pass),
    ...(await firstCells(read, chain, pass)),
  }
  const after = settle({
    ...lot.facts,
    tests: [...lot.facts.tests.filter((other) => other.testId !== replaced), test],
    marks: lot.facts.marks.filter((mark) => mark.kind === 'fail' || mark.testId !== replaced),
  })
  const before = new Map(lot.derived.cells.map((cell) => [cell.cell, cell.state]))
  return after.cells.filter((cell) => cell.state === 'meets-spec' && before.get(cell.cell) !== 'meets-spec').map((cell) => cell.cell)
}

/** Derives, orders with enough passes closed on the way, as saving does. */
function settle(facts: LotFacts) {
  const derived = deriveLot(facts)
  const closing = new Set(derived.orders.filter((order) => order.closes).map((order) => order.orderId))
  if (closing.size === 0) return derived
  const causes = new Set(facts.orders.flatMap((order) => (closing.has(order.orderId) && order.causeTestId ? [order.causeTestId] : [])))
  return deriveLot({
    ...facts,
    orders: facts.orders.filter((order) => !closing.has(order.orderId)),
    marks: facts.marks.filter((mark) => mark.kind !== 'fail' || !causes.has(mark.testId)),
  })
}

async function isSuperseded(manager: EntityManager, siteId: string, { lift, cell, sampledAt }: Passing): Promise<boolean> {
  const rows: { n: string }[] = await manager.query(
    "SELECT COUNT(*) AS `n` FROM `rework_step` s JOIN `rework_order` o ON o.`site_id` = s.`site_id` AND o.`id` = s.`order_id` JOIN `rework_cell` c ON c.`site_id` = o.`site_id` AND c.`order_id` = o.`id` AND (c.`left_at` IS NULL OR c.`left_at` > s.`happened_at`) WHERE s.`site_id` = ? AND s.`kind` = 'ready' AND o.`lift` <= ? AND c.`cell` = ? AND s.`happened_at` >= ?",
    [siteId, lift, cell, new Date(sampledAt)],
  )
  return Number(rows[0]?.n ?? 0) > 0
}

/** A retest speaks first for the cells of the order it answers. */
async function firstCells(read: SiteRead, chain: Chain | null, { follows }: Passing): Promise<Pick<LotTest, 'firstCells'>> {
  if (!chain || follows?.kind !== 'retest') return {}
  const order = await findOpenOrder(read, chain.tests)
  if (!order || order.reportedAt === null) return {}
  const rows: { cell: number }[] = await read.manager.query(
    'SELECT `cell` FROM `rework_cell` WHERE `site_id` = ? AND `order_id` = ? AND `left_at` IS NULL ORDER BY `cell`',
    [read.siteId, order.id],
  )
  return { firstCells: rows.map((row) => row.cell) }
}
