import type { EntityManager } from 'typeorm'
import type { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import type { Order } from '#shared/schemas/rework.ts'

interface StepRow {
  readonly kind: Order['steps'][number]['kind']
  readonly happened_at: Date
  readonly text: string
  readonly details: string | { readonly passes?: number; readonly waterLitres?: number; readonly depthUm?: number }
  readonly by: string
}

/** Who did what to an order and when, and who opened it. */
export async function loadOrderSteps(manager: EntityManager, siteId: string, order: ReworkOrderEntity): Promise<Pick<Order, 'steps' | 'openedBy'>> {
  const rows: StepRow[] = await manager.query(
    'SELECT s.`kind`, s.`happened_at`, s.`text`, s.`details`, u.`name` AS `by` FROM `rework_step` s JOIN `user` u ON u.`id` = s.`by_id` WHERE s.`site_id` = ? AND s.`order_id` = ? ORDER BY s.`position`',
    [siteId, order.id],
  )
  const [opener]: { name: string }[] = await manager.query('SELECT `name` FROM `user` WHERE `id` = ?', [order.openedBy])
  return {
    steps: rows.map((row) => {
      const done = typeof row.details === 'string' ? (JSON.parse(row.details) as Exclude<StepRow['details'], string>) : row.details
      const { passes = null, waterLitres = null, depthUm = null } = done
      return { kind: row.kind, at: row.happened_at.toISOString(), by: row.by, text: row.text, done: row.kind === 'ready' ? { passes, waterLitres, depthUm } : null }
    }),
    openedBy: { id: order.openedBy, name: opener?.name ?? '' },
  }
}
