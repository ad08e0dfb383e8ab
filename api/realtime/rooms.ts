import type { Deps } from '#api/deps.ts'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import { findMember } from '#api/features/site-head/load-member.ts'
import type { BoardSocket } from '#api/realtime/socket-types.ts'
import { siteRoom } from '#shared/realtime.ts'
import type { JoinAnswer } from '#shared/realtime.ts'

type Look = Pick<Deps, 'dataSource' | 'logger'>

async function joinSite({ dataSource }: Look, socket: BoardSocket, siteId: string): Promise<JoinAnswer> {
  const { manager } = dataSource
  const { userId } = socket.data
  if (!(await findMember(manager, siteId, userId))) return { ok: false, code: 'not_found' }
  await socket.join(siteRoom(siteId))
  // Once more: a membership taken away between the look and the join would otherwise leave the socket in the room.
  const [member, head] = await Promise.all([findMember(manager, siteId, userId), manager.findOneBy(SiteHeadEntity, { siteId })])
  if (!member || !head) {
    await socket.leave(siteRoom(siteId))
    return { ok: false, code: 'not_found' }
  }
  return { ok: true, revision: head.revision }
}

/** A client names a site; the server looks whether the person belongs to it before the socket enters its room. */
export function serveRooms(look: Look, socket: BoardSocket): void {
  socket.on('site:join', (siteId: unknown, answer: unknown) => {
    if (typeof siteId !== 'string' || typeof answer !== 'function') return
    joinSite(look, socket, siteId).then(
      (result) => void answer(result),
      (error: unknown) => {
        look.logger.error({ err: error, siteId }, 'A board could not join its site')
        answer({ ok: false, code: 'unavailable' } satisfies JoinAnswer)
      },
    )
  })
  socket.on('site:leave', (siteId: unknown) => {
    if (typeof siteId === 'string') void socket.leave(siteRoom(siteId))
  })
}
