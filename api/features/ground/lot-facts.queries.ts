import { In, IsNull } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { SpecificationEntity } from '#api/entities/specification.entity.ts'
import { loadLotTests } from '#api/features/ground/lot-tests.queries.ts'
import { layerOf } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { shareMinimum } from '#shared/domain/frequency.ts'
import type { LotCell, LotFacts, LotMark, LotOrder, LotRelease, SharePair } from '#shared/domain/lot-facts.ts'

export interface LoadedLot {
  readonly lot: LotEntity
  readonly specification: SpecificationEntity
  readonly facts: LotFacts
}

interface Slice {
  readonly cell: number
  readonly quarters: number
  readonly volume_cm3: string
  readonly placement_id: string
  readonly happened_at: Date
}

const WHOLE_CELL = 15

/** Everything the derivation of one lot reads. */
export async function loadLot(manager: EntityManager, plan: SitePlan, lotId: string): Promise<LoadedLot> {
  const siteId = plan.site.id
  const lot = await manager.findOneByOrFail(LotEntity, { siteId, id: lotId })
  const specification = await manager.findOneByOrFail(SpecificationEntity, { siteId, id: lot.specificationId })
  const slices: Slice[] = await manager.query(
    'SELECT pc.`cell`, pc.`quarters`, pc.`volume_cm3`, pc.`placement_id`, p.`happened_at` FROM `placement_cell` pc JOIN `placement` p ON p.`site_id` = pc.`site_id` AND p.`id` = pc.`placement_id` WHERE pc.`site_id` = ? AND pc.`lot_id` = ? AND p.`voided_at` IS NULL ORDER BY pc.`cell`, p.`seq`',
    [siteId, lotId],
  )
  const cells = lotCells(plan, lot.lift, slices)
  const indices = cells.map((cell) => cell.cell)
  const orders = await loadOrders(manager, siteId, lot.zoneId, lot.lift, indices)
  return {
    lot,
    specification,
    facts: {
      lift: lot.lift,
      rules: specification.body.frequency,
      remainderTolerancePercent: specification.body.remainderTolerancePercent,
      minimumOwedByLiftDay: await liftDayMinimum(manager, lot, specification, sumVolumes(slices)),
      cells,
      slices: slices.map((slice) => ({
        cell: slice.cell,
        slice: slice.placement_id,
        placedAt: slice.happened_at.getTime(),
        volumeCm3: Number(slice.volume_cm3),
      })),
      tests: await loadLotTests(manager, siteId, lot.lift, indices),
      marks: await loadMarks(manager, siteId, lot.lift, indices, orders),
      orders,
      releases: await loadReleases(manager, siteId, lot.lift, indices),
      acceptedAsIs: await loadAcceptedAsIs(manager, siteId, lot.lift, indices),
    },
  }
}

function sumVolumes(slices: readonly Slice[]): number {
  return slices.reduce((sum, slice) => sum + Number(slice.volume_cm3), 0)
}

function lotCells(plan: SitePlan, lift: number, slices: readonly Slice[]): LotCell[] {
  const quarters = new Map<number, number>()
  for (const slice of slices) quarters.set(slice.cell, (quarters.get(slice.cell) ?? 0) | slice.quarters)
  return [...quarters].flatMap(([cell, placed]): LotCell[] => {
    const geometry = plan.cells[cell]
    const layer = layerOf(plan, cell, lift)
    if (!geometry || !layer) return []
    const { column, row, centroid, areaMm2 } = geometry
    return [{ cell, column, row, centroid, areaMm2, thicknessUm: layer.topUm - layer.bottomUm, partial: placed !== WHOLE_CELL }]
  })
}

/** This lot's part of "at least n per lift and day", shared by volume over the lots of the same zone, lift and day. */
async function liftDayMinimum(
  manager: EntityManager,
  lot: LotEntity,
  specification: SpecificationEntity,
  ownVolume: number,
): Promise<number> {
  const least = Math.max(0, ...specification.body.frequency.map((rule) => (rule.kind === 'per-lift-day' ? rule.atLeast : 0)))
  if (least === 0) return 0
  const { siteId, zoneId, lift, workDay } = lot
  const lots = await manager.find(LotEntity, { where: { siteId, zoneId, lift, workDay, mergedInto: IsNull() }, order: { seq: 'ASC' } })
  const shares = shareMinimum(least, lots.map((other) => (other.id === lot.id ? ownVolume : other.volumeCm3)))
  return shares[lots.findIndex((other) => other.id === lot.id)] ?? 0
}

