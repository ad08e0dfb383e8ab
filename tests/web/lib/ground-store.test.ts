import { beforeEach, describe, expect, it, vi } from 'vitest'
import { groundStateCode } from '#shared/domain/ground-state.ts'
import { encodePatch, type GroundCut, type GroundPatch, type GroundSheet } from '#shared/ground-codec.ts'
import type { Patches } from '#shared/schemas/ground.ts'
import { buildPatch } from '#tests/factories/ground-patch.ts'
import { SURFACE } from '#web/lib/ground-layer.ts'
import { GAP_WAIT_MS, GroundStore, RETRY_MS } from '#web/lib/ground-store.ts'
import type { SiteWatcher } from '#web/lib/live/live-client.ts'

const CELLS = 4
const MEETS = groundStateCode('meets-spec')
const REWORK = groundStateCode('rework')
const LIFT_2: GroundCut = { kind: 'elevation', um: 1_000_000 }

function sheetAt(revision: number, cut: GroundCut = SURFACE, lift = 1): GroundSheet {
  const n = CELLS
  return { revision, cut, state: new Uint8Array(n), flags: new Uint8Array(n), lift: new Int16Array(n).fill(lift), top: new Int32Array(n), lot: new Uint32Array(n), test: new Uint32Array(n) }
}

function patchOf(revision: number, base: number, cell: number, state = MEETS, lift = 1): GroundPatch {
  const standing = { lift, state, flags: 0, top: 0, lot: 0, test: 0 }
  const plain = buildPatch()
  return { ...plain, revision, base, entries: [{ cell, ...standing, surface: standing }], totals: { ...plain.totals, testsTaken: revision }, from: { easting: cell, northing: 0 } }
}

const base64 = (patch: GroundPatch): string => Buffer.from(encodePatch(patch)).toString('base64')

type Reading = { cut: GroundCut; answer: (sheet: GroundSheet) => void; fail: (error: unknown) => void; signal: AbortSignal }

class FakeServer {
  watcher: SiteWatcher | null = null
  left = 0
  readonly readings: Reading[] = []
  readonly asked: number[] = []
  answerPatches: (since: number) => Promise<Patches> = () => Promise.resolve({ reset: false, revision: 0, patches: [] })

  readonly store = new GroundStore({
    readSheet: (cut, signal) => new Promise((answer, fail) => this.readings.push({ cut, answer, fail, signal })),
    readPatches: (since) => {
      this.asked.push(since)
      return this.answerPatches(since)
    },
    watch: (watcher) => {
      this.watcher = watcher
      return () => {
        this.left += 1
        this.watcher = null
      }
    },
    isFinal: (error) => error === 'not a member',
    now: Date.now,
    schedule: (ms, run) => {
      const timer = setTimeout(run, ms)
      return () => clearTimeout(timer)
    },
  })

  join(revision: number): void {
    this.watcher?.joined({ ok: true, revision })
  }

  send(...patches: GroundPatch[]): void {
    this.watcher?.patch({ type: 'ground:patch', siteId: 's', revision: patches.at(-1)?.revision ?? 0, patches: patches.map(encodePatch) })
  }

  head(revision: number): void {
    this.watcher?.head({ type: 'ground:head', siteId: 's', revision })
  }

  async answerSheet(sheet: GroundSheet, index = this.readings.length - 1): Promise<void> {
    this.readings[index]?.answer(sheet)
    await vi.advanceTimersByTimeAsync(0)
  }

  /** Started, joined and read at a revision. */
  async live(revision: number): Promise<void> {
    this.store.start()
    this.join(revision)
    await this.answerSheet(sheetAt(revision))
  }

  view() {
    return this.store.view(SURFACE)
  }

  states(): number[] {
    return [...(this.view().sheet?.state ?? [])]
  }
}

let server: FakeServer

beforeEach(() => {
  vi.useFakeTimers({ now: 1_000_000 })
  server = new FakeServer()
  return () => vi.useRealTimers()
})

