import { randomUUID } from 'node:crypto'
import { ReworkStepEntity } from '#api/entities/rework-step.entity.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'

export type OrderStepKind = 'issued' | 'assigned' | 'started' | 'ready' | 'help' | 'reopened' | 'edited' | 'closed' | 'withdrawn'

interface OrderStep {
  readonly kind: OrderStepKind
  readonly happenedAt: Date
  readonly text: string
  readonly details: Record<string, unknown>
}

/** R-014 of 14. */
export function orderNumber(seq: number): string {
  return `R-${String(seq).padStart(3, '0')}`
}

/** Appends who did what to an order, and when. */
export async function addOrderStep(write: SiteWrite, orderId: string, step: OrderStep): Promise<void> {
  const { manager, siteId, user, now } = write
  const position = await manager.countBy(ReworkStepEntity, { siteId, orderId })
  await manager.insert(ReworkStepEntity, {
    siteId,
    id: randomUUID(),
    orderId,
    position,
    ...step,
    details: step.details as never,
    byId: user.id,
    createdAt: now,
    updatedAt: now,
  })
}
