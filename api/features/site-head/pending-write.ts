import type { EntityManager } from 'typeorm'
import { EventEntity } from '#api/entities/event.entity.ts'
import { PatchEntity } from '#api/entities/patch.entity.ts'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import { canonicalJson } from '#api/features/site-head/canonical-json.ts'
import { hashOfEvent } from '#api/features/site-head/event-chain.ts'
import type { RunningNumber, SiteRead, SiteWrite } from '#api/features/site-head/site-write.ts'
import type { Publication } from '#api/realtime/publish.ts'
import { encodePatch } from '#shared/ground-codec.ts'
import type { GroundPatch } from '#shared/ground-codec.ts'

/** How many patches a site keeps for clients that catch up. */
export const PATCHES_KEPT = 10_000

const NEXT_COLUMN = {
  test: 'nextTest',
  order: 'nextOrder',
  lot: 'nextLot',
  stake: 'nextStake',
  release: 'nextRelease',
  placement: 'nextPlacement',
} as const satisfies Record<RunningNumber, keyof SiteHeadEntity>

export interface PendingWrite {
  readonly write: SiteWrite
  /** stores the events, the patch and the head; what is to be told once that is committed */
  finish(): Promise<readonly Publication[]>
}

/** Collects what one change does beside its own rows; nothing touches the database before `finish`. */
export function startWrite(read: Omit<SiteRead, 'revision'>, head: SiteHeadEntity): PendingWrite {
  const { manager, siteId, user, now } = read
  const revision = head.revision + 1
  const events: EventEntity[] = []
  const notices: Publication[] = []
  let groundPatch: Omit<GroundPatch, 'revision' | 'base'> | null = null

  const write: SiteWrite = {
    ...read,
    revision,
    take: (kind) => head[NEXT_COLUMN[kind]]++,
    record(verb, subject, payload, happenedAt = now) {
      const unhashed = {
        siteId,
        seq: head.chainLength + 1,
        revision,
        actorId: user.id,
        actorName: user.name,
        verb,
        subjectType: subject.type,
        subjectId: subject.id,
        payload: canonicalJson(payload),
        happenedAt,
        recordedAt: now,
        previous: head.chainHead,
      }
      const event = { ...unhashed, hash: hashOfEvent(unhashed) }
      events.push(event)
      head.chainLength = event.seq
      head.chainHead = event.hash
    },
    patch(patch) {
      if (groundPatch) throw new Error('A write changes the Ground once: merge its patches')
      groundPatch = patch
    },
    changed(resource, id) {
      notices.push({ type: 'site:changed', siteId, resource, id, updatedAt: now.toISOString(), revision })
    },
    memberChanged(userId, role) {
      notices.push({ type: 'member', userId, event: { type: 'membership:changed', siteId, role } })
    },
  }

  async function finish(): Promise<readonly Publication[]> {
    if (events.length > 0) await manager.insert(EventEntity, events)
    await manager.update(SiteHeadEntity, { siteId }, { ...head, revision })
    if (!groundPatch) return notices
    const base = await lastPatchRevision(manager, siteId)
    const body = encodePatch({ ...groundPatch, revision, base })
    await storePatch(manager, { siteId, revision, body: Buffer.from(body), recordedAt: now })
    return [{ type: 'patch', siteId, revision, body }, ...notices]
  }

  return { write, finish }
}

/** Revision of the last change of the Ground, 0 before the first. */
export async function lastPatchRevision(manager: EntityManager, siteId: string): Promise<number> {
  const rows: { revision: string | null }[] = await manager.query('SELECT MAX(`revision`) AS `revision` FROM `patch` WHERE `site_id` = ?', [siteId])
  return Number(rows[0]?.revision ?? 0)
}

async function storePatch(manager: EntityManager, patch: PatchEntity): Promise<void> {
  await manager.insert(PatchEntity, patch)
  await manager.query('DELETE FROM `patch` WHERE `site_id` = ? AND `revision` <= ?', [
    patch.siteId,
    patch.revision - PATCHES_KEPT,
  ])
}
