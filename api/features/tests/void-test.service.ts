import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import type { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { TestMarkEntity } from '#api/entities/test-mark.entity.ts'
import { conflict, notFound } from '#api/errors.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { withdrawOrder } from '#api/features/ground/order-records.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { loadLotsOfCells } from '#api/features/lots/lots-of-cells.queries.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { retireIdleStakes } from '#api/features/stakes/retire-stakes.ts'
import { findOpenOrder, orderCells, returnOrder } from '#api/features/tests/failure-order.ts'
import { isFailure } from '#api/features/tests/mark-ground.ts'
import { reopenOrders } from '#api/features/tests/reopen-orders.ts'
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
  const reopened = test.outcome === 'pass' ? await reopenOrders(write, plan, test, { words: 'was voided', details: { voidedId: test.id } }) : []

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
  else if (order.causeTestId === voided.id) await returnOrder(write, order, voided, cause, 'was voided')
}
