import type { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { TestMarkEntity } from '#api/entities/test-mark.entity.ts'
import { TestVerdictEntity } from '#api/entities/test-verdict.entity.ts'
import { deriveLotNow } from '#api/features/ground/change-ground.ts'
import { withdrawOrder } from '#api/features/ground/order-records.ts'
import { addOrderStep, orderNumber } from '#api/features/ground/order-steps.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { loadLotsOfCells } from '#api/features/lots/lots-of-cells.queries.ts'
import type { Replanned } from '#api/features/rejudge/plan-rejudging.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { continueOrder, findOpenOrder, issueOrder, orderCells, returnOrder } from '#api/features/tests/failure-order.ts'
import { failedCells, marksOf } from '#api/features/tests/mark-ground.ts'
import type { GroundMark } from '#api/features/tests/mark-ground.ts'
import { reopenOrders } from '#api/features/tests/reopen-orders.ts'
import { loadChainTests } from '#api/features/tests/test-chain.ts'
import { weightOf } from '#shared/domain/rejudge.ts'
import { reworkActions, reworkHeadline } from '#shared/domain/rework-advice.ts'

/** A test judged again, and what that did. */
export interface Applied {
  readonly planned: Replanned
  readonly version: number
  /** the ground it marked anew */
  readonly marks: readonly GroundMark[]
  readonly order: { readonly id: string; readonly number: string } | null
  /** cells of its lift whose lots have to be derived again */
  readonly touched: readonly number[]
}

/**
 * Carries the effects out, the new verdicts being stored already: first everything falls that no longer stands, then the
 * orders open again that were closed on lost passes, and only then new failures mark, so that none of them takes for a pass
 * what has become a failure in the same act.
 * @param versions the new verdict's version by test
 * @param why what became of a test, after its number: "was judged again by RB-4"
 */
export async function applyEffects(write: SiteWrite, plan: SitePlan, planned: readonly Replanned[], versions: ReadonlyMap<string, number>, why: string): Promise<Applied[]> {
  const touched = new Map(planned.map(({ test }) => [test.id, [] as number[]]))
  const add = (test: FieldTestEntity, cells: readonly number[]) => touched.get(test.id)?.push(...cells)
  for (const one of planned) add(one.test, await liftMarks(write, one))
  for (const one of planned) add(one.test, await settleOrder(write, one, why))
  for (const { test, verdict } of planned) {
    if (test.outcome === 'pass' && verdict.outcome !== 'pass') add(test, await reopenOrders(write, plan, test, { words: why, details: { rejudgedId: test.id } }))
  }
  const applied: Applied[] = []
  for (const one of planned) {
    const version = versions.get(one.test.id) ?? 1
    const made = await makeMarks(write, plan, one, version)
    add(one.test, made.touched)
    applied.push({ planned: one, version, marks: made.marks, order: made.order ?? numbered(one.order), touched: touched.get(one.test.id) ?? [] })
  }
  return applied
}

async function liftMarks({ manager, siteId }: SiteWrite, { test, effect }: Replanned): Promise<number[]> {
  if (effect.marks === 'keep') return []
  const marks = await manager.findBy(TestMarkEntity, { siteId, testId: test.id })
  await manager.delete(TestMarkEntity, { siteId, testId: test.id })
  return marks.map((mark) => mark.cell)
}

/** What happens to the order the test had caused; answers the cells the order held before. */
async function settleOrder(write: SiteWrite, { test, verdict, effect, order, cause }: Replanned, why: string): Promise<number[]> {
  if (!order) return []
  const { manager, siteId, now } = write
  const cells = await orderCells(write, order.id)
  const subject = { type: 'order', id: order.id }
  const number = orderNumber(order.seq)
  switch (effect.order) {
    case 'withdraw':
      await withdrawOrder(write, order, `${test.number} ${why} and no longer fails`)
      return cells
    case 'hand-back':
      if (cause) await returnOrder(write, order, test, cause, why)
      return cells
    case 'stands':
      await addOrderStep(write, order.id, { kind: 'edited', happenedAt: now, text: `${test.number} ${why} and no longer fails. Work had begun, so the order stands until its retests pass or the lead withdraws it`, details: { rejudgedId: test.id } })
      write.record('order.edited', subject, { number, cause: test.number, stands: true, why })
      break
    case 'reword': {
      const headline = reworkHeadline(verdict.reasons)
      await manager.update(ReworkOrderEntity, { siteId, id: order.id }, { actions: reworkActions(verdict.reasons), headline, updatedAt: now })
      await addOrderStep(write, order.id, { kind: 'edited', happenedAt: now, text: `${test.number} ${why}: ${headline}`, details: { rejudgedId: test.id } })
      write.record('order.edited', subject, { number, cause: test.number, headline, why })
      break
    }
    case 'issue':
    case 'none':
      return []
  }
  write.changed('order', order.id)
  return cells
}

interface Made {
  readonly marks: readonly GroundMark[]
  readonly order: Applied['order']
  readonly touched: readonly number[]
}

/** A result that fails or is in doubt now marks its ground as a new one does, and a failure issues or joins its order. */
async function makeMarks(write: SiteWrite, plan: SitePlan, { test, verdict, effect }: Replanned, version: number): Promise<Made> {
  const { manager, siteId } = write
  if (effect.marks !== 'make') return { marks: [], order: null, touched: [] }
  const [lotId] = await loadLotsOfCells(manager, siteId, test.lift, [test.cell])
  const lot = lotId === undefined ? undefined : await deriveLotNow(manager, plan, lotId)
  const marks = marksOf({ verdict, purpose: test.purpose, cell: test.cell, at: { u: test.u, v: test.v }, replacesId: null, lot })
  const rows = marks.flatMap(({ kind, cells }) => cells.map((cell) => ({ siteId, testId: test.id, cell, lift: test.lift, kind })))
  if (rows.length > 0) await manager.insert(TestMarkEntity, rows)
  await manager.update(TestVerdictEntity, { siteId, testId: test.id, version }, { marks: marks as never })
  const touched = rows.map((row) => row.cell)
  const failed = failedCells(marks)
  if (weightOf(verdict) !== 'fail' || failed.length === 0) return { marks, order: null, touched }
  const failure = { ...test, verdict }
  const open = await findOpenOrder(write, await loadChainTests(manager, siteId, test.chainId))
  const held = open ? await orderCells(write, open.id) : []
  if (open) await continueOrder(write, plan, open, failure, failed)
  const order = open ?? (await issueOrder(write, plan, failure, failed))
  return { marks, order: numbered(order), touched: [...touched, ...held] }
}

function numbered(order: ReworkOrderEntity | null): Applied['order'] {
  return order && { id: order.id, number: orderNumber(order.seq) }
}
