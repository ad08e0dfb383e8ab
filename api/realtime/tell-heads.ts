import { In } from 'typeorm'
import type { Deps } from '#api/deps.ts'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import type { BoardServer } from '#api/realtime/socket-types.ts'
import { siteRoom } from '#shared/realtime.ts'

/** How often every open site hears its revision, so that a lost last patch is noticed. */
export const HEAD_INTERVAL_MS = 5_000

const ROOM_START = siteRoom('')

/** Tells every room of this node the revision the database has. */
export async function tellHeads({ dataSource }: Pick<Deps, 'dataSource'>, io: BoardServer): Promise<void> {
  const siteIds = [...io.of('/').adapter.rooms.keys()].filter((room) => room.startsWith(ROOM_START)).map((room) => room.slice(ROOM_START.length))
  if (siteIds.length === 0) return
  const heads = await dataSource.manager.find(SiteHeadEntity, { where: { siteId: In(siteIds) }, select: { siteId: true, revision: true } })
  for (const { siteId, revision } of heads) io.local.to(siteRoom(siteId)).emit('ground:head', { type: 'ground:head', siteId, revision })
}

/** Starts telling; the returned function stops it. */
export function startTellingHeads(deps: Pick<Deps, 'dataSource' | 'logger'>, io: BoardServer, intervalMs = HEAD_INTERVAL_MS): () => void {
  const timer = setInterval(() => {
    tellHeads(deps, io).catch((error: unknown) => deps.logger.error({ err: error }, 'The open boards could not be told their revision'))
  }, intervalMs)
  timer.unref()
  return () => clearInterval(timer)
}
