import type { BoardServer } from '#api/realtime/socket-types.ts'
import { sessionRoom, siteRoom, userRoom } from '#shared/realtime.ts'
import type { MembershipChangedEvent, SiteChangedEvent } from '#shared/realtime.ts'

/** What one revision did to the Ground, encoded by ground-codec. */
export interface PatchPublication {
  readonly type: 'patch'
  readonly siteId: string
  readonly revision: number
  readonly body: Uint8Array
}

/** To one person, on every socket the person has open. */
export interface MemberPublication {
  readonly type: 'member'
  readonly userId: string
  readonly event: MembershipChangedEvent
}

/** To everybody who has the site open, or to one person. */
export type Publication = PatchPublication | SiteChangedEvent | MemberPublication

/** Tells the open boards; called only with what is committed. */
export interface Publisher {
  publish(publications: readonly Publication[]): void
  /** closes the sockets that came with a session */
  endSession(sessionId: string): void
}

/** For commands and seeding, where nobody listens. */
export const silentPublisher: Publisher = {
  publish: () => undefined,
  endSession: () => undefined,
}

/** While a site is busy its room hears at most this often; when it is idle, at once. */
export const COALESCE_MS = 50

/** socket.io's parser takes at most ten binary attachments in a message and hangs up at more. */
const PATCHES_A_MESSAGE = 8

type SitePublication = Exclude<Publication, MemberPublication>

export function createPublisher(io: BoardServer): Publisher {
  const waiting = new Map<string, SitePublication[]>()

  function flush(siteId: string): void {
    const queue = waiting.get(siteId)
    if (!queue || queue.length === 0) {
      waiting.delete(siteId)
      return
    }
    waiting.set(siteId, [])
    send(io, siteId, queue)
    setTimeout(() => flush(siteId), COALESCE_MS).unref()
  }

  function enqueue(siteId: string, publications: readonly SitePublication[]): void {
    const queue = waiting.get(siteId)
    if (queue) {
      queue.push(...publications)
      return
    }
    waiting.set(siteId, [...publications])
    flush(siteId)
  }

  return {
    publish(publications) {
      const bySite = new Map<string, SitePublication[]>()
      for (const publication of publications) {
        if (publication.type === 'member') tellMember(io, publication)
        else bySite.set(publication.siteId, [...(bySite.get(publication.siteId) ?? []), publication])
      }
      for (const [siteId, group] of bySite) enqueue(siteId, group)
    },
    endSession(sessionId) {
      io.in(sessionRoom(sessionId)).disconnectSockets(true)
    },
  }
}

/** Patches first, in as few messages as carry them; then each changed thing once, with its latest instant. */
function send(io: BoardServer, siteId: string, queue: readonly SitePublication[]): void {
  const room = io.to(siteRoom(siteId))
  const patches = queue.filter((publication) => publication.type === 'patch').sort((a, b) => a.revision - b.revision)
  for (let from = 0; from < patches.length; from += PATCHES_A_MESSAGE) {
    const part = patches.slice(from, from + PATCHES_A_MESSAGE)
    room.emit('ground:patch', { type: 'ground:patch', siteId, revision: part.at(-1)?.revision ?? 0, patches: part.map(({ body }) => body) })
  }
  const changed = new Map<string, SiteChangedEvent>()
  for (const publication of queue) {
    if (publication.type === 'site:changed') changed.set(`${publication.resource} ${publication.id}`, publication)
  }
  for (const event of changed.values()) room.emit('site:changed', event)
}

/** Somebody who no longer belongs to the site leaves its room before hearing why. */
function tellMember(io: BoardServer, { userId, event }: MemberPublication): void {
  if (event.role === null) io.in(userRoom(userId)).socketsLeave(siteRoom(event.siteId))
  io.to(userRoom(userId)).emit('membership:changed', event)
}
