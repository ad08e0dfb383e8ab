import type { EntityManager } from 'typeorm'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { groundStateCode } from '#shared/domain/ground-state.ts'
import { workDay } from '#shared/domain/lots.ts'
import type { GroundTotals } from '#shared/ground-codec.ts'

const TWO_DAYS_MS = 48 * 3_600_000

interface LotSums {
  readonly placed: string | null
  readonly spoken: string | null
  readonly required: string | null
  readonly taken: string | null
  readonly owed: string | null
}

/** The figures of the title block, from what is stored. Sums arrive as text and stay whole numbers. */
export async function loadGroundTotals(manager: EntityManager, plan: SitePlan, now: Date): Promise<GroundTotals> {
  const siteId = plan.site.id
  const [lots]: [LotSums] = await manager.query(
    'SELECT SUM(`volume_cm3`) AS `placed`, SUM(`spoken_cm3`) AS `spoken`, SUM(`required`) AS `required`, SUM(`taken`) AS `taken`, SUM(`owed`) AS `owed` FROM `lot` WHERE `site_id` = ? AND `merged_into` IS NULL',
    [siteId],
  )
  const [rework]: [{ cells: string | null }] = await manager.query(
    'SELECT SUM(`cells`) AS `cells` FROM `lift_total` WHERE `site_id` = ? AND `state` IN (?)',
    [siteId, [groundStateCode('rework'), groundStateCode('awaiting-retest')]],
  )
  const [orders]: [{ open: string }] = await manager.query(
    "SELECT COUNT(*) AS `open` FROM `rework_order` WHERE `site_id` = ? AND `state` IN ('issued', 'working', 'ready')",
    [siteId],
  )
  const [ready]: [{ cells: string; cm3: string | null }] = await manager.query(
    'SELECT COUNT(*) AS `cells`, SUM(`next_cm3`) AS `cm3` FROM `cell` WHERE `site_id` = ? AND `ready` = 1',
    [siteId],
  )
  return {
    placedTodayCm3: await placedToday(manager, plan, now),
    placedCm3: Number(lots.placed ?? 0),
    spokenForCm3: Number(lots.spoken ?? 0),
    testsRequired: Number(lots.required ?? 0),
    testsTaken: Number(lots.taken ?? 0),
    testsOwed: Number(lots.owed ?? 0),
    cellsInRework: Number(rework.cells ?? 0),
    openOrders: Number(orders.open),
    readyCm3: Number(ready.cm3 ?? 0),
    readyCells: Number(ready.cells),
  }
}

async function placedToday(manager: EntityManager, plan: SitePlan, now: Date): Promise<number> {
  const { id, timeZone, dayCutHour } = plan.site
  const rows: { driving_cm3: string; happened_at: Date }[] = await manager.query(
    'SELECT `driving_cm3`, `happened_at` FROM `placement` WHERE `site_id` = ? AND `voided_at` IS NULL AND `happened_at` >= ?',
    [id, new Date(now.getTime() - TWO_DAYS_MS)],
  )
  const today = workDay(now.getTime(), timeZone, dayCutHour)
  return rows
    .filter((row) => workDay(row.happened_at.getTime(), timeZone, dayCutHour) === today)
    .reduce((sum, row) => sum + Number(row.driving_cm3), 0)
}
