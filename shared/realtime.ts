import type { ErrorCode } from '#shared/error-codes.ts'

/** What a change notice can be about. The row itself is not sent: the client fetches what it shows. */
export const CHANGED_RESOURCES = [
  'placement',
  'test',
  'lot',
  'stake',
  'order',
  'release',
  'curve',
  'one-point',
  'material',
  'calibration',
  'gauge',
  'zone',
  'member',
  'inspection',
  'disposition',
  'view',
  'attachment',
  'site',
] as const

export type ChangedResource = (typeof CHANGED_RESOURCES)[number]

/** Binary as it arrives: an ArrayBuffer in a browser, a Uint8Array (Buffer) in Node. */
export type Binary = Uint8Array | ArrayBuffer

/** Patches of one site in the order of their revisions, one or (under load) several; bytes of ground-codec's encodePatch. */
export interface GroundPatchEvent {
  readonly type: 'ground:patch'
  readonly siteId: string
  /** revision of the last patch in the message */
  readonly revision: number
  readonly patches: readonly Binary[]
}

/** The head revision in the database, told every few seconds, so that a lost last patch is noticed. */
export interface GroundHeadEvent {
  readonly type: 'ground:head'
  readonly siteId: string
  readonly revision: number
}

/** Something changed and was saved; skip it when the copy at hand is not older than `updatedAt`. */
export interface SiteChangedEvent {
  readonly type: 'site:changed'
  readonly siteId: string
  readonly resource: ChangedResource
  readonly id: string
  /** ISO-8601 instant */
  readonly updatedAt: string
  readonly revision: number
}

/** The receiver's own membership of a site was given, changed or taken away (`role` null). */
export interface MembershipChangedEvent {
  readonly type: 'membership:changed'
  readonly siteId: string
  readonly role: string | null
}

export type ServerEvent = GroundPatchEvent | GroundHeadEvent | SiteChangedEvent | MembershipChangedEvent

export const SERVER_EVENT_TYPES = ['ground:patch', 'ground:head', 'site:changed', 'membership:changed'] as const satisfies readonly ServerEvent['type'][]

export type ServerToClientEvents = {
  [T in ServerEvent['type']]: (event: Extract<ServerEvent, { type: T }>) => void
}

export type JoinAnswer =
  | { readonly ok: true; readonly revision: number }
  | { readonly ok: false; readonly code: ErrorCode }

export interface ClientToServerEvents {
  'site:join': (siteId: string, answer: (answer: JoinAnswer) => void) => void
  'site:leave': (siteId: string) => void
}

/** Room of everybody who has a site open. */
export function siteRoom(siteId: string): string {
  return `site:${siteId}`
}

/** Room of every socket a person has open. */
export function userRoom(userId: string): string {
  return `user:${userId}`
}

/** Room of the sockets that came with one session, so that signing out closes them. */
export function sessionRoom(sessionId: string): string {
  return `session:${sessionId}`
}

/** Bytes of a binary, whichever form the transport gave it. */
export function bytesOf(binary: Binary): Uint8Array {
  return binary instanceof ArrayBuffer ? new Uint8Array(binary) : binary
}