describe('the Ground’s store', () => {
  it('reads the sheet once it has joined and is live as of then', async () => {
    server.store.start()
    expect(server.readings).toHaveLength(0)
    expect(server.view()).toMatchObject({ sheet: undefined, status: 'catching-up', asOf: null })
    server.join(7)
    await server.answerSheet(sheetAt(7))
    expect(server.view()).toMatchObject({ revision: 7, status: 'live', asOf: 1_000_000 })
  })

  it('applies patches in order and says which cells changed, whence, and the new totals', async () => {
    await server.live(3)
    const before = server.view().sheet
    server.send(patchOf(4, 3, 1))
    expect(server.states()).toEqual([0, MEETS, 0, 0])
    expect(server.view()).toMatchObject({ revision: 4, changedCells: [1], from: { easting: 1, northing: 0 }, totalsRevision: 4 })
    expect(server.view().totals?.testsTaken).toBe(4)
    expect(server.view().sheet).not.toBe(before)
    server.send(patchOf(5, 4, 2), patchOf(6, 5, 3))
    expect(server.view()).toMatchObject({ revision: 6, changedCells: [2, 3], from: { easting: 3, northing: 0 } })
  })

  it('applies a patch whose base is below its own revision, because revisions between touched no cell', async () => {
    await server.live(3)
    server.send(patchOf(9, 2, 0))
    expect(server.view()).toMatchObject({ revision: 9, status: 'live' })
    expect(server.asked).toEqual([])
  })

  it('drops a patch it has, so that an older one never overwrites a newer state', async () => {
    await server.live(3)
    server.send(patchOf(4, 3, 1), patchOf(5, 4, 1, REWORK))
    const view = server.view()
    server.send(patchOf(4, 3, 1))
    expect(server.states()).toEqual([0, REWORK, 0, 0])
    expect(server.view().sheet).toBe(view.sheet)
    expect(server.view().revision).toBe(5)
  })

  it('waits for a missing patch that comes by itself and asks for nothing', async () => {
    await server.live(3)
    server.send(patchOf(5, 4, 2))
    expect(server.states()).toEqual([0, 0, 0, 0])
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS - 1)
    server.send(patchOf(4, 3, 1))
    expect(server.states()).toEqual([0, MEETS, MEETS, 0])
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS * 4)
    expect(server.asked).toEqual([])
    expect(server.view().status).toBe('live')
  })

  it('asks for a missing patch after a wait and applies it with the one that waited', async () => {
    await server.live(3)
    server.answerPatches = () => Promise.resolve({ reset: false, revision: 5, patches: [base64(patchOf(4, 3, 1)), base64(patchOf(5, 4, 2))] })
    server.send(patchOf(5, 4, 2), patchOf(6, 5, 3))
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS)
    expect(server.asked).toEqual([3])
    expect(server.states()).toEqual([0, MEETS, MEETS, MEETS])
    expect(server.view()).toMatchObject({ revision: 6, status: 'live' })
  })

  it('says that it is catching up while a gap is being filled, and tries again when that fails', async () => {
    await server.live(3)
    server.answerPatches = () => Promise.reject(new Error('unreachable'))
    server.send(patchOf(5, 4, 2))
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS)
    expect(server.view().status).toBe('catching-up')
    server.answerPatches = () => Promise.resolve({ reset: false, revision: 5, patches: [base64(patchOf(4, 3, 1))] })
    await vi.advanceTimersByTimeAsync(RETRY_MS)
    expect(server.asked).toEqual([3, 3])
    expect(server.view()).toMatchObject({ revision: 5, status: 'live' })
  })

  it('finds a lost last patch by the head revision', async () => {
    await server.live(3)
    server.answerPatches = () => Promise.resolve({ reset: false, revision: 4, patches: [base64(patchOf(4, 3, 1))] })
    server.head(4)
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS)
    expect(server.asked).toEqual([3])
    expect(server.states()).toEqual([0, MEETS, 0, 0])
  })

  it('asks once about a head whose revision touched no cell, and stays live meanwhile', async () => {
    await server.live(3)
    server.head(4)
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS)
    server.head(4)
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS * 4)
    expect(server.asked).toEqual([3])
    expect(server.view()).toMatchObject({ revision: 4, status: 'live' })
    server.send(patchOf(5, 2, 0))
    expect(server.view().revision).toBe(5)
  })

  it('moves its "as of" with each head that it has, and not while it misses something', async () => {
    await server.live(3)
    await vi.advanceTimersByTimeAsync(5_000)
    server.head(3)
    expect(server.view().asOf).toBe(1_005_000)
    await vi.advanceTimersByTimeAsync(5_000)
    server.head(4)
    expect(server.view().asOf).toBe(1_005_000)
  })

  it('reads the sheet again when it is told that the patches are no longer kept', async () => {
    await server.live(3)
    server.answerPatches = () => Promise.resolve({ reset: true, revision: 900, patches: [] })
    server.send(patchOf(900, 899, 0))
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS)
    expect(server.readings).toHaveLength(2)
    expect(server.view()).toMatchObject({ revision: 3, status: 'catching-up' })
    const sheet = sheetAt(901)
    sheet.state[3] = REWORK
    await server.answerSheet(sheet)
    expect(server.states()).toEqual([0, 0, 0, REWORK])
    expect(server.view()).toMatchObject({ revision: 901, status: 'live' })
  })

  it('keeps patches that arrive while the sheet is being read, and applies those the sheet does not hold', async () => {
    server.store.start()
    server.join(3)
    server.send(patchOf(4, 3, 0, REWORK))
    server.send(patchOf(5, 4, 1))
    const sheet = sheetAt(4)
    sheet.state[0] = MEETS
    await server.answerSheet(sheet)
    expect(server.states()).toEqual([MEETS, MEETS, 0, 0])
    expect(server.view()).toMatchObject({ revision: 5, status: 'live' })
  })

  it('is offline since the loss, keeps its sheet, and catches up at once when it is back', async () => {
    await server.live(3)
    await vi.advanceTimersByTimeAsync(60_000)
    server.watcher?.lost()
    await vi.advanceTimersByTimeAsync(60_000)
    server.watcher?.lost()
    expect(server.view()).toMatchObject({ revision: 3, status: 'offline', offlineSince: 1_060_000, asOf: 1_000_000 })
    server.answerPatches = () => Promise.resolve({ reset: false, revision: 5, patches: [base64(patchOf(5, 3, 2))] })
    server.join(5)
    expect(server.view().status).toBe('catching-up')
    await vi.advanceTimersByTimeAsync(0)
    expect(server.asked).toEqual([3])
    expect(server.states()).toEqual([0, 0, MEETS, 0])
    expect(server.view()).toMatchObject({ revision: 5, status: 'live', offlineSince: null, asOf: 1_120_000 })
  })

  it('reads the sheet even where no socket gets through, and says that it is offline', async () => {
    server.store.start()
    server.watcher?.lost()
    await server.answerSheet(sheetAt(3))
    expect(server.view()).toMatchObject({ revision: 3, status: 'offline' })
  })

  it('keeps an elevation cut live while it is shown: only the lift that it shows counts', async () => {
    await server.live(3)
    const hide = server.store.show(LIFT_2)
    await server.answerSheet(sheetAt(3, LIFT_2, 2))
    server.send(patchOf(4, 3, 0, REWORK, 1), patchOf(5, 4, 1, MEETS, 2))
    expect([...(server.store.view(LIFT_2).sheet?.state ?? [])]).toEqual([0, MEETS, 0, 0])
    expect(server.store.view(LIFT_2)).toMatchObject({ revision: 5, changedCells: [1] })
    expect(server.states()).toEqual([REWORK, MEETS, 0, 0])
    hide()
    expect(server.store.view(LIFT_2).sheet).toBeUndefined()
    server.send(patchOf(6, 5, 2))
    expect(server.view().revision).toBe(6)
  })

  it('drops the reading of a cut that is no longer shown', async () => {
    await server.live(3)
    server.store.show(LIFT_2)()
    expect(server.readings[1]?.signal.aborted).toBe(true)
    await server.answerSheet(sheetAt(3, LIFT_2, 2), 1)
    expect(server.store.view(LIFT_2).sheet).toBeUndefined()
  })

  it('tries to read again when that failed, but not when the person is not a member', async () => {
    server.store.start()
    server.join(3)
    server.readings[0]?.fail(new Error('unreachable'))
    await vi.advanceTimersByTimeAsync(RETRY_MS)
    expect(server.readings).toHaveLength(2)
    server.readings[1]?.fail('not a member')
    await vi.advanceTimersByTimeAsync(RETRY_MS * 5)
    expect(server.readings).toHaveLength(2)
    expect(server.view()).toMatchObject({ sheet: undefined, error: 'not a member' })
  })

  it('asks for the patches when one comes that it cannot read', async () => {
    await server.live(3)
    server.answerPatches = () => Promise.resolve({ reset: false, revision: 4, patches: [base64(patchOf(4, 3, 1))] })
    server.watcher?.patch({ type: 'ground:patch', siteId: 's', revision: 4, patches: [new Uint8Array([1, 2, 3])] })
    await vi.advanceTimersByTimeAsync(GAP_WAIT_MS)
    expect(server.view()).toMatchObject({ revision: 4, status: 'live' })
  })

  it('gives the same view until something changes, so that React renders nothing in vain', async () => {
    await server.live(3)
    const heard = vi.fn()
    server.store.subscribe(heard)
    expect(server.view()).toBe(server.view())
    server.send(patchOf(4, 3, 1))
    expect(heard).toHaveBeenCalledOnce()
  })

  it('leaves the room when it stops and goes on from what it has when it starts again', async () => {
    await server.live(3)
    server.store.stop()
    expect(server.left).toBe(1)
    server.answerPatches = () => Promise.resolve({ reset: false, revision: 4, patches: [base64(patchOf(4, 3, 1))] })
    server.store.start()
    server.join(4)
    await vi.advanceTimersByTimeAsync(0)
    expect(server.readings).toHaveLength(1)
    expect(server.view()).toMatchObject({ revision: 4, status: 'live' })
  })
})
