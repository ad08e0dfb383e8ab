import type { EntityManager } from 'typeorm'
import type { WriteDeps } from '#api/deps.ts'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import { forbidden, notFound } from '#api/errors.ts'
import { loadMember } from '#api/features/site-head/load-member.ts'
import { openSite } from '#api/features/site-head/new-site.ts'
import { startWrite } from '#api/features/site-head/pending-write.ts'
import { findAnswer, storeAnswer } from '#api/features/site-head/request-record.ts'
import type { IdentifiedRequest } from '#api/features/site-head/request-record.ts'
import { retryDeadlocks } from '#api/features/site-head/retry-deadlocks.ts'
import type { SiteRead, SiteWrite } from '#api/features/site-head/site-write.ts'
import type { Publication } from '#api/realtime/publish.ts'
import { can } from '#shared/policies/policy.ts'
import type { Verb } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'

/** One verb of the policy table, or a rule of several. */
type Permission = { readonly verb: Verb } | { readonly authorize: (role: Role) => boolean }

export type WriteRequest = Permission & {
  readonly siteId: string
  readonly userId: string
  readonly request?: IdentifiedRequest
  /** inserts the site's row when the site is not there yet; the writer becomes its QC lead */
  readonly create?: (manager: EntityManager, now: Date) => Promise<void>
}

export type ReadRequest = Permission & { readonly siteId: string; readonly userId: string }

function isAllowed(permission: Permission, role: Role): boolean {
  return 'verb' in permission ? can(role, permission.verb) : permission.authorize(role)
}

/**
 * The only way to change a site: one READ COMMITTED transaction that locks the site's head first, so that writers to one
 * site follow one another. Strangers get 404, a role without the right 403; a repeated request gets its stored answer.
 * Open boards are told after the commit and only then. A deadlock or lock time-out runs the whole again, `work` included.
 * @returns what `work` returned, as JSON carries it (so that the first answer and a repeated one are equal)
 */
export async function writeToSite<T>(
  deps: WriteDeps,
  options: WriteRequest,
  work: (write: SiteWrite) => Promise<T>,
): Promise<T> {
  const { answer, publications } = await retryDeadlocks(() =>
    deps.dataSource.transaction('READ COMMITTED', (manager) => runWrite(manager, deps.clock, options, work)),
  )
  deps.publisher.publish(publications)
  return answer
}

/**
 * Runs a change exactly as writeToSite does, and takes it back: what it would do, by the same code. Nothing is stored, nobody
 * is told; writers to the site wait as for a change.
 */
export async function rehearseOnSite<T>(deps: WriteDeps, options: ReadRequest, work: (write: SiteWrite) => Promise<T>): Promise<T> {
  return retryDeadlocks(async () => {
    const runner = deps.dataSource.createQueryRunner()
    try {
      await runner.startTransaction('READ COMMITTED')
      return (await runWrite(runner.manager, deps.clock, options, work)).answer
    } finally {
      if (runner.isTransactionActive) await runner.rollbackTransaction()
      await runner.release()
    }
  })
}

async function runWrite<T>(
  manager: EntityManager,
  clock: WriteDeps['clock'],
  options: WriteRequest,
  work: (write: SiteWrite) => Promise<T>,
): Promise<{ answer: T; publications: readonly Publication[] }> {
  const { siteId, userId, request } = options
  const head = await lockHead(manager, clock, options)
  const now = clock()
  const { user, role } = await loadMember(manager, siteId, userId)
  if (!isAllowed(options, role)) throw forbidden()
  if (request) {
    const stored = await findAnswer(manager, siteId, request)
    if (stored) return { answer: stored.answer as T, publications: [] }
  }
  const pending = startWrite({ manager, siteId, user, role, now }, head)
  const result = await work(pending.write)
  const publications = await pending.finish()
  if (request) await storeAnswer(manager, siteId, request, result, now)
  return { answer: result === undefined ? result : (JSON.parse(JSON.stringify(result)) as T), publications }
}

async function lockHead(
  manager: EntityManager,
  clock: WriteDeps['clock'],
  { siteId, userId, create }: WriteRequest,
): Promise<SiteHeadEntity> {
  const find = () => manager.findOne(SiteHeadEntity, { where: { siteId }, lock: { mode: 'pessimistic_write' } })
  let head = await find()
  if (!head && create) {
    const now = clock()
    await create(manager, now)
    await openSite(manager, siteId, userId, now)
    head = await find()
  }
  if (!head) throw notFound()
  return head
}

/** One consistent snapshot of a site for a screen that needs several reads; strangers get 404, a role without the right 403. */
export async function readSite<T>(
  deps: Pick<WriteDeps, 'dataSource' | 'clock'>,
  options: ReadRequest,
  work: (read: SiteRead) => Promise<T>,
): Promise<T> {
  const { siteId, userId } = options
  return deps.dataSource.transaction('REPEATABLE READ', async (manager) => {
    const { user, role } = await loadMember(manager, siteId, userId)
    if (!isAllowed(options, role)) throw forbidden()
    const head = await manager.findOneByOrFail(SiteHeadEntity, { siteId })
    return work({ manager, siteId, user, role, now: deps.clock(), revision: head.revision })
  })
}