export async function loadOrders(
  manager: EntityManager,
  siteId: string,
  zoneId: string,
  lift: number,
  cells: readonly number[],
): Promise<LotOrder[]> {
  if (cells.length === 0) return []
  const rows: { id: string; state: LotOrder['state']; cause_test_id: string | null; reported_at: Date | null; cell: number }[] =
    await manager.query(
      "SELECT o.`id`, o.`state`, o.`cause_test_id`, o.`reported_at`, c.`cell` FROM `rework_order` o JOIN `rework_cell` c ON c.`site_id` = o.`site_id` AND c.`order_id` = o.`id` AND c.`left_at` IS NULL WHERE o.`site_id` = ? AND o.`zone_id` = ? AND o.`lift` = ? AND o.`state` IN ('issued', 'working', 'ready') ORDER BY o.`seq`, c.`cell`",
      [siteId, zoneId, lift],
    )
  const inLot = new Set(cells)
  const orders = new Map<string, LotOrder & { cells: number[] }>()
  for (const row of rows) {
    if (!inLot.has(row.cell)) continue
    const order = orders.get(row.id) ?? {
      orderId: row.id,
      state: row.state,
      causeTestId: row.cause_test_id,
      reportedAt: row.reported_at?.getTime() ?? null,
      cells: [],
    }
    order.cells.push(row.cell)
    orders.set(row.id, order)
  }
  return [...orders.values()]
}

/**
 * Marks in force: a failure's as long as an open order holds the cell; a suspicion's or a verification hold's as long as
 * the test is its chain's current result. Nothing a voided test marked counts.
 */
async function loadMarks(
  manager: EntityManager,
  siteId: string,
  lift: number,
  cells: readonly number[],
  orders: readonly LotOrder[],
): Promise<LotMark[]> {
  if (cells.length === 0) return []
  const rows: { test_id: string; kind: LotMark['kind']; cell: number; newest: number }[] = await manager.query(
    'SELECT m.`test_id`, m.`kind`, m.`cell`, (t.`id` = (SELECT n.`id` FROM `field_test` n WHERE n.`site_id` = t.`site_id` AND n.`chain_id` = t.`chain_id` AND n.`voided_at` IS NULL ORDER BY n.`sampled_at` DESC, n.`seq` DESC LIMIT 1)) AS `newest` FROM `test_mark` m JOIN `field_test` t ON t.`site_id` = m.`site_id` AND t.`id` = m.`test_id` WHERE m.`site_id` = ? AND m.`lift` = ? AND m.`cell` IN (?) AND t.`voided_at` IS NULL ORDER BY t.`seq`, m.`cell`',
    [siteId, lift, cells],
  )
  const ordered = new Map(orders.flatMap((order) => (order.causeTestId ? [[order.causeTestId, new Set(order.cells)] as const] : [])))
  const marks = new Map<string, LotMark & { cells: number[] }>()
  for (const row of rows) {
    const inForce = row.kind === 'fail' ? (ordered.get(row.test_id)?.has(row.cell) ?? false) : Number(row.newest) === 1
    if (!inForce) continue
    const key = `${row.test_id} ${row.kind}`
    const mark = marks.get(key) ?? { testId: row.test_id, kind: row.kind, cells: [] }
    mark.cells.push(row.cell)
    marks.set(key, mark)
  }
  return [...marks.values()]
}

export async function loadReleases(manager: EntityManager, siteId: string, lift: number, cells: readonly number[]): Promise<LotRelease[]> {
  if (cells.length === 0) return []
  const rows: { cell: number; status: LotRelease['status']; volume_cm3: string; pairs: string | SharePair[] }[] = await manager.query(
    "SELECT c.`cell`, r.`status`, c.`volume_cm3`, c.`pairs` FROM `release_cell` c JOIN `release_record` r ON r.`site_id` = c.`site_id` AND r.`id` = c.`release_id` WHERE c.`site_id` = ? AND c.`lift` = ? AND c.`cell` IN (?) AND c.`revoked_at` IS NULL AND r.`status` IN ('released', 'awaiting-acceptance') ORDER BY r.`seq`",
    [siteId, lift, cells],
  )
  const latest = new Map<number, LotRelease>()
  for (const row of rows) {
    const pairs = typeof row.pairs === 'string' ? (JSON.parse(row.pairs) as SharePair[]) : row.pairs
    latest.set(row.cell, { cell: row.cell, status: row.status, volumeCm3: Number(row.volume_cm3), pairs })
  }
  return [...latest.values()]
}

export async function loadAcceptedAsIs(manager: EntityManager, siteId: string, lift: number, cells: readonly number[]): Promise<number[]> {
  if (cells.length === 0) return []
  const rows: { cell: number }[] = await manager.query(
    'SELECT DISTINCT `cell` FROM `disposition_cell` WHERE `site_id` = ? AND `lift` = ? AND `cell` IN (?)',
    [siteId, lift, cells],
  )
  return rows.map((row) => row.cell)
}

/** The lots of the same zone, lift and day, which share a minimum per lift and day with these. */
export async function withSiblings(manager: EntityManager, siteId: string, lotIds: Iterable<string>): Promise<string[]> {
  const ids = [...new Set(lotIds)]
  if (ids.length === 0) return []
  const lots = await manager.findBy(LotEntity, { siteId, id: In(ids) })
  const all = new Set(ids)
  for (const { zoneId, lift, workDay, specificationId } of lots) {
    const specification = await manager.findOneByOrFail(SpecificationEntity, { siteId, id: specificationId })
    if (!specification.body.frequency.some((rule) => rule.kind === 'per-lift-day')) continue
    const siblings = await manager.findBy(LotEntity, { siteId, zoneId, lift, workDay, mergedInto: IsNull() })
    for (const sibling of siblings) all.add(sibling.id)
  }
  return [...all]
}
