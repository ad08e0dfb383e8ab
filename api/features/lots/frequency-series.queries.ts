import type { EntityManager } from 'typeorm'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { workDay } from '#shared/domain/lots.ts'
import type { FrequencySeries, SeriesQuery } from '#shared/schemas/lot.ts'

/** A volume and when it was placed, or when the test that speaks for it was sampled. */
interface VolumeRow {
  readonly at: Date
  readonly cm3: string
}

/**
 * Volume placed and volume spoken for by passes, summed by working day. A share counts on the day its test was sampled,
 * so that the last day's figures are the board's totals.
 */
export async function loadFrequencySeries(manager: EntityManager, siteId: string, { zoneId }: SeriesQuery): Promise<FrequencySeries> {
  const { timeZone, dayCutHour } = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const byDay = (rows: readonly VolumeRow[]) => {
    const days = new Map<string, number>()
    for (const { at, cm3 } of rows) {
      const day = workDay(at.getTime(), timeZone, dayCutHour)
      days.set(day, (days.get(day) ?? 0) + Number(cm3))
    }
    return days
  }
  const placed = byDay(await loadPlaced(manager, siteId, zoneId))
  const spoken = byDay(await loadSpoken(manager, siteId, zoneId))
  let placedCm3 = 0
  let spokenCm3 = 0
  const days = [...new Set([...placed.keys(), ...spoken.keys()])].sort().map((day) => {
    placedCm3 += placed.get(day) ?? 0
    spokenCm3 += spoken.get(day) ?? 0
    return { day, placedCm3, spokenCm3 }
  })
  return { days }
}

function loadPlaced(manager: EntityManager, siteId: string, zoneId: string | undefined): Promise<VolumeRow[]> {
  return manager.query(
    `SELECT p.\`happened_at\` AS \`at\`, SUM(pc.\`volume_cm3\`) AS \`cm3\` FROM \`placement\` p JOIN \`placement_cell\` pc ON pc.\`site_id\` = p.\`site_id\` AND pc.\`placement_id\` = p.\`id\` WHERE p.\`site_id\` = ? AND p.\`voided_at\` IS NULL ${zoneId === undefined ? '' : 'AND p.`zone_id` = ?'} GROUP BY p.\`id\``,
    zoneId === undefined ? [siteId] : [siteId, zoneId],
  )
}

/** Shares of passes, and those a standing release froze. */
function loadSpoken(manager: EntityManager, siteId: string, zoneId: string | undefined): Promise<VolumeRow[]> {
  return manager.query(
    `SELECT t.\`sampled_at\` AS \`at\`, SUM(a.\`cm3\`) AS \`cm3\` FROM \`allocation\` a JOIN \`field_test\` t ON t.\`site_id\` = a.\`site_id\` AND t.\`id\` = a.\`test_id\` JOIN \`lot\` l ON l.\`site_id\` = a.\`site_id\` AND l.\`id\` = a.\`lot_id\` AND l.\`merged_into\` IS NULL WHERE a.\`site_id\` = ? AND (t.\`outcome\` = 'pass' OR a.\`frozen\` = 1) ${zoneId === undefined ? '' : 'AND l.`zone_id` = ?'} GROUP BY t.\`id\``,
    zoneId === undefined ? [siteId] : [siteId, zoneId],
  )
}
