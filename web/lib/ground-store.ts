import { decodePatch, type GroundCut, type GroundPatch, type GroundSheet, type GroundTotals } from '#shared/ground-codec.ts'
import { bytesOf } from '#shared/realtime.ts'
import type { Patches } from '#shared/schemas/ground.ts'
import type { SitePoint } from '#shared/domain/site-geometry.ts'
import { advanceLayer, endReading, layerName, newLayer, SURFACE, type GroundLayer } from './ground-layer.ts'
import type { SiteWatcher } from './live/live-client.ts'

export type GroundStatus = 'live' | 'catching-up' | 'offline'

/** The Ground as one cut shows it. A new object at each change; `sheet` is a new object at each change of cells. */
export interface GroundView {
  readonly sheet: GroundSheet | undefined
  /** revision the sheet stands at, 0 before it was read; revisions after the last patch that changed no cell count */
  readonly revision: number
  /** cells the newest change touched, and where that change came from */
  readonly changedCells: readonly number[]
  readonly from: SitePoint | null
  /** totals of the newest patch and its revision; null until one came (the board has them before) */
  readonly totals: GroundTotals | null
  readonly totalsRevision: number
  readonly status: GroundStatus
  /** epoch ms at which the sheet was last known to be what the server has, null before that */
  readonly asOf: number | null
  /** epoch ms of the loss while offline, else null */
  readonly offlineSince: number | null
  /** why the sheet could not be read the last time, null when it could */
  readonly error: unknown
}

export interface GroundDeps {
  readonly readSheet: (cut: GroundCut, signal: AbortSignal) => Promise<GroundSheet>
  readonly readPatches: (since: number) => Promise<Patches>
  /** joins the site's room; returns how to leave */
  readonly watch: (watcher: SiteWatcher) => () => void
  /** an answer that a second try will not change, such as "not a member" */
  readonly isFinal: (error: unknown) => boolean
  readonly now: () => number
  /** returns how to cancel */
  readonly schedule: (ms: number, run: () => void) => () => void
}

/** How long a missing patch may still come by itself before it is asked for. */
export const GAP_WAIT_MS = 250
export const RETRY_MS = 2_000
/** While a sheet is being read this many patches are kept; older ones are asked for again. */
const MOST_HELD = 1_000

/** The live sheets of one site: joins, buffers, reads, applies, and catches up by itself. Knows neither React nor the network. */
export class GroundStore {
  readonly #deps: GroundDeps
  readonly #layers = new Map<string, GroundLayer>([['surface', newLayer(SURFACE)]])
  readonly #listeners = new Set<() => void>()
  readonly #views = new Map<string, GroundView>()
  #leave: (() => void) | null = null
  #held: GroundPatch[] = []
  #head = 0
  #connected = false
  #offlineSince: number | null = null
  #asOf: number | null = null
  #totals: { readonly totals: GroundTotals; readonly revision: number } | null = null
  #cancelCatchUp: (() => void) | null = null
  #asking = false
  /** patches are known to be missing and are being fetched */
  #behind = false

  constructor(deps: GroundDeps) {
    this.#deps = deps
  }

