import { MoreThan } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { EventEntity } from '#api/entities/event.entity.ts'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import { CHAIN_START, hashOfEvent } from '#api/features/site-head/event-chain.ts'

export type ChainVerdict =
  | { readonly ok: true; readonly length: number; readonly head: string }
  | { readonly ok: false; readonly seq: number; readonly reason: ChainFault }

export type ChainFault = 'missing' | 'not-linked' | 'changed' | 'head-differs'

const PAGE = 1_000

/**
 * Reads a site's whole audit trail and computes every hash again.
 * @returns the length and the end of a sound chain; otherwise the first event that is missing, does not follow from the one
 *   before, or does not say what was hashed, or that the site's head names another end
 */
export async function verifyChain(manager: EntityManager, siteId: string): Promise<ChainVerdict> {
  const head = await manager.findOneByOrFail(SiteHeadEntity, { siteId })
  let seq = 0
  let previous = CHAIN_START
  for (;;) {
    const page = await manager.find(EventEntity, { where: { siteId, seq: MoreThan(seq) }, order: { seq: 'ASC' }, take: PAGE })
    for (const event of page) {
      if (event.seq !== seq + 1) return { ok: false, seq: seq + 1, reason: 'missing' }
      if (event.previous !== previous) return { ok: false, seq: event.seq, reason: 'not-linked' }
      if (event.hash !== hashOfEvent(event)) return { ok: false, seq: event.seq, reason: 'changed' }
      seq = event.seq
      previous = event.hash
    }
    if (page.length < PAGE) break
  }
  if (seq < head.chainLength) return { ok: false, seq: seq + 1, reason: 'missing' }
  if (seq > head.chainLength || previous !== head.chainHead) return { ok: false, seq, reason: 'head-differs' }
  return { ok: true, length: seq, head: previous }
}
