import type { EventEntity } from '#api/entities/event.entity.ts'
import { canonicalJson, sha256 } from '#api/features/site-head/canonical-json.ts'

/** What the first event of a site's chain names as its predecessor. */
export const CHAIN_START = '0'.repeat(64)

type HashedFields = Omit<EventEntity, 'hash'>

/**
 * Hash of one link: SHA-256 over the canonical JSON array of everything the row says, in this order. The payload enters
 * as the text that is stored, so that no later serialiser can disagree.
 */
export function hashOfEvent(event: HashedFields): string {
  return sha256(
    canonicalJson([
      event.previous,
      event.siteId,
      event.seq,
      event.revision,
      event.actorId,
      event.actorName,
      event.recordedAt.toISOString(),
      event.happenedAt.toISOString(),
      event.verb,
      event.subjectType,
      event.subjectId,
      event.payload,
    ]),
  )
}
