import type { EntityManager } from 'typeorm'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { loadBadGauges, NO_BAD_GAUGES, orderOf, type BadGauges } from '#api/features/tests/register-columns.ts'
import { whereOf, type Where } from '#api/features/tests/register-where.ts'
import { loadTests } from '#api/features/tests/tests.queries.ts'
import type { Outcome } from '#shared/domain/verdict-types.ts'
import { outcomeSchema } from '#shared/schemas/field-test.ts'
import type { RegisterPage, TestFilter, TestQuery } from '#shared/schemas/test-register.ts'

/** One page of a site's tests in the order asked for, how many fit, and how their outcomes share among them. */
export async function listTests(manager: EntityManager, siteId: string, query: TestQuery): Promise<RegisterPage> {
  const asked = await readQuery(manager, siteId, query)
  const counts = await countOutcomes(manager, asked.but({ outcome: undefined }))
  const wanted: readonly Outcome[] = query.outcome ?? outcomeSchema.options
  const total = wanted.reduce((sum, outcome) => sum + counts[outcome], 0)
  return { tests: await loadTests(manager, siteId, await findIds(manager, asked, query)), total, counts }
}

/** The ids of the tests that fit, in the order asked for: what the register shows a page of. */
export async function findTests(manager: EntityManager, siteId: string, query: TestQuery): Promise<string[]> {
  return findIds(manager, await readQuery(manager, siteId, query), query)
}

interface Asked {
  readonly where: Where
  readonly badGauges: BadGauges
  /** the condition with another filter in places */
  but(change: Partial<TestFilter>): Where
}

/** What the conditions of a query need to know: the site's clock, and which gauges were bad where flags are asked about. */
async function readQuery(manager: EntityManager, siteId: string, query: TestQuery): Promise<Asked> {
  const { timeZone, dayCutHour } = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const badGauges = query.flagged !== undefined || query.sort === 'flags' ? await loadBadGauges(manager, siteId) : NO_BAD_GAUGES
  const but = (change: Partial<TestFilter>): Where => whereOf(siteId, { ...query, ...change }, { timeZone, dayCutHour }, badGauges)
  return { where: but({}), badGauges, but }
}

async function findIds(manager: EntityManager, { where, badGauges }: Asked, { sort, direction, offset, limit }: TestQuery): Promise<string[]> {
  const order = orderOf({ key: sort, direction }, badGauges)
  const rows: { id: string }[] = await manager.query(`SELECT t.\`id\` FROM \`field_test\` t WHERE ${where.text} ORDER BY ${order.text} LIMIT ? OFFSET ?`, [...where.values, ...order.values, limit, offset])
  return rows.map((row) => row.id)
}

async function countOutcomes(manager: EntityManager, where: Where): Promise<RegisterPage['counts']> {
  const rows: { outcome: keyof RegisterPage['counts']; n: string }[] = await manager.query(`SELECT t.\`outcome\`, COUNT(*) AS \`n\` FROM \`field_test\` t WHERE ${where.text} GROUP BY t.\`outcome\``, [...where.values])
  const counts = { pass: 0, fail: 0, suspect: 0 }
  for (const { outcome, n } of rows) counts[outcome] = Number(n)
  return counts
}

/** Everybody who recorded a test of this site, by name. */
export async function listRecorders(manager: EntityManager, siteId: string): Promise<{ id: string; name: string }[]> {
  return manager.query('SELECT u.`id`, u.`name` FROM `user` u WHERE u.`id` IN (SELECT t.`recorded_by` FROM `field_test` t WHERE t.`site_id` = ?) ORDER BY u.`name`, u.`id`', [siteId])
}
