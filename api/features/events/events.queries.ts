import { LessThan } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { EventEntity } from '#api/entities/event.entity.ts'
import type { AuditEvent, EventQuery } from '#shared/schemas/event.ts'

export interface EventPage {
  readonly events: AuditEvent[]
  readonly next: number | null
}

function presentEvent(event: EventEntity): AuditEvent {
  return {
    seq: event.seq,
    revision: event.revision,
    actor: { id: event.actorId, name: event.actorName },
    verb: event.verb,
    subject: { type: event.subjectType, id: event.subjectId },
    payload: JSON.parse(event.payload) as Record<string, unknown>,
    happenedAt: event.happenedAt.toISOString(),
    recordedAt: event.recordedAt.toISOString(),
    hash: event.hash,
  }
}

/** One page of a site's audit trail, newest first, of one subject or of all. */
export async function listEvents(manager: EntityManager, siteId: string, query: EventQuery): Promise<EventPage> {
  const { subjectType, subjectId, before, limit } = query
  const rows = await manager.find(EventEntity, {
    where: {
      siteId,
      ...(subjectType === undefined ? {} : { subjectType }),
      ...(subjectId === undefined ? {} : { subjectId }),
      ...(before === undefined ? {} : { seq: LessThan(before) }),
    },
    order: { seq: 'DESC' },
    take: limit + 1,
  })
  const page = rows.slice(0, limit)
  return { events: page.map(presentEvent), next: rows.length > limit ? (page.at(-1)?.seq ?? null) : null }
}
