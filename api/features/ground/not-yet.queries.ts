import { In, IsNull } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { StakeEntity } from '#api/entities/stake.entity.ts'
import { orderNumber } from '#api/features/ground/order-steps.ts'
import { loadTestNames } from '#api/features/ground/running-numbers.queries.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import type { BlockReason } from '#shared/domain/column-types.ts'
import type { Board } from '#shared/schemas/ground.ts'

type Group = Board['notYet'][number]

interface BlockRow {
  readonly cell: number
  readonly zone_id: string
  readonly block_lift: number
  readonly block_reason: BlockReason
  readonly lot_id: string | null
  readonly naming_test_id: string | null
  readonly next_cm3: string
}

interface HeldRow {
  readonly cell: number
  readonly lift: number
  readonly order_id: string
}

const STATES_ORDER: readonly Group['reason'][] = [
  'rework',
  'awaiting-retest',
  'suspect',
  'awaiting-test',
  'awaiting-release',
  'awaiting-acceptance',
  'hold',
  'recheck',
  'partial',
  'awaiting-inspection',
  'not-placed',
  'at-grade',
]

/** Cells that may not take a lift, grouped by what stands in the way: an order, a test, a lot. */
export async function loadNotYet(manager: EntityManager, plan: SitePlan): Promise<Group[]> {
  const siteId = plan.site.id
  const rows: BlockRow[] = await manager.query(
    'SELECT c.`cell`, c.`zone_id`, c.`block_lift`, c.`block_reason`, c.`next_cm3`, s.`lot_id`, s.`naming_test_id` FROM `cell` c LEFT JOIN `cell_lift` s ON s.`site_id` = c.`site_id` AND s.`cell` = c.`cell` AND s.`lift` = c.`block_lift` WHERE c.`site_id` = ? AND c.`zone_id` IS NOT NULL AND c.`ready` = 0 AND c.`block_reason` IS NOT NULL ORDER BY c.`cell`',
    [siteId],
  )
  const held: HeldRow[] = await manager.query(
    "SELECT c.`cell`, o.`lift`, o.`id` AS `order_id` FROM `rework_order` o JOIN `rework_cell` c ON c.`site_id` = o.`site_id` AND c.`order_id` = o.`id` AND c.`left_at` IS NULL WHERE o.`site_id` = ? AND o.`state` IN ('issued', 'working', 'ready') ORDER BY o.`seq`",
    [siteId],
  )
  const orderAt = new Map(held.map((row) => [`${row.cell} ${row.lift}`, row.order_id]))
  const groups = new Map<string, { rows: BlockRow[]; orderId: string | null }>()
  for (const row of rows) {
    const orderId = orderAt.get(`${row.cell} ${row.block_lift}`) ?? null
    const key = [row.block_reason, row.zone_id, row.block_lift, keyWithin(row, orderId)].join('|')
    const group = groups.get(key) ?? { rows: [], orderId }
    group.rows.push(row)
    groups.set(key, group)
  }
  return present(manager, plan, [...groups.values()])
}

/** What tells two groups of the same reason apart. */
function keyWithin(row: BlockRow, orderId: string | null): string {
  if (row.block_reason === 'suspect') return row.naming_test_id ?? ''
  if (row.block_reason === 'rework' || row.block_reason === 'awaiting-retest') return orderId ?? ''
  if (row.block_reason === 'awaiting-test' || row.block_reason === 'not-released') return row.lot_id ?? ''
  return ''
}

async function present(manager: EntityManager, plan: SitePlan, groups: readonly { rows: readonly BlockRow[]; orderId: string | null }[]): Promise<Group[]> {
  const siteId = plan.site.id
  const first = groups.flatMap(({ rows }) => rows.slice(0, 1))
  const lots = new Map((await manager.findBy(LotEntity, { siteId, id: In(first.flatMap((row) => row.lot_id ?? [])) })).map((lot) => [lot.id, lot]))
  const orders = new Map((await manager.findBy(ReworkOrderEntity, { siteId, id: In(groups.flatMap((group) => group.orderId ?? [])) })).map((order) => [order.id, order]))
  const stakes = await manager.find(StakeEntity, { where: { siteId, retiredAt: IsNull() }, order: { seq: 'ASC' } })
  const tests = await loadTestNames(manager, siteId, first.map((row) => row.naming_test_id))
  const presented = groups.flatMap(({ rows, orderId }): Group[] => {
    const [row] = rows
    if (!row) return []
    const lot = lots.get(row.lot_id ?? '')
    const order = orders.get(orderId ?? '')
    const reason = reasonOf(row.block_reason)
    const waits = reason === 'awaiting-test'
    return [
      {
        reason,
        zoneId: row.zone_id,
        lift: row.block_lift,
        cells: rows.map((own) => own.cell),
        cm3: rows.reduce((sum, own) => sum + Number(own.next_cm3), 0),
        owed: waits ? (lot?.owed ?? 0) : 0,
        stakes: waits ? stakes.filter((stake) => stake.lotId === lot?.id).map((stake) => stake.label) : [],
        orderId: order?.id ?? null,
        orderNumber: order ? orderNumber(order.seq) : null,
        orderState: order?.state ?? null,
        workingSince: order?.workingSince?.toISOString() ?? null,
        testId: reason === 'suspect' || order ? row.naming_test_id : null,
        testNumber: reason === 'suspect' || order ? (tests.get(row.naming_test_id ?? '') ?? null) : null,
        lotId: lot?.id ?? null,
        lotName: lot?.name ?? null,
        headline: order?.headline ?? '',
      },
    ]
  })
  return presented.sort((a, b) => STATES_ORDER.indexOf(a.reason) - STATES_ORDER.indexOf(b.reason) || b.cells.length - a.cells.length)
}

function reasonOf(reason: BlockReason): Group['reason'] {
  if (reason === 'complete') return 'at-grade'
  if (reason === 'not-released') return 'awaiting-release'
  return reason
}
