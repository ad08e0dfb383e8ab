import { useEffect, useMemo, useSyncExternalStore } from 'react'
import { decodeSheet, type GroundCut } from '#shared/ground-codec.ts'
import { patchesSchema } from '#shared/schemas/ground.ts'
import { apiBytes, apiJson } from './api-client.ts'
import { isApiError } from './api-error.ts'
import { SURFACE } from './ground-layer.ts'
import { GroundStore, type GroundView } from './ground-store.ts'
import { live } from './live/live-client.ts'

/** A store that nobody looks at is kept this long, so that going from page to page reads nothing again. */
const KEEP_MS = 10_000

type Kept = { readonly store: GroundStore; users: number; timer: ReturnType<typeof setTimeout> | null }

const kept = new Map<string, Kept>()

function openStore(siteId: string): GroundStore {
  const address = `/api/sites/${encodeURIComponent(siteId)}/ground`
  return new GroundStore({
    readSheet: async (cut, signal) => decodeSheet(new Uint8Array(await apiBytes(address, { query: { cut: cut.kind === 'surface' ? 'surface' : cut.um }, signal }))),
    readPatches: (since) => apiJson(`${address}/patches`, patchesSchema, { query: { since } }),
    watch: (watcher) => live.watch(siteId, watcher),
    isFinal: (error) => isApiError(error) && error.status >= 400 && error.status < 500,
    now: Date.now,
    schedule: (ms, run) => {
      const timer = setTimeout(run, ms)
      return () => clearTimeout(timer)
    },
  })
}

function keptOf(siteId: string): Kept {
  const known = kept.get(siteId)
  if (known !== undefined) return known
  const made: Kept = { store: openStore(siteId), users: 0, timer: null }
  kept.set(siteId, made)
  return made
}

function use(siteId: string, listener: () => void): () => void {
  const entry = keptOf(siteId)
  if (entry.timer !== null) clearTimeout(entry.timer)
  entry.timer = null
  entry.users += 1
  entry.store.start()
  const unsubscribe = entry.store.subscribe(listener)
  return () => {
    unsubscribe()
    entry.users -= 1
    if (entry.users > 0) return
    entry.timer = setTimeout(() => {
      entry.store.stop()
      if (kept.get(siteId) === entry) kept.delete(siteId)
    }, KEEP_MS)
  }
}

/** Forgets the Ground of one site, or of all: for signing out and for a membership that is gone. */
export function forgetGround(siteId?: string): void {
  for (const [id, { store, timer }] of kept) {
    if (siteId !== undefined && siteId !== id) continue
    if (timer !== null) clearTimeout(timer)
    store.stop()
    kept.delete(id)
  }
}

/**
 * The live Ground of a site at a cut. The surface is live as long as anybody looks at the site; another cut while it
 * is shown. Renders again at each change and, through `asOf`, every few seconds.
 */
export function useGround(siteId: string, cut: GroundCut = SURFACE): GroundView {
  const um = cut.kind === 'elevation' ? cut.um : null
  const stable = useMemo<GroundCut>(() => (um === null ? SURFACE : { kind: 'elevation', um }), [um])
  const subscribe = useMemo(() => (listener: () => void) => use(siteId, listener), [siteId])
  useEffect(() => keptOf(siteId).store.show(stable), [siteId, stable])
  return useSyncExternalStore(subscribe, () => keptOf(siteId).store.view(stable))
}
