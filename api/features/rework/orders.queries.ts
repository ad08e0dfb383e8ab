import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReworkCellEntity } from '#api/entities/rework-cell.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { deriveLotNow } from '#api/features/ground/change-ground.ts'
import { orderNumber } from '#api/features/ground/order-steps.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { loadOrderSteps } from '#api/features/rework/order-steps.queries.ts'
import { loadOrderEdges } from '#api/features/rework/order-edges.queries.ts'
import { waterToAdd } from '#shared/domain/water.ts'
import type { Order } from '#shared/schemas/rework.ts'

/** Orders newest first; open ones before closed ones. */
export async function listOrders(manager: EntityManager, plan: SitePlan): Promise<Order[]> {
  const orders = await manager.find(ReworkOrderEntity, { where: { siteId: plan.site.id }, order: { seq: 'DESC' } })
  const open = orders.filter((order) => order.closedAt === null)
  const done = orders.filter((order) => order.closedAt !== null)
  const presented: Order[] = []
  for (const order of [...open, ...done]) presented.push(await presentOrder(manager, plan, order))
  return presented
}

export async function findOrder(manager: EntityManager, plan: SitePlan, id: string): Promise<Order | null> {
  const order = await manager.findOneBy(ReworkOrderEntity, { siteId: plan.site.id, id })
  return order && presentOrder(manager, plan, order)
}

async function presentOrder(manager: EntityManager, plan: SitePlan, order: ReworkOrderEntity): Promise<Order> {
  const siteId = plan.site.id
  const all = await manager.find(ReworkCellEntity, { where: { siteId, orderId: order.id }, order: { cell: 'ASC' } })
  const cells = all.filter((row) => row.leftAt === null).map((row) => row.cell)
  const rows = cells.length > 0 ? await manager.findBy(CellLiftEntity, { siteId, lift: order.lift, cell: In(cells) }) : []
  const cause = order.causeTestId ? await manager.findOneBy(FieldTestEntity, { siteId, id: order.causeTestId }) : null
  const lotId = rows.find((row) => row.lotId !== null)?.lotId ?? null
  const volumeCm3 = rows.reduce((sum, row) => sum + row.volumeCm3, 0)
  const open = order.closedAt === null
  const progress = open && lotId ? (await deriveLotNow(manager, plan, lotId)).derived.orders.find((own) => own.orderId === order.id) : undefined
  const rolled = await lastRolled(manager, siteId, order.lift, cells)
  const { steps, openedBy } = await loadOrderSteps(manager, siteId, order)
  return {
    id: order.id,
    number: orderNumber(order.seq),
    zoneId: order.zoneId,
    lift: order.lift,
    lotId,
    cells,
    state: order.state,
    cause: cause && { testId: cause.id, number: cause.number, headline: cause.headline, rc: cause.rc, moisture: cause.moisture },
    actions: [...order.actions] as Order['actions'],
    headline: order.headline,
    volumeCm3,
    waterLitres: cause && moistureIsWrong(order) ? waterOf(cause, volumeCm3) : null,
    depthUm: Math.max(0, ...rows.map((row) => row.topUm - row.bottomUm)),
    passesWanted: rolled.passes,
    machine: rolled.machine,
    assignedTo: order.assignedTo,
    openedAt: order.openedAt.toISOString(),
    workingSince: order.workingSince?.toISOString() ?? null,
    reportedAt: order.reportedAt?.toISOString() ?? null,
    closedAt: order.closedAt?.toISOString() ?? null,
    retestsWanted: progress?.needed ?? 0,
    retestsPassed: progress?.passed ?? 0,
    retestPoints: [...order.retestPoints],
    edges: open ? await loadOrderEdges(manager, plan, cells) : [],
    steps,
    openedBy,
  }
}

function moistureIsWrong(order: ReworkOrderEntity): boolean {
  return order.actions.includes('too-dry') || order.actions.includes('too-wet')
}

function waterOf(cause: FieldTestEntity, volumeCm3: number): number {
  return waterToAdd({ volumeCm3, dryDensityKgM3: cause.dryDensity, moisturePercent: cause.moisture, targetPercent: cause.verdict.optimumUsed }).litres
}

/** Machine and passes of the latest fill placed in these cells at this lift. */
async function lastRolled(manager: EntityManager, siteId: string, lift: number, cells: readonly number[]): Promise<{ machine: string; passes: number | null }> {
  if (cells.length === 0) return { machine: '', passes: null }
  const rows: { machine: string; passes: number | null }[] = await manager.query(
    'SELECT p.`machine`, p.`passes` FROM `placement` p JOIN `placement_cell` pc ON pc.`site_id` = p.`site_id` AND pc.`placement_id` = p.`id` WHERE p.`site_id` = ? AND p.`lift` = ? AND pc.`cell` IN (?) AND p.`voided_at` IS NULL ORDER BY p.`happened_at` DESC, p.`seq` DESC LIMIT 1',
    [siteId, lift, cells],
  )
  return rows[0] ?? { machine: '', passes: null }
}
