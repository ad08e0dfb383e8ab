import type { EntityManager } from 'typeorm'
import type { Stake } from '#shared/schemas/lot.ts'

interface StakeRow {
  readonly id: string
  readonly label: string
  readonly lot_id: string
  readonly lot_name: string
  readonly zone_id: string
  readonly lift: number
  readonly cell: number
  readonly easting: number
  readonly northing: number
  readonly drawn_at: Date
  readonly drawn_by: string
}

/** Stakes that stand on a site, in the order they were drawn; of one lot where it is given. */
export async function listStakes(manager: EntityManager, siteId: string, lotId?: string): Promise<Stake[]> {
  const ofLot = lotId === undefined ? { text: '', values: [] } : { text: ' AND s.`lot_id` = ?', values: [lotId] }
  const rows: StakeRow[] = await manager.query(
    `SELECT s.\`id\`, s.\`label\`, s.\`lot_id\`, l.\`name\` AS \`lot_name\`, l.\`zone_id\`, l.\`lift\`, s.\`cell\`, s.\`easting\`, s.\`northing\`, s.\`drawn_at\`, u.\`name\` AS \`drawn_by\` FROM \`stake\` s JOIN \`lot\` l ON l.\`site_id\` = s.\`site_id\` AND l.\`id\` = s.\`lot_id\` JOIN \`user\` u ON u.\`id\` = s.\`drawn_by\` WHERE s.\`site_id\` = ? AND s.\`retired_at\` IS NULL${ofLot.text} ORDER BY s.\`seq\``,
    [siteId, ...ofLot.values],
  )
  return rows.map((row) => ({
    id: row.id,
    label: row.label,
    lotId: row.lot_id,
    lotName: row.lot_name,
    zoneId: row.zone_id,
    lift: row.lift,
    cell: row.cell,
    easting: row.easting,
    northing: row.northing,
    drawnAt: row.drawn_at.toISOString(),
    drawnBy: row.drawn_by,
  }))
}
