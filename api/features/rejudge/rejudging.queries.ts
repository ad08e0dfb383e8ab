import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReferenceCurveEntity } from '#api/entities/reference-curve.entity.ts'
import { TestVerdictEntity } from '#api/entities/test-verdict.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { notFound } from '#api/errors.ts'
import { orderNumber } from '#api/features/ground/order-steps.ts'
import { loadCurvePair } from '#api/features/rejudge/curve-pair.ts'
import { isReplanned, planRejudging } from '#api/features/rejudge/plan-rejudging.ts'
import type { Planned } from '#api/features/rejudge/plan-rejudging.ts'
import { mayRejudge } from '#api/features/rejudge/rejudge-rights.ts'
import type { SiteRead } from '#api/features/site-head/site-write.ts'
import { presentVerdict } from '#api/features/tests/test-detail.queries.ts'
import type { Verdict } from '#shared/domain/verdict-types.ts'
import type { CurveBrief, RejudgedTest, Rejudging, VerdictBrief, VerdictHistory } from '#shared/schemas/rejudge.ts'

/** Every test of a curve as it stands and as another curve would judge it. */
export async function loadRejudging(read: SiteRead, curveId: string, byId: string | undefined): Promise<Rejudging> {
  const { from, by } = await loadCurvePair(read, curveId, byId)
  const planned = await planRejudging(read, from, by, null)
  return { curve: presentCurve(from), by: presentCurve(by), tests: planned.map((one) => presentPlanned(one, read)) }
}

function presentCurve({ id, code, maxDryDensity, optimumMoisture }: ReferenceCurveEntity): CurveBrief {
  return { id, code, maxDryDensity: maxDryDensity ?? 0, optimumMoisture: optimumMoisture ?? 0 }
}

export function briefOf({ outcome, treatedAsFail, near, headline, rc, moistureDeviation }: FieldTestEntity | Verdict): VerdictBrief {
  return { outcome, treatedAsFail: Boolean(treatedAsFail), near: Boolean(near), headline, rc, moistureDeviation }
}

function presentPlanned(planned: Planned, { role }: SiteRead): RejudgedTest {
  const { test, inForce, order } = planned
  const { id, number, purpose, zoneId, lift, cell } = test
  const base = { id, number, purpose, zoneId, lift, cell, sampledAt: test.sampledAt.toISOString(), inForce, mine: mayRejudge(role, purpose), before: briefOf(test), orderNumber: order && orderNumber(order.seq) }
  return isReplanned(planned)
    ? { ...base, after: briefOf(planned.verdict), refusal: null, change: planned.change, effect: planned.effect }
    : { ...base, after: null, refusal: planned.refusal, change: null, effect: null }
}

/** All verdicts of a test, the first one first; none where it was never judged again. */
export async function loadVerdictHistory(manager: EntityManager, siteId: string, testId: string): Promise<VerdictHistory> {
  if (!(await manager.existsBy(FieldTestEntity, { siteId, id: testId }))) throw notFound()
  const rows = await manager.find(TestVerdictEntity, { where: { siteId, testId }, order: { version: 'ASC' } })
  if (rows.length === 0) return { verdicts: [] }
  const curves = await manager.find(ReferenceCurveEntity, { where: { siteId, id: In(rows.map((row) => row.curveId)) }, select: { id: true, code: true } })
  const people = await manager.find(UserEntity, { where: { id: In(rows.map((row) => row.judgedBy)) }, select: { id: true, name: true } })
  const codes = new Map(curves.map(({ id, code }) => [id, code]))
  const names = new Map(people.map(({ id, name }) => [id, name]))
  return {
    verdicts: rows.map((row, index) => ({
      version: row.version,
      current: index === rows.length - 1,
      curve: { id: row.curveId, code: codes.get(row.curveId) ?? '' },
      verdict: presentVerdict(row),
      marks: row.marks.map(({ kind, cells }) => ({ kind, cells: [...cells] })),
      judgedAt: row.judgedAt.toISOString(),
      judgedBy: { id: row.judgedBy, name: names.get(row.judgedBy) ?? '' },
      reason: row.reason,
    })),
  }
}
