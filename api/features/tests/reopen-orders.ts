import { In } from 'typeorm'
import type { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { deriveLotNow } from '#api/features/ground/change-ground.ts'
import { addOrderStep, orderNumber } from '#api/features/ground/order-steps.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { loadLotsOfCells } from '#api/features/lots/lots-of-cells.queries.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { orderCells } from '#api/features/tests/failure-order.ts'

/**
 * Closed orders that a pass had helped to close wait for their retests again, where too few are left without it.
 * @param lost what became of the pass, with its number: "was voided"
 * @returns cells of the orders that opened again
 */
export async function reopenOrders(write: SiteWrite, plan: SitePlan, test: FieldTestEntity, lost: { readonly words: string; readonly details: Record<string, unknown> }): Promise<number[]> {
  const { manager, siteId, now } = write
  const rows: { id: string }[] = await manager.query(
    "SELECT o.`id` FROM `rework_order` o JOIN `rework_cell` c ON c.`site_id` = o.`site_id` AND c.`order_id` = o.`id` AND c.`left_at` IS NULL WHERE o.`site_id` = ? AND o.`lift` = ? AND c.`cell` = ? AND o.`state` = 'closed' AND o.`reported_at` < ? ORDER BY o.`seq`",
    [siteId, test.lift, test.cell, test.sampledAt],
  )
  if (rows.length === 0) return []
  const orders = await manager.find(ReworkOrderEntity, { where: { siteId, id: In(rows.map((row) => row.id)) }, order: { seq: 'ASC' } })
  const touched: number[] = []
  for (const { id, seq, closedAt } of orders) {
    const cells = await orderCells(write, id)
    await manager.update(ReworkOrderEntity, { siteId, id }, { state: 'ready', closedAt: null, updatedAt: now })
    if (await stillCloses(write, plan, test.lift, id, cells)) {
      await manager.update(ReworkOrderEntity, { siteId, id }, { state: 'closed', closedAt })
      continue
    }
    await addOrderStep(write, id, { kind: 'reopened', happenedAt: now, text: `${test.number}, a pass it was closed on, ${lost.words}`, details: lost.details })
    write.record('order.reopened', { type: 'order', id }, { number: orderNumber(seq), lost: test.number, why: lost.words })
    write.changed('order', id)
    touched.push(...cells)
  }
  return touched
}

async function stillCloses({ manager, siteId }: SiteWrite, plan: SitePlan, lift: number, orderId: string, cells: readonly number[]): Promise<boolean> {
  const lots = await loadLotsOfCells(manager, siteId, lift, cells)
  for (const lotId of lots) {
    const { derived } = await deriveLotNow(manager, plan, lotId)
    if (derived.orders.some((order) => order.orderId === orderId && order.closes)) return true
  }
  return false
}
