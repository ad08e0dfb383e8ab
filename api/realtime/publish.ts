import type { ServerEvent } from '#shared/realtime.ts'

/** A message and who gets it: everybody with the site open, or every socket of one person. */
export type Publication =
  | { readonly to: 'site'; readonly event: Exclude<ServerEvent, { type: 'ground:patch' | 'membership:changed' }> }
  | { readonly to: 'site'; readonly patch: { readonly siteId: string; readonly revision: number; readonly body: Uint8Array } }
  | { readonly to: 'user'; readonly userId: string; readonly event: Extract<ServerEvent, { type: 'membership:changed' }> }

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
