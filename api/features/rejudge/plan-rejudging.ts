import { In, IsNull } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import type { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { ReworkStepEntity } from '#api/entities/rework-step.entity.ts'
import type { SiteRead } from '#api/features/site-head/site-write.ts'
import { coarseOf } from '#api/features/tests/judge-sheet.ts'
import { CURRENT, SUPERSEDED } from '#api/features/tests/tests.queries.ts'
import { groupBy } from '#shared/domain/group-by.ts'
import { changeOf, judgeAgain, rejudgeEffect, weightOf } from '#shared/domain/rejudge.ts'
import type { RejudgeEffect, VerdictChange } from '#shared/domain/rejudge.ts'
import type { Verdict } from '#shared/domain/verdict-types.ts'

type Reading = Pick<SiteRead, 'manager' | 'siteId'>

interface Standing {
  readonly test: FieldTestEntity
  /** its chain's current result, not put out of force by reported rework */
  readonly inForce: boolean
  /** the open order it caused */
  readonly order: ReworkOrderEntity | null
}

export interface Replanned extends Standing {
  readonly verdict: Verdict
  readonly change: VerdictChange
  readonly effect: RejudgeEffect
  /** the failure of the chain its order goes back to */
  readonly cause: FieldTestEntity | null
}

/** A test that the new curve cannot judge, with the reason. */
export interface Unplanned extends Standing {
  readonly refusal: string
}

export type Planned = Replanned | Unplanned

export function isReplanned(planned: Planned): planned is Replanned {
  return 'verdict' in planned
}

/**
 * Every test judged by a curve that is not void (or those of them that are asked for) as another curve judges it, and what
 * that does to its marks and its order. Nothing is stored.
 * @param ids null for all
 */
export async function planRejudging(read: Reading, from: ReferenceCurveEntity, by: ReferenceCurveEntity, ids: readonly string[] | null): Promise<Planned[]> {
  const { manager, siteId } = read
  const where = { siteId, curveId: from.id, voidedAt: IsNull(), ...(ids === null ? {} : { id: In([...ids]) }) }
  const tests = await manager.find(FieldTestEntity, { where, order: { seq: 'ASC' } })
  if (tests.length === 0) return []
  const standings = await loadStandings(read, tests)
  const judged = standings.map((standing) => ({ standing, judgement: judgeBy(standing.test, by) }))
  const chains = await loadChainsOfOrders(read, standings)
  const after = new Map(judged.flatMap(({ standing, judgement }) => (judgement.ok ? [[standing.test.id, judgement.verdict] as const] : [])))
  const begun = await loadBegun(read, standings)
  return judged.map(({ standing, judgement }): Planned => {
    if (!judgement.ok) return { ...standing, refusal: judgement.problems.map((problem) => problem.message).join(' ') }
    const { test, order, inForce } = standing
    const chain = chains.get(test.chainId) ?? []
    const cause = chain.findLast((other) => other.id !== test.id && weightOf(after.get(other.id) ?? other) === 'fail') ?? null
    const effect = rejudgeEffect(test, judgement.verdict, {
      inForce,
      order: order && { workBegun: begun.has(order.id), otherFailure: cause !== null },
    })
    return { ...standing, verdict: judgement.verdict, change: changeOf(test.verdict, judgement.verdict), effect, cause }
  })
}

function judgeBy(test: FieldTestEntity, curve: ReferenceCurveEntity) {
  const { maxDryDensity, optimumMoisture, gs, gsMeasured } = curve
  // an approved curve has its pair; without one the judgement itself says that it is missing
  return judgeAgain(test.verdict, { maxDryDensity: maxDryDensity ?? 0, optimumMoisture: optimumMoisture ?? 0, gs, gsMeasured, coarse: coarseOf(curve) })
}

async function loadStandings({ manager, siteId }: Reading, tests: readonly FieldTestEntity[]): Promise<Standing[]> {
  const ids = tests.map((test) => test.id)
  const rows: { id: string; in_force: number }[] = await manager.query(
    `SELECT t.\`id\`, (${CURRENT} AND NOT ${SUPERSEDED}) AS \`in_force\` FROM \`field_test\` t WHERE t.\`site_id\` = ? AND t.\`id\` IN (?)`,
    [siteId, ids],
  )
  const inForce = new Set(rows.filter((row) => Number(row.in_force) === 1).map((row) => row.id))
  const orders = await manager.find(ReworkOrderEntity, { where: { siteId, causeTestId: In(ids), state: In(['issued', 'working', 'ready']) }, order: { seq: 'ASC' } })
  const orderOf = new Map(orders.map((order) => [order.causeTestId, order]))
  return tests.map((test) => ({ test, inForce: inForce.has(test.id), order: orderOf.get(test.id) ?? null }))
}

/** The chains of the tests that stand behind an open order, void tests left out, in the order they were sampled. */
async function loadChainsOfOrders({ manager, siteId }: Reading, standings: readonly Standing[]): Promise<ReadonlyMap<string, FieldTestEntity[]>> {
  const chainIds = standings.filter(({ order }) => order !== null).map(({ test }) => test.chainId)
  if (chainIds.length === 0) return new Map()
  const tests = await manager.find(FieldTestEntity, { where: { siteId, chainId: In(chainIds), voidedAt: IsNull() }, order: { sampledAt: 'ASC', seq: 'ASC' } })
  return groupBy(tests, (test) => test.chainId)
}

/** Orders that were ever started or reported done. */
async function loadBegun({ manager, siteId }: { manager: EntityManager; siteId: string }, standings: readonly Standing[]): Promise<ReadonlySet<string>> {
  const ids = standings.flatMap(({ order }) => order?.id ?? [])
  if (ids.length === 0) return new Set()
  const steps = await manager.find(ReworkStepEntity, { where: { siteId, orderId: In(ids), kind: In(['started', 'ready']) } })
  return new Set(steps.map((step) => step.orderId))
}
