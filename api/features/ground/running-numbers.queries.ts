import type { EntityManager } from 'typeorm'

async function loadNumbers(
  manager: EntityManager,
  table: 'lot' | 'field_test',
  siteId: string,
  ids: readonly (string | null)[],
): Promise<Map<string, number>> {
  const wanted = [...new Set(ids.filter((id) => id !== null))]
  if (wanted.length === 0) return new Map()
  const rows: { id: string; seq: number }[] = await manager.query(
    `SELECT \`id\`, \`seq\` FROM \`${table}\` WHERE \`site_id\` = ? AND \`id\` IN (?)`,
    [siteId, wanted],
  )
  return new Map(rows.map((row) => [row.id, row.seq]))
}

/** Running numbers of lots by id. */
export function loadLotNumbers(manager: EntityManager, siteId: string, ids: readonly (string | null)[]): Promise<Map<string, number>> {
  return loadNumbers(manager, 'lot', siteId, ids)
}

/** Running numbers of tests by id. */
export function loadTestNumbers(manager: EntityManager, siteId: string, ids: readonly (string | null)[]): Promise<Map<string, number>> {
  return loadNumbers(manager, 'field_test', siteId, ids)
}

/** What tests are called (T-0142-R1), by id. */
export async function loadTestNames(manager: EntityManager, siteId: string, ids: readonly (string | null)[]): Promise<Map<string, string>> {
  const wanted = [...new Set(ids.filter((id) => id !== null))]
  if (wanted.length === 0) return new Map()
  const rows: { id: string; number: string }[] = await manager.query(
    'SELECT `id`, `number` FROM `field_test` WHERE `site_id` = ? AND `id` IN (?)',
    [siteId, wanted],
  )
  return new Map(rows.map((row) => [row.id, row.number]))
}
