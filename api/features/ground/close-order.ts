import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { addOrderStep, orderNumber } from '#api/features/ground/order-steps.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'

/** Closes an order that enough passes, sampled after its rework was reported, stand on. */
export async function closeOrder(write: SiteWrite, orderId: string): Promise<void> {
  const { manager, siteId, now } = write
  const order = await manager.findOneByOrFail(ReworkOrderEntity, { siteId, id: orderId })
  await manager.update(ReworkOrderEntity, { siteId, id: orderId }, { state: 'closed', closedAt: now, retestPoints: [], updatedAt: now })
  await addOrderStep(write, orderId, { kind: 'closed', happenedAt: now, text: 'Retests passed', details: {} })
  write.record('order.closed', { type: 'order', id: orderId }, { number: orderNumber(order.seq) })
  write.changed('order', orderId)
}
