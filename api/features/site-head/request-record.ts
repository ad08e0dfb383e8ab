import type { EntityManager } from 'typeorm'
import { RequestRecordEntity } from '#api/entities/request-record.entity.ts'
import { conflict } from '#api/errors.ts'
import { canonicalJson, sha256 } from '#api/features/site-head/canonical-json.ts'

/** A request that carries its own id, so that a queue may send it twice. */
export interface IdentifiedRequest {
  /** the UUID the client gave the record */
  readonly id: string
  /** all that makes the request what it is */
  readonly body: unknown
}

interface Stored {
  readonly answer: unknown
}

export function hashOfRequest(request: IdentifiedRequest): string {
  return sha256(canonicalJson(request.body))
}

/** What this request was answered before, or null. The same id with another body is refused. */
export async function findAnswer(manager: EntityManager, siteId: string, request: IdentifiedRequest): Promise<Stored | null> {
  const record = await manager.findOneBy(RequestRecordEntity, { siteId, id: request.id })
  if (!record) return null
  if (record.hash !== hashOfRequest(request)) {
    throw conflict(
      'A different record was already saved under this id. That one was kept; nothing was overwritten. Start a new record and enter it again.',
      { id: request.id },
      'id_reused',
    )
  }
  return { answer: JSON.parse(record.answer) }
}

export async function storeAnswer(
  manager: EntityManager,
  siteId: string,
  request: IdentifiedRequest,
  answer: unknown,
  now: Date,
): Promise<void> {
  await manager.insert(RequestRecordEntity, {
    siteId,
    id: request.id,
    hash: hashOfRequest(request),
    answer: JSON.stringify(answer ?? null),
    recordedAt: now,
  })
}
