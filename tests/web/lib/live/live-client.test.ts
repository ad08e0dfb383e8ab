import { beforeEach, describe, expect, it, vi } from 'vitest'
import type { JoinAnswer, ServerEvent } from '#shared/realtime.ts'
import { LiveClient, type LiveSocket, type SiteWatcher } from '#web/lib/live/live-client.ts'

class FakeSocket {
  connected = false
  readonly sent: unknown[][] = []
  readonly #handlers = new Map<string, ((event?: unknown) => void)[]>()
  answer: JoinAnswer = { ok: true, revision: 3 }

  on(name: string, handler: (event?: unknown) => void): this {
    this.#handlers.set(name, [...(this.#handlers.get(name) ?? []), handler])
    return this
  }

  emit(name: string, siteId: string, answer?: (answer: JoinAnswer) => void): this {
    this.sent.push([name, siteId])
    answer?.(this.answer)
    return this
  }

  disconnect(): this {
    this.fire('disconnect')
    return this
  }

  fire(name: string, event?: unknown): void {
    if (name === 'connect') this.connected = true
    if (name === 'disconnect') this.connected = false
    for (const handler of this.#handlers.get(name) ?? []) handler(event)
  }
}

const watcherOf = () => ({ joined: vi.fn(), patch: vi.fn(), head: vi.fn(), lost: vi.fn() }) satisfies SiteWatcher

let sockets: FakeSocket[]
let client: LiveClient

beforeEach(() => {
  sockets = []
  client = new LiveClient(() => {
    const socket = new FakeSocket()
    sockets.push(socket)
    return socket as unknown as LiveSocket
  })
})

describe('the live connection', () => {
  it('joins a site that was watched before it was up, and again after each loss', () => {
    const watcher = watcherOf()
    const reconnected = vi.fn()
    client.onReconnect(reconnected)
    client.watch('a', watcher)
    client.connect()
    client.connect()
    expect(sockets).toHaveLength(1)
    sockets[0]?.fire('connect')
    expect(reconnected).not.toHaveBeenCalled()
    sockets[0]?.fire('disconnect')
    expect(watcher.lost).toHaveBeenCalledOnce()
    sockets[0]?.fire('connect')
    expect(reconnected).toHaveBeenCalledOnce()
    expect(sockets[0]?.sent).toEqual([['site:join', 'a'], ['site:join', 'a']])
    expect(watcher.joined).toHaveBeenCalledTimes(2)
    expect(watcher.joined).toHaveBeenLastCalledWith({ ok: true, revision: 3 })
  })

  it('leaves a room when the last who watches the site has gone', () => {
    client.connect()
    sockets[0]?.fire('connect')
    const stops = [client.watch('a', watcherOf()), client.watch('a', watcherOf())]
    stops[0]?.()
    expect(sockets[0]?.sent.filter(([name]) => name === 'site:leave')).toEqual([])
    stops[1]?.()
    expect(sockets[0]?.sent.at(-1)).toEqual(['site:leave', 'a'])
  })

  it('gives patches and heads to those who watch that site only, and every event to its listeners', () => {
    const [a, b, listener] = [watcherOf(), watcherOf(), vi.fn()]
    client.connect()
    sockets[0]?.fire('connect')
    client.watch('a', a)
    client.watch('b', b)
    client.listen(listener)
    const patch: ServerEvent = { type: 'ground:patch', siteId: 'a', revision: 4, patches: [] }
    const head: ServerEvent = { type: 'ground:head', siteId: 'b', revision: 9 }
    sockets[0]?.fire('ground:patch', patch)
    sockets[0]?.fire('ground:head', head)
    expect(a.patch.mock.calls).toEqual([[patch]])
    expect(a.head).not.toHaveBeenCalled()
    expect(b.head.mock.calls).toEqual([[head]])
    expect(listener.mock.calls).toEqual([[patch], [head]])
  })

  it('asks again to join when the server could not look, and hears nothing of a connection that it closed', () => {
    vi.useFakeTimers()
    const watcher = watcherOf()
    client.connect()
    const socket = sockets[0]
    if (socket === undefined) throw new Error('no socket')
    socket.answer = { ok: false, code: 'unavailable' }
    socket.fire('connect')
    client.watch('a', watcher)
    socket.answer = { ok: true, revision: 5 }
    vi.advanceTimersByTime(10_000)
    expect(watcher.joined.mock.calls).toEqual([[{ ok: false, code: 'unavailable' }], [{ ok: true, revision: 5 }]])
    client.disconnect()
    expect(watcher.lost).not.toHaveBeenCalled()
    vi.useRealTimers()
  })
})
