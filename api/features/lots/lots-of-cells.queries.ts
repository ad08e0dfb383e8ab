import type { EntityManager } from 'typeorm'

/** The lots that hold fill of these cells at a lift, oldest first. */
export async function loadLotsOfCells(manager: EntityManager, siteId: string, lift: number, cells: readonly number[]): Promise<string[]> {
  if (cells.length === 0) return []
  const rows: { lot_id: string }[] = await manager.query(
    'SELECT DISTINCT pc.`lot_id`, l.`seq` FROM `placement_cell` pc JOIN `placement` p ON p.`site_id` = pc.`site_id` AND p.`id` = pc.`placement_id` JOIN `lot` l ON l.`site_id` = pc.`site_id` AND l.`id` = pc.`lot_id` WHERE pc.`site_id` = ? AND pc.`lift` = ? AND pc.`cell` IN (?) AND p.`voided_at` IS NULL ORDER BY l.`seq`',
    [siteId, lift, [...new Set(cells)]],
  )
  return rows.map((row) => row.lot_id)
}
