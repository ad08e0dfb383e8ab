interface Happened {
  readonly line: number
  readonly test: { readonly id: string; readonly sampledAt: string; readonly follows: { readonly record: string | null } | null }
}

/** Rows in the order in which they happened; a test stands behind the one it follows, equals in the order of the file. */
export function inHappenedOrder<T extends Happened>(rows: readonly T[]): T[] {
  const sorted = [...rows].sort((a, b) => Date.parse(a.test.sampledAt) - Date.parse(b.test.sampledAt) || a.line - b.line)
  const byId = new Map(sorted.map((row) => [row.test.id, row]))
  const order = new Set<T>()
  for (const row of sorted) {
    // the row with all it follows, a ring of followers told off once round
    const chain = new Set<T>()
    for (let each: T | undefined = row; each !== undefined && !chain.has(each) && !order.has(each); each = byId.get(each.test.follows?.record ?? '')) chain.add(each)
    for (const each of [...chain].reverse()) order.add(each)
  }
  return [...order]
}
