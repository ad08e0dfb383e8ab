import type { EntityManager } from 'typeorm'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import type { ColumnChange, LayerRow, RowChange } from '#api/features/ground/layer-rows.ts'
import { layerOf } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { layerVolumeCm3 } from '#shared/domain/placement-volume.ts'

/** Rows a single statement carries: far below the packet limit. */
const CHUNK = 1_000

/** Stores changed rows, working surfaces and the totals of the lifts, which are kept by difference. */
export async function saveRows(manager: EntityManager, plan: SitePlan, change: RowChange): Promise<void> {
  const siteId = plan.site.id
  for (const row of change.gone) await manager.delete(CellLiftEntity, { siteId, lift: row.lift, cell: row.cell })
  for (const rows of chunks(change.changed)) {
    await manager.query(
      'INSERT INTO `cell_lift` (`site_id`, `lift`, `cell`, `zone_id`, `state`, `flags`, `lot_id`, `bottom_um`, `top_um`, `volume_cm3`, `spoken_cm3`, `naming_test_id`) VALUES ? ON DUPLICATE KEY UPDATE `zone_id` = VALUES(`zone_id`), `state` = VALUES(`state`), `flags` = VALUES(`flags`), `lot_id` = VALUES(`lot_id`), `bottom_um` = VALUES(`bottom_um`), `top_um` = VALUES(`top_um`), `volume_cm3` = VALUES(`volume_cm3`), `spoken_cm3` = VALUES(`spoken_cm3`), `naming_test_id` = VALUES(`naming_test_id`)',
      [
        rows.map((row) => [siteId, row.lift, row.cell, row.zoneId, row.state, row.flags, row.lotId, row.bottomUm, row.topUm, row.volumeCm3, row.spokenCm3, row.namingTestId]),
      ],
    )
  }
  for (const columns of chunks(change.columns)) await saveColumns(manager, plan, columns)
  await saveTotals(manager, siteId, change)
}

function* chunks<T>(items: readonly T[]): Generator<readonly T[]> {
  for (let at = 0; at < items.length; at += CHUNK) yield items.slice(at, at + CHUNK)
}

async function saveColumns(manager: EntityManager, plan: SitePlan, columns: readonly ColumnChange[]): Promise<void> {
  const rows = columns.map(({ cell, column }) => {
    const next = nextVolume(plan, cell, column.nextLift)
    const { blockedBy } = column
    return [plan.site.id, cell, 0, 0, 0, 0, 0, 0, 0, 0, column.surfaceLift, column.ready, column.nextLift, next, blockedBy?.lift ?? null, blockedBy?.reason ?? null]
  })
  await manager.query(
    'INSERT INTO `cell` (`site_id`, `cell`, `grid_column`, `grid_row`, `zone_index`, `area_mm2`, `centroid_u`, `centroid_v`, `base_um`, `design_um`, `surface_lift`, `ready`, `next_lift`, `next_cm3`, `block_lift`, `block_reason`) VALUES ? ON DUPLICATE KEY UPDATE `surface_lift` = VALUES(`surface_lift`), `ready` = VALUES(`ready`), `next_lift` = VALUES(`next_lift`), `next_cm3` = VALUES(`next_cm3`), `block_lift` = VALUES(`block_lift`), `block_reason` = VALUES(`block_reason`)',
    [rows],
  )
}

/** Compacted volume the next lift of a cell takes; 0 where the design top is reached. */
export function nextVolume(plan: SitePlan, cell: number, lift: number | null): number {
  const layer = lift === null ? undefined : layerOf(plan, cell, lift)
  const area = plan.cells[cell]?.areaMm2
  return layer && area ? layerVolumeCm3(area, layer.topUm - layer.bottomUm) : 0
}

async function saveTotals(manager: EntityManager, siteId: string, { changed, gone, before }: RowChange): Promise<void> {
  const difference = new Map<string, { zoneId: string; lift: number; state: number; cells: number; cm3: number }>()
  const count = (row: LayerRow, sign: 1 | -1) => {
    const key = `${row.zoneId} ${row.lift} ${row.state}`
    const total = difference.get(key) ?? { zoneId: row.zoneId, lift: row.lift, state: row.state, cells: 0, cm3: 0 }
    total.cells += sign
    total.cm3 += sign * row.volumeCm3
    difference.set(key, total)
  }
  for (const row of [...changed, ...gone]) {
    const old = before.get(`${row.cell} ${row.lift}`)
    if (old) count(old, -1)
  }
  for (const row of changed) count(row, 1)
  const rows = [...difference.values()].filter((total) => total.cells !== 0 || total.cm3 !== 0)
  if (rows.length === 0) return
  await manager.query(
    'INSERT INTO `lift_total` (`site_id`, `zone_id`, `lift`, `state`, `cells`, `cm3`) VALUES ? ON DUPLICATE KEY UPDATE `cells` = `cells` + VALUES(`cells`), `cm3` = `cm3` + VALUES(`cm3`)',
    [rows.map((total) => [siteId, total.zoneId, total.lift, total.state, total.cells, total.cm3])],
  )
}
