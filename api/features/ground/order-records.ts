import { ReworkCellEntity } from '#api/entities/rework-cell.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { addOrderStep, orderNumber } from '#api/features/ground/order-steps.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'

type NewOrder = Pick<ReworkOrderEntity, 'id' | 'zoneId' | 'lift' | 'causeTestId' | 'actions' | 'headline'> & { readonly cells: readonly number[] }

/** The rows of an order that is issued now. */
export async function insertOrder(write: SiteWrite, { cells, ...given }: NewOrder): Promise<ReworkOrderEntity> {
  const { manager, siteId, user, now } = write
  const order: ReworkOrderEntity = {
    ...given,
    siteId,
    seq: write.take('order'),
    state: 'issued',
    openedBy: user.id,
    openedAt: now,
    assignedTo: null,
    workingSince: null,
    reportedAt: null,
    closedAt: null,
    retestPoints: [],
    createdAt: now,
    updatedAt: now,
  }
  await manager.insert(ReworkOrderEntity, order)
  await manager.insert(ReworkCellEntity, cells.map((cell) => ({ siteId, orderId: order.id, cell, leftAt: null })))
  return order
}

/** Takes an order back whose cause no longer stands. */
export async function withdrawOrder(write: SiteWrite, order: ReworkOrderEntity, reason: string): Promise<void> {
  const { manager, siteId, now } = write
  await manager.update(ReworkOrderEntity, { siteId, id: order.id }, { state: 'withdrawn', closedAt: now, retestPoints: [], updatedAt: now })
  await addOrderStep(write, order.id, { kind: 'withdrawn', happenedAt: now, text: reason, details: {} })
  write.record('order.withdrawn', { type: 'order', id: order.id }, { number: orderNumber(order.seq), reason })
  write.changed('order', order.id)
}