  start(): void {
    this.#leave ??= this.#deps.watch({
      joined: (answer) => (answer.ok ? this.#joined(answer.revision) : this.#lost()),
      patch: ({ revision, patches }) => this.#take(revision, () => patches.map((binary) => decodePatch(bytesOf(binary)))),
      head: ({ revision }) => this.#hearHead(revision),
      lost: () => this.#lost(),
    })
  }

  /** Leaves the room and ends what is under way; start() goes on from what is at hand. */
  stop(): void {
    this.#leave?.()
    this.#leave = null
    this.#connected = false
    this.#cancelCatchUp?.()
    this.#cancelCatchUp = null
    for (const layer of this.#layers.values()) endReading(layer)
  }

  subscribe(listener: () => void): () => void {
    this.#listeners.add(listener)
    return () => void this.#listeners.delete(listener)
  }

  /** Keeps the sheet of a cut live until the returned function is called. The surface always is. */
  show(cut: GroundCut): () => void {
    const name = layerName(cut)
    const layer = this.#layers.get(name) ?? newLayer(cut)
    this.#layers.set(name, layer)
    layer.shown += 1
    if (layer.sheet === undefined && this.#connected) this.#read(layer)
    return () => {
      layer.shown -= 1
      if (layer.shown > 0 || cut.kind === 'surface') return
      endReading(layer)
      this.#layers.delete(name)
      this.#views.delete(name)
    }
  }

  /** The same object until something changes. */
  view(cut: GroundCut): GroundView {
    const name = layerName(cut)
    const known = this.#views.get(name)
    if (known !== undefined) return known
    const made = this.#makeView(this.#layers.get(name) ?? newLayer(cut))
    this.#views.set(name, made)
    return made
  }

  #makeView(layer: GroundLayer): GroundView {
    const busy = this.#behind || layer.sheet === undefined || layer.reading !== null
    const status = this.#offlineSince !== null ? 'offline' : busy || !this.#connected ? 'catching-up' : 'live'
    const { sheet, have, changedCells, from, error } = layer
    const shared = { status, asOf: this.#asOf, offlineSince: this.#offlineSince, totals: this.#totals?.totals ?? null, totalsRevision: this.#totals?.revision ?? 0 } as const
    return { sheet, revision: have, changedCells, from, error, ...shared }
  }

  #emit(): void {
    this.#views.clear()
    for (const listener of this.#listeners) listener()
  }

  #loaded(): GroundLayer[] {
    return [...this.#layers.values()].filter(({ sheet, reading }) => sheet !== undefined && reading === null)
  }

  #have(): number {
    return Math.min(...this.#loaded().map(({ have }) => have))
  }

  #joined(revision: number): void {
    this.#connected = true
    this.#offlineSince = null
    this.#head = Math.max(this.#head, revision)
    for (const layer of this.#layers.values()) if (layer.sheet === undefined) this.#read(layer)
    if (this.#loaded().length > 0 && this.#have() < this.#head) {
      this.#behind = true
      this.#catchUp(0)
    } else this.#confirm()
    this.#emit()
  }

  #lost(): void {
    this.#connected = false
    this.#offlineSince ??= this.#deps.now()
    this.#behind = false
    this.#cancelCatchUp?.()
    this.#cancelCatchUp = null
    // a network that lets no socket through may still let the sheet through
    for (const layer of this.#layers.values()) if (layer.sheet === undefined) this.#read(layer)
    this.#emit()
  }

  #hearHead(revision: number): void {
    this.#head = Math.max(this.#head, revision)
    if (this.#loaded().length === 0) return
    if (this.#have() < this.#head) this.#catchUp(GAP_WAIT_MS)
    else this.#confirm()
    this.#emit()
  }

  #confirm(): void {
    if (this.#connected && this.#loaded().length > 0 && this.#have() >= this.#head) this.#asOf = this.#deps.now()
  }

  /** Takes patches in, however they came; bytes that cannot be read are asked for again. */
  #take(revision: number, decode: () => GroundPatch[]): void {
    this.#head = Math.max(this.#head, revision)
    try {
      this.#hold(decode())
    } catch {
      this.#catchUp(GAP_WAIT_MS)
    }
    this.#drain()
    this.#emit()
  }

  #hold(patches: readonly GroundPatch[]): void {
    const byRevision = new Map([...this.#held, ...patches].map((patch) => [patch.revision, patch]))
    this.#held = [...byRevision.values()].sort((a, b) => a.revision - b.revision).slice(-MOST_HELD)
  }

  /** Applies to each sheet what follows it without a gap. Says whether a gap is left. */
  #drain(): boolean {
    const loaded = this.#loaded()
    const gaps = loaded.map((layer) => this.#advance(layer))
    const gap = gaps.includes(true)
    if (loaded.length === this.#layers.size) this.#held = this.#held.filter(({ revision }) => revision > this.#have())
    if (gap) this.#catchUp(GAP_WAIT_MS)
    else this.#confirm()
    return gap
  }

  #advance(layer: GroundLayer): boolean {
    const { last, gap } = advanceLayer(layer, this.#held)
    this.#head = Math.max(this.#head, layer.have)
    if (last !== null && last.revision > (this.#totals?.revision ?? -1)) this.#totals = { totals: last.totals, revision: last.revision }
    return gap
  }

  #read(layer: GroundLayer): void {
    if (layer.reading !== null || this.#leave === null) return
    layer.cancelRetry?.()
    layer.cancelRetry = null
    const reading = new AbortController()
    layer.reading = reading
    this.#deps.readSheet(layer.cut, reading.signal).then(
      (sheet) => {
        if (layer.reading !== reading) return
        Object.assign(layer, { sheet, have: sheet.revision, reading: null, error: null, changedCells: [], from: null })
        this.#drain()
        this.#emit()
      },
      (error: unknown) => {
        if (layer.reading !== reading) return
        Object.assign(layer, { reading: null, error })
        if (!this.#deps.isFinal(error)) layer.cancelRetry = this.#deps.schedule(RETRY_MS, () => this.#read(layer))
        this.#emit()
      },
    )
  }

  #catchUp(wait: number): void {
    if (this.#asking || this.#cancelCatchUp !== null || !this.#connected) return
    this.#cancelCatchUp = this.#deps.schedule(wait, () => {
      this.#cancelCatchUp = null
      void this.#ask()
    })
  }

  async #ask(): Promise<void> {
    if (this.#loaded().length === 0) return
    const gap = this.#held.some(({ revision }) => revision > this.#have())
    if (!gap && this.#have() >= this.#head) {
      this.#behind = false
      return
    }
    this.#asking = true
    this.#behind ||= gap
    const known = this.#head
    try {
      this.#accept(await this.#deps.readPatches(this.#have()), known)
      this.#asking = false
      if (this.#loaded().length > 0 && this.#have() < this.#head) this.#catchUp(GAP_WAIT_MS)
    } catch (error) {
      this.#asking = false
      this.#behind = true
      if (!this.#deps.isFinal(error)) this.#catchUp(RETRY_MS)
    }
    this.#emit()
  }

  /** @param known a revision that was committed before the patches were asked for: up to it nothing is missing now */
  #accept({ reset, patches }: Patches, known: number): void {
    this.#behind = false
    if (reset) {
      for (const layer of this.#loaded()) this.#read(layer)
      return
    }
    this.#hold(patches.map((text) => decodePatch(Uint8Array.from(atob(text), (letter) => letter.charCodeAt(0)))))
    if (this.#drain()) return
    for (const layer of this.#loaded()) layer.have = Math.max(layer.have, known)
    this.#confirm()
  }
}
