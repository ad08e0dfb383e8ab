import { In } from 'typeorm'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { TestMarkEntity } from '#api/entities/test-mark.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { changeGround, deriveLotNow } from '#api/features/ground/change-ground.ts'
import { withdrawOrder } from '#api/features/ground/order-records.ts'
import { addOrderStep, orderNumber } from '#api/features/ground/order-steps.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { loadLotsOfCells } from '#api/features/lots/lots-of-cells.queries.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { retireIdleStakes } from '#api/features/stakes/retire-stakes.ts'
import { findOpenOrder, orderCells, returnOrder } from '#api/features/tests/failure-order.ts'
import { isFailure } from '#api/features/tests/mark-ground.ts'
import { currentTest, loadChainTests } from '#api/features/tests/test-chain.ts'
import { authorizeVoiding } from '#api/features/tests/test-rights.ts'
import type { VoidTestAnswer } from '#shared/schemas/field-test.ts'

/**
 * Takes a test out of force with a reason; it keeps its number and stays on record. What it marked falls, an order that it
 * alone caused is withdrawn, and an order that its pass had closed opens again where too few passes are left.
 */
export async function voidTest(write: SiteWrite, testId: string, { reason }: { readonly reason: string }): Promise<VoidTestAnswer> {
  const { manager, siteId, user, role, now } = write
  const test = await manager.findOneBy(FieldTestEntity, { siteId, id: testId })
  if (!test) throw notFound()
  authorizeVoiding(role, test.purpose)
  if (test.voidedAt !== null) throw conflict(`${test.number} is void already. Nothing was changed.`)
  const plan = await loadSitePlan(manager, siteId)
  await manager.update(FieldTestEntity, { siteId, id: testId }, { voidedAt: now, voidedBy: user.id, voidReason: reason, updatedAt: now })
  const chain = await loadChainTests(manager, siteId, test.chainId)
  const current = currentTest(chain)

  const order = isFailure(test) ? await findOpenOrder(write, chain) : null
  const freed = order ? await orderCells(write, order.id) : []
  if (order) await settleOrder(write, order, test, chain)
  const reopened = test.outcome === 'pass' ? await reopenOrders(write, plan, test) : []

  write.record('test.voided', { type: 'test', id: testId }, {
    number: test.number,
    reason,
    purpose: test.purpose,
    outcome: test.outcome,
    // a voided failure stays among the exceptions
    exception: isFailure(test),
    current: current?.number ?? null,
  })
  write.changed('test', testId)

  const marks = await manager.findBy(TestMarkEntity, { siteId, testId })
  const touched = [test.cell, ...chain.map((other) => other.cell), ...marks.map((mark) => mark.cell), ...freed, ...reopened]
  const lots = await loadLotsOfCells(manager, siteId, test.lift, touched)
  const change = await changeGround(write, plan, { lots, from: { easting: test.easting, northing: test.northing } })
  await retireIdleStakes(write, change.lots.values())
  return { id: testId, number: test.number, revision: write.revision, currentId: current?.id ?? null }
}

async function settleOrder(write: SiteWrite, order: ReworkOrderEntity, voided: FieldTestEntity, chain: readonly FieldTestEntity[]): Promise<void> {
  const cause = chain.findLast((test) => test.voidedAt === null && isFailure(test))
  if (!cause) await withdrawOrder(write, order, `${voided.number} was voided`)
  else if (order.causeTestId === voided.id) await returnOrder(write, order, voided, cause)
}

/** Closed orders that this pass had helped to close wait for their retests again, where too few are left. */
async function reopenOrders(write: SiteWrite, plan: SitePlan, test: FieldTestEntity): Promise<number[]> {
  const { manager, siteId, now } = write
  const rows: { id: string }[] = await manager.query(
    "SELECT o.`id` FROM `rework_order` o JOIN `rework_cell` c ON c.`site_id` = o.`site_id` AND c.`order_id` = o.`id` AND c.`left_at` IS NULL WHERE o.`site_id` = ? AND o.`lift` = ? AND c.`cell` = ? AND o.`state` = 'closed' AND o.`reported_at` < ? ORDER BY o.`seq`",
    [siteId, test.lift, test.cell, test.sampledAt],
  )
  if (rows.length === 0) return []
  const orders = await manager.findBy(ReworkOrderEntity, { siteId, id: In(rows.map((row) => row.id)) })
  const touched: number[] = []
  for (const { id, seq, closedAt } of orders) {
    const cells = await orderCells(write, id)
    await manager.update(ReworkOrderEntity, { siteId, id }, { state: 'ready', closedAt: null, updatedAt: now })
    if (await stillCloses(write, plan, test.lift, id, cells)) {
      await manager.update(ReworkOrderEntity, { siteId, id }, { state: 'closed', closedAt })
      continue
    }
    const text = `${test.number}, a pass it was closed on, was voided`
    await addOrderStep(write, id, { kind: 'reopened', happenedAt: now, text, details: { voidedId: test.id } })
    write.record('order.reopened', { type: 'order', id }, { number: orderNumber(seq), voided: test.number })
    write.changed('order', id)
    touched.push(...cells)
  }
  return touched
}

async function stillCloses({ manager, siteId }: SiteWrite, plan: SitePlan, lift: number, orderId: string, cells: readonly number[]): Promise<boolean> {
  const lots = await loadLotsOfCells(manager, siteId, lift, cells)
  for (const lotId of lots) {
    const { derived } = await deriveLotNow(manager, plan, lotId)
    if (derived.orders.some((order) => order.orderId === orderId && order.closes)) return true
  }
  return false
}
