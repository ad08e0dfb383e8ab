import type { EntityManager } from 'typeorm'

/** Rows a single statement carries: far below the packet limit. */
const CHUNK = 1_000

/** Inserts many rows of one table, whole numbers and texts as they are stored. */
export async function insertRows(manager: EntityManager, table: string, columns: readonly string[], rows: readonly (readonly unknown[])[]): Promise<void> {
  const names = columns.map((column) => `\`${column}\``).join(', ')
  for (let at = 0; at < rows.length; at += CHUNK) {
    await manager.query(`INSERT INTO \`${table}\` (${names}) VALUES ?`, [rows.slice(at, at + CHUNK)])
  }
}
