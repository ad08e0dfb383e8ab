import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { notFound } from '#api/errors.ts'
import { orderNumber } from '#api/features/ground/order-steps.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { deriveColumn } from '#shared/domain/column.ts'
import { groundStateCode, groundStateOf, hasFlag } from '#shared/domain/ground-state.ts'
import { blockWords, whyWords } from '#shared/domain/state-words.ts'
import type { Column } from '#shared/schemas/ground.ts'

interface OrderRow {
  readonly id: string
  readonly seq: number
  readonly lift: number
}

/** The lifts of one cell, top down, each with what decides its state. */
export async function loadColumn(manager: EntityManager, plan: SitePlan, cell: number, revision: number): Promise<Column> {
  const siteId = plan.site.id
  const geometry = plan.cells[cell]
  if (!geometry) throw notFound('There is no such cell on this site.')
  const zone = plan.zoneOf(cell)
  const stored = await manager.find(CellLiftEntity, { where: { siteId, cell }, order: { lift: 'ASC' } })
  const layers = plan.layersOf(cell)
  const derived = deriveColumn({ layers, rows: stored.map((row) => ({ lift: row.lift, state: groundStateOf(row.state), flags: row.flags })) })
  const ids = (pick: (row: CellLiftEntity) => string | null) => [...new Set(stored.flatMap((row) => pick(row) ?? []))]
  const lots = new Map((await manager.findBy(LotEntity, { siteId, id: In(ids((row) => row.lotId)) })).map((lot) => [lot.id, lot]))
  const tests = new Map((await manager.findBy(FieldTestEntity, { siteId, id: In(ids((row) => row.namingTestId)) })).map((test) => [test.id, test]))
  const materials = new Map((await manager.findBy(BorrowMaterialEntity, { siteId })).map((material) => [material.id, material.name]))
  const orders = await openOrders(manager, siteId, cell)
  const placedAt = await placedTimes(manager, siteId, cell)
  const planned = zone ? [{ lift: 0, bottomUm: geometry.baseUm, topUm: geometry.baseUm }, ...layers] : []

  const rows = planned.map((layer): Column['rows'][number] => {
    const row = stored.find((own) => own.lift === layer.lift)
    const lot = lots.get(row?.lotId ?? '')
    const test = tests.get(row?.namingTestId ?? '')
    const order = orders.find((own) => own.lift === layer.lift)
    const state = groundStateOf(row?.state ?? groundStateCode('not-placed'))
    return {
      lift: layer.lift,
      bottomUm: layer.bottomUm,
      topUm: layer.topUm,
      state,
      flags: row?.flags ?? 0,
      volumeCm3: row?.volumeCm3 ?? 0,
      spokenCm3: row?.spokenCm3 ?? 0,
      lotId: lot?.id ?? null,
      lotName: lot?.name ?? null,
      lotRequired: lot?.required ?? 0,
      lotOwed: lot?.owed ?? 0,
      materialName: materials.get(lot?.materialId ?? '') ?? null,
      placedAt: placedAt.get(layer.lift)?.toISOString() ?? null,
      test: test ? presentTest(test) : null,
      orderId: order?.id ?? null,
      why: whyWords({
        lift: layer.lift,
        state,
        covered: hasFlag(row?.flags ?? 0, 'covered'),
        partial: hasFlag(row?.flags ?? 0, 'partial'),
        owed: lot?.owed ?? 0,
        required: lot?.required ?? 0,
        test: test?.number ?? null,
        order: order ? orderNumber(order.seq) : null,
        awaitingAcceptance: hasFlag(row?.flags ?? 0, 'awaitingAcceptance'),
      }),
    }
  })
  const { blockedBy } = derived
  return {
    revision,
    cell,
    zoneId: zone?.id ?? null,
    ready: zone !== undefined && derived.ready,
    nextLift: zone ? derived.nextLift : null,
    blockedBy: zone && blockedBy ? { lift: blockedBy.lift, state: blockedBy.state, reason: blockWords(blockedBy.reason, blockedBy.lift) } : null,
    rows: rows.reverse(),
  }
}

function presentTest(test: FieldTestEntity): NonNullable<Column['rows'][number]['test']> {
  const { id, number, rc, moisture, moistureDeviation, dryDensity, outcome, near, curveId, headline, purpose } = test
  return { id, number, rc, moisture, moistureDeviation, dryDensity, outcome, near, curveId, headline, purpose }
}

async function openOrders(manager: EntityManager, siteId: string, cell: number): Promise<OrderRow[]> {
  return manager.query(
    "SELECT o.`id`, o.`seq`, o.`lift` FROM `rework_order` o JOIN `rework_cell` c ON c.`site_id` = o.`site_id` AND c.`order_id` = o.`id` WHERE o.`site_id` = ? AND c.`cell` = ? AND c.`left_at` IS NULL AND o.`state` IN ('issued', 'working', 'ready') ORDER BY o.`seq`",
    [siteId, cell],
  )
}

async function placedTimes(manager: EntityManager, siteId: string, cell: number): Promise<Map<number, Date>> {
  const rows: { lift: number; at: Date }[] = await manager.query(
    'SELECT pc.`lift`, MIN(p.`happened_at`) AS `at` FROM `placement_cell` pc JOIN `placement` p ON p.`site_id` = pc.`site_id` AND p.`id` = pc.`placement_id` WHERE pc.`site_id` = ? AND pc.`cell` = ? AND p.`voided_at` IS NULL GROUP BY pc.`lift`',
    [siteId, cell],
  )
  return new Map(rows.map((row) => [row.lift, row.at]))
}
