import { io, type Socket } from 'socket.io-client'
import { SERVER_EVENT_TYPES, type ClientToServerEvents, type GroundHeadEvent, type GroundPatchEvent, type JoinAnswer, type ServerEvent, type ServerToClientEvents } from '#shared/realtime.ts'

/** What somebody who watches one site hears. */
export interface SiteWatcher {
  /** the server's answer to joining the site's room, at first and after each reconnect */
  readonly joined: (answer: JoinAnswer) => void
  readonly patch: (event: GroundPatchEvent) => void
  readonly head: (event: GroundHeadEvent) => void
  /** the connection was lost, or could not be made */
  readonly lost: () => void
}

export type LiveSocket = Pick<Socket<ServerToClientEvents, ClientToServerEvents>, 'on' | 'emit' | 'connected' | 'disconnect'>

/** A server that could not look the membership up is asked again after this time. */
const ASK_AGAIN_MS = 3_000

/** One connection for one signed-in person; sites are joined while somebody watches them. */
export class LiveClient {
  #socket: LiveSocket | null = null
  #wasConnected = false
  readonly #watchers = new Map<string, Set<SiteWatcher>>()
  readonly #listeners = new Set<(event: ServerEvent) => void>()
  readonly #onReconnect = new Set<() => void>()
  readonly #openSocket: () => LiveSocket

  constructor(openSocket: () => LiveSocket) {
    this.#openSocket = openSocket
  }

  /** Opens the connection for the person who is signed in now. */
  connect(): void {
    if (this.#socket !== null) return
    const socket = this.#openSocket()
    this.#socket = socket
    socket.on('connect', () => this.#connected(socket))
    socket.on('disconnect', () => this.#lost(socket))
    socket.on('connect_error', () => this.#lost(socket))
    for (const type of SERVER_EVENT_TYPES) socket.on(type, (event: ServerEvent) => this.#hear(event))
  }

  /** Closes it, for signing out; sites that are still watched stay unheard until the next connect(). */
  disconnect(): void {
    const socket = this.#socket
    this.#socket = null
    this.#wasConnected = false
    socket?.disconnect()
  }

  /** Hears every event. Returns how to stop. */
  listen(listener: (event: ServerEvent) => void): () => void {
    this.#listeners.add(listener)
    return () => void this.#listeners.delete(listener)
  }

  /** Called each time the connection is back after a loss. Returns how to stop. */
  onReconnect(listener: () => void): () => void {
    this.#onReconnect.add(listener)
    return () => void this.#onReconnect.delete(listener)
  }

  /** Joins a site's room, now and after each reconnect. Returns how to leave. */
  watch(siteId: string, watcher: SiteWatcher): () => void {
    const watchers = this.#watchers.get(siteId) ?? new Set()
    this.#watchers.set(siteId, watchers)
    watchers.add(watcher)
    if (this.#socket?.connected === true) this.#join(this.#socket, siteId, watcher)
    return () => {
      watchers.delete(watcher)
      if (watchers.size > 0 || this.#watchers.get(siteId) !== watchers) return
      this.#watchers.delete(siteId)
      if (this.#socket?.connected === true) this.#socket.emit('site:leave', siteId)
    }
  }

  #connected(socket: LiveSocket): void {
    if (socket !== this.#socket) return
    for (const [siteId, watchers] of this.#watchers) for (const watcher of watchers) this.#join(socket, siteId, watcher)
    if (this.#wasConnected) for (const listener of this.#onReconnect) listener()
    this.#wasConnected = true
  }

  #lost(socket: LiveSocket): void {
    if (socket !== this.#socket) return
    for (const watchers of this.#watchers.values()) for (const watcher of watchers) watcher.lost()
  }

  #join(socket: LiveSocket, siteId: string, watcher: SiteWatcher): void {
    const stillWatches = (): boolean => socket === this.#socket && this.#watchers.get(siteId)?.has(watcher) === true
    socket.emit('site:join', siteId, (answer) => {
      if (!stillWatches()) return
      watcher.joined(answer)
      if (answer.ok || answer.code !== 'unavailable') return
      setTimeout(() => {
        if (stillWatches() && socket.connected) this.#join(socket, siteId, watcher)
      }, ASK_AGAIN_MS)
    })
  }

  #hear(event: ServerEvent): void {
    if (event.type === 'ground:patch') this.#watchers.get(event.siteId)?.forEach((watcher) => watcher.patch(event))
    if (event.type === 'ground:head') this.#watchers.get(event.siteId)?.forEach((watcher) => watcher.head(event))
    for (const listener of this.#listeners) listener(event)
  }
}

/** The page's one connection. */
export const live = new LiveClient(() => io({ transports: ['websocket', 'polling'], tryAllTransports: true, reconnectionDelayMax: 5_000 }))
