import { IsNull } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { AllocationEntity } from '#api/entities/allocation.entity.ts'
import { CellEntity } from '#api/entities/cell.entity.ts'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { deriveLotNow } from '#api/features/ground/change-ground.ts'
import { deriveFoundation } from '#api/features/ground/foundation.ts'
import { deriveRows, rowsOfLot } from '#api/features/ground/layer-rows.ts'
import type { LayerRow, RowChange } from '#api/features/ground/layer-rows.ts'
import { allocationRows, derivedColumns } from '#api/features/ground/save-lot.ts'
import { nextVolume } from '#api/features/ground/save-rows.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'

/**
 * Derives the whole site again from its facts and names every stored figure that is not what comes out: empty when the
 * stored state is proved. Nothing is changed.
 */
export async function findDifferences(manager: EntityManager, plan: SitePlan): Promise<string[]> {
  const siteId = plan.site.id
  const lots = await manager.find(LotEntity, { where: { siteId, mergedInto: IsNull() }, order: { seq: 'ASC' } })
  const differences: string[] = []
  const rows: LayerRow[] = await deriveFoundation(manager, plan, plan.cells.map((cell) => cell.cell))
  for (const { id } of lots) {
    const lot = await deriveLotNow(manager, plan, id)
    rows.push(...rowsOfLot(plan, lot))
    if (lot.derived.brokenReleases.length > 0) differences.push(`${lot.lot.name}: a release stands that has lost its basis`)
    if (lot.derived.orders.some((order) => order.closes)) differences.push(`${lot.lot.name}: an order stands open that its retests close`)
    for (const [column, value] of Object.entries(derivedColumns(lot))) {
      const stored = lot.lot[column as keyof LotEntity]
      if (stored !== value) differences.push(`${lot.lot.name}: ${column} is stored as ${String(stored)}, derived as ${String(value)}`)
    }
    const stored = await manager.findBy(AllocationEntity, { siteId, lotId: id })
    if (shareText(stored) !== shareText(allocationRows(siteId, lot))) differences.push(`${lot.lot.name}: its shares are not the derived ones`)
  }
  const change = await deriveRows(manager, plan, rows, lots.map((lot) => lot.id))
  for (const row of change.changed) differences.push(`${plan.label(row.cell)} lift ${row.lift}: stored ${rowText(change.before.get(`${row.cell} ${row.lift}`))}, derived ${rowText(row)}`)
  for (const row of change.gone) differences.push(`${plan.label(row.cell)} lift ${row.lift}: stored, but no fill stands behind it`)
  return [...differences, ...(await columnDifferences(manager, plan, change)), ...(await totalDifferences(manager, siteId, [...change.before.values()]))]
}

function shareText(rows: readonly AllocationEntity[]): string {
  return rows
    .map((row) => `${row.testId} ${row.cell} ${row.cm3} ${Number(row.frozen)} ${Number(row.far)}`)
    .sort()
    .join('\n')
}

function rowText(row: LayerRow | undefined): string {
  return row ? `state ${row.state} flags ${row.flags} volume ${row.volumeCm3} spoken ${row.spokenCm3} test ${row.namingTestId ?? '–'}` : 'nothing'
}

async function columnDifferences(manager: EntityManager, plan: SitePlan, { columns }: RowChange): Promise<string[]> {
  const stored = new Map((await manager.findBy(CellEntity, { siteId: plan.site.id })).map((cell) => [cell.cell, cell]))
  return columns.flatMap(({ cell, column }): string[] => {
    const row = stored.get(cell)
    const is = row && [row.surfaceLift, Boolean(row.ready), row.nextLift, row.nextCm3, row.blockLift, row.blockReason].join(' ')
    const blocked = column.blockedBy
    const due = [column.surfaceLift, column.ready, column.nextLift, nextVolume(plan, cell, column.nextLift), blocked?.lift ?? null, blocked?.reason ?? null].join(' ')
    return is === due ? [] : [`${plan.label(cell)}: working surface is stored as ${is ?? 'nothing'}, derived as ${due}`]
  })
}

async function totalDifferences(manager: EntityManager, siteId: string, rows: readonly LayerRow[]): Promise<string[]> {
  const due = new Map<string, { cells: number; cm3: number }>()
  for (const row of rows) {
    const key = `${row.zoneId} ${row.lift} ${row.state}`
    const total = due.get(key) ?? { cells: 0, cm3: 0 }
    due.set(key, { cells: total.cells + 1, cm3: total.cm3 + row.volumeCm3 })
  }
  const stored: { zone_id: string; lift: number; state: number; cells: number; cm3: string }[] = await manager.query(
    'SELECT `zone_id`, `lift`, `state`, `cells`, `cm3` FROM `lift_total` WHERE `site_id` = ? AND (`cells` <> 0 OR `cm3` <> 0)',
    [siteId],
  )
  const is = new Map(stored.map((row) => [`${row.zone_id} ${row.lift} ${row.state}`, { cells: row.cells, cm3: Number(row.cm3) }]))
  const text = (total: { cells: number; cm3: number } | undefined) => `${total?.cells ?? 0} cells, ${total?.cm3 ?? 0} cm³`
  return [...new Set([...due.keys(), ...is.keys()])]
    .filter((key) => text(due.get(key)) !== text(is.get(key)))
    .map((key) => `lift total ${key}: stored ${text(is.get(key))}, derived ${text(due.get(key))}`)
}
