import { hashKey, type Query, type QueryClient, type QueryKey } from '@tanstack/react-query'

/** Which revision of the site saved a change; null where the answer did not say. */
export type Change = { readonly revision: number | null }

/** One key is read again at most this often, however fast a busy site's notices come. */
export const REFRESH_EVERY_MS = 400

type Refreshing = { asked: number; lastAt: number; timer: ReturnType<typeof setTimeout> | null }

const refreshing = new WeakMap<QueryClient, Map<string, Refreshing>>()

function stateOf(client: QueryClient, key: QueryKey): Refreshing {
  const byKey = refreshing.get(client) ?? new Map<string, Refreshing>()
  refreshing.set(client, byKey)
  const name = hashKey(key)
  const state = byKey.get(name) ?? { asked: -1, lastAt: -Infinity, timer: null }
  byKey.set(name, state)
  return state
}

/** The revision an answer carries, where it carries one. */
function revisionOf({ state: { data } }: Query): number | null {
  const revision: unknown = typeof data === 'object' && data !== null && 'revision' in data ? data.revision : null
  return typeof revision === 'number' ? revision : null
}

const isOlder = (query: Query, revision: number): boolean => (revisionOf(query) ?? Infinity) < revision

async function readAgain(client: QueryClient, key: QueryKey, state: Refreshing): Promise<void> {
  state.lastAt = Date.now()
  const { asked } = state
  await client.invalidateQueries({ queryKey: key, predicate: (query) => revisionOf(query) === null || asked < 0 || isOlder(query, asked) })
  // An answer that was on its way when the change was saved is older than the change.
  const late = client.getQueryCache().findAll({ queryKey: key, type: 'active' })
  if (late.some((query) => query.state.status === 'success' && query.state.fetchStatus === 'idle' && isOlder(query, state.asked))) plan(client, key, state)
}

function plan(client: QueryClient, key: QueryKey, state: Refreshing): void {
  if (state.timer !== null) return
  const wait = state.lastAt + REFRESH_EVERY_MS - Date.now()
  if (wait <= 0) {
    void readAgain(client, key, state)
    return
  }
  state.timer = setTimeout(() => {
    state.timer = null
    void readAgain(client, key, state)
  }, wait)
}

/**
 * Reads again what the key covers, unless that was already asked for this revision or a later one (a screen hears of
 * its own change twice, from the answer and from the socket) or the copy at hand is not older.
 */
export function refresh(client: QueryClient, key: QueryKey, { revision }: Change): void {
  const state = stateOf(client, key)
  if (revision !== null && revision <= state.asked) return
  state.asked = Math.max(state.asked, revision ?? -1)
  plan(client, key, state)
}
