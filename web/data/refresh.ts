import { hashKey, type QueryClient, type QueryKey } from '@tanstack/react-query'

/** What changed and which revision of the site saved it; null where the answer did not say. */
export type Change = { readonly id: string; readonly revision: number | null }

const asked = new WeakMap<QueryClient, Map<string, number>>()

/**
 * Reads again what the key covers, unless it was already read again for this revision or a later one: a screen
 * hears of its own change twice, from the answer and from the socket.
 */
export function refresh(client: QueryClient, key: QueryKey, { id, revision }: Change): void {
  if (revision !== null) {
    const seen = asked.get(client) ?? new Map<string, number>()
    asked.set(client, seen)
    const name = `${hashKey(key)} ${id}`
    if ((seen.get(name) ?? -1) >= revision) return
    seen.set(name, revision)
  }
  void client.invalidateQueries({ queryKey: key })
}

/** Reads again whatever the key covers. */
export function refreshAll(client: QueryClient, key: QueryKey): void {
  void client.invalidateQueries({ queryKey: key })
}
