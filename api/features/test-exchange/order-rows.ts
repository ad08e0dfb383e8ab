import type { ImportRow } from '#shared/schemas/test-exchange.ts'

/** Rows in the order in which they happened; a test stands behind the one it follows, equals in the order of the file. */
export function inHappenedOrder(rows: readonly ImportRow[]): ImportRow[] {
  const sorted = [...rows].sort((a, b) => Date.parse(a.test.sampledAt) - Date.parse(b.test.sampledAt) || a.line - b.line)
  const byId = new Map(sorted.map((row) => [row.test.id, row]))
  const placed = new Set<ImportRow>()
  const place = (row: ImportRow): void => {
    if (placed.has(row)) return
    // before the row it follows is looked at, so that a ring of followers ends
    placed.add(row)
    const followed = byId.get(row.test.follows?.record ?? '')
    if (followed) place(followed)
    order.push(row)
  }
  const order: ImportRow[] = []
  for (const row of sorted) place(row)
  return order
}
