import type { EntityManager } from 'typeorm'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { groundStateOf, mayBeCovered } from '#shared/domain/ground-state.ts'

/** Quarters of these cells that have the lift already, by cell. */
export async function loadPlacedQuarters(manager: EntityManager, siteId: string, lift: number, cells: readonly number[]): Promise<Map<number, number>> {
  const rows: { cell: number; quarters: string }[] = await manager.query(
    'SELECT pc.`cell`, BIT_OR(pc.`quarters`) AS `quarters` FROM `placement_cell` pc JOIN `placement` p ON p.`site_id` = pc.`site_id` AND p.`id` = pc.`placement_id` WHERE pc.`site_id` = ? AND pc.`lift` = ? AND pc.`cell` IN (?) AND p.`voided_at` IS NULL GROUP BY pc.`cell`',
    [siteId, lift, cells],
  )
  return new Map(rows.map((row) => [row.cell, Number(row.quarters)]))
}

/** The cells whose layer below this lift is not released, is only partly placed, or has nothing placed at all. */
export async function loadUncoverable(manager: EntityManager, plan: SitePlan, lift: number, cells: readonly number[]): Promise<number[]> {
  const rows: { cell: number; lift: number; state: number; flags: number }[] = await manager.query(
    'SELECT `cell`, `lift`, `state`, `flags` FROM `cell_lift` WHERE `site_id` = ? AND `cell` IN (?) AND `lift` < ?',
    [plan.site.id, cells, lift],
  )
  const states = new Map(rows.map((row) => [`${row.cell} ${row.lift}`, groundStateOf(row.state)]))
  return cells.filter((cell) => {
    const below = [0, ...plan.layersOf(cell).map((layer) => layer.lift)].filter((other) => other < lift)
    return below.some((other) => !mayBeCovered(states.get(`${cell} ${other}`) ?? 'not-placed'))
  })
}
