import { randomUUID } from 'node:crypto'
import { In } from 'typeorm'
import type { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReworkCellEntity } from '#api/entities/rework-cell.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { ReworkStepEntity } from '#api/entities/rework-step.entity.ts'
import { insertOrder } from '#api/features/ground/order-records.ts'
import { addOrderStep, orderNumber } from '#api/features/ground/order-steps.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { reworkActions, reworkHeadline } from '#shared/domain/rework-advice.ts'

const OPEN = ['issued', 'working', 'ready'] as const

type Failure = Pick<FieldTestEntity, 'id' | 'number' | 'zoneId' | 'lift' | 'verdict' | 'sampledAt'>

/** The open order a chain's failing test caused, or null. */
export async function findOpenOrder({ manager, siteId }: Pick<SiteWrite, 'manager' | 'siteId'>, chain: readonly FieldTestEntity[]): Promise<ReworkOrderEntity | null> {
  if (chain.length === 0) return null
  return manager.findOne(ReworkOrderEntity, {
    where: { siteId, causeTestId: In(chain.map((test) => test.id)), state: In([...OPEN]) },
    order: { seq: 'DESC' },
  })
}

/** The cells an order holds now. */
export async function orderCells({ manager, siteId }: Pick<SiteWrite, 'manager' | 'siteId'>, orderId: string): Promise<number[]> {
  const rows = await manager.find(ReworkCellEntity, { where: { siteId, orderId }, order: { cell: 'ASC' } })
  return rows.filter((row) => row.leftAt === null).map((row) => row.cell)
}

/** Issues a rework order over the cells a failing test marked. */
export async function issueOrder(write: SiteWrite, plan: SitePlan, failure: Failure, cells: readonly number[]): Promise<ReworkOrderEntity> {
  const { reasons } = failure.verdict
  const order = await insertOrder(write, {
    id: randomUUID(),
    zoneId: failure.zoneId,
    lift: failure.lift,
    causeTestId: failure.id,
    actions: reworkActions(reasons),
    headline: reworkHeadline(reasons),
    cells,
  })
  const { now } = write
  await addOrderStep(write, order.id, { kind: 'issued', happenedAt: now, text: `${failure.number}: ${order.headline}`, details: { testId: failure.id } })
  write.record('order.issued', { type: 'order', id: order.id }, {
    number: orderNumber(order.seq),
    cause: failure.number,
    causeTestId: failure.id,
    lift: order.lift,
    cells: cells.map((cell) => plan.label(cell)),
    actions: order.actions,
    headline: order.headline,
  })
  write.changed('order', order.id)
  return order
}

/** A failing follower takes its chain's open order over: newly marked cells join, and reported rework has to be done again. */
export async function continueOrder(write: SiteWrite, plan: SitePlan, order: ReworkOrderEntity, failure: Failure, cells: readonly number[]): Promise<void> {
  const { manager, siteId, now } = write
  const held = new Set(await orderCells(write, order.id))
  const joined = cells.filter((cell) => !held.has(cell))
  if (joined.length > 0) {
    await manager.upsert(ReworkCellEntity, joined.map((cell) => ({ siteId, orderId: order.id, cell, leftAt: null })), ['siteId', 'orderId', 'cell'])
  }
  const wasReady = order.state === 'ready'
  const { reasons } = failure.verdict
  const actions = reworkActions(reasons)
  const headline = reworkHeadline(reasons)
  await manager.update(
    ReworkOrderEntity,
    { siteId, id: order.id },
    {
      causeTestId: failure.id,
      actions,
      headline,
      updatedAt: now,
      ...(wasReady ? { state: 'issued' as const, reportedAt: null, workingSince: null, retestPoints: [] } : {}),
    },
  )
  await addOrderStep(write, order.id, {
    kind: wasReady ? 'reopened' : 'edited',
    happenedAt: now,
    text: `${failure.number}: ${headline}`,
    details: { testId: failure.id, previousCauseId: order.causeTestId, joined },
  })
  write.record(wasReady ? 'order.reopened' : 'order.edited', { type: 'order', id: order.id }, {
    number: orderNumber(order.seq),
    cause: failure.number,
    causeTestId: failure.id,
    joined: joined.map((cell) => plan.label(cell)),
    headline,
  })
  write.changed('order', order.id)
}

/**
 * Gives an order back to an earlier failure of the chain when the follower that had taken it over is voided or judged again
 * to pass: the cells it brought leave, and rework that was reported before counts again.
 * @param why what became of the follower: "was voided"
 */
export async function returnOrder(write: SiteWrite, order: ReworkOrderEntity, follower: FieldTestEntity, cause: FieldTestEntity, why: string): Promise<void> {
  const { manager, siteId, now } = write
  const steps = await manager.find(ReworkStepEntity, { where: { siteId, orderId: order.id }, order: { position: 'ASC' } })
  const taken = steps.findLast((step) => step.details.testId === follower.id)
  const workedSince = taken !== undefined && steps.some((step) => step.position > taken.position && (step.kind === 'started' || step.kind === 'ready'))
  const joined = taken && !workedSince && Array.isArray(taken.details.joined) ? (taken.details.joined as number[]) : []
  if (joined.length > 0) await manager.update(ReworkCellEntity, { siteId, orderId: order.id, cell: In(joined) }, { leftAt: now })
  const report = taken?.kind === 'reopened' && !workedSince ? steps.findLast((step) => step.kind === 'ready' && step.position < taken.position) : undefined
  const { reasons } = cause.verdict
  await manager.update(
    ReworkOrderEntity,
    { siteId, id: order.id },
    {
      causeTestId: cause.id,
      actions: reworkActions(reasons),
      headline: reworkHeadline(reasons),
      updatedAt: now,
      ...(report ? { state: 'ready' as const, reportedAt: report.happenedAt } : {}),
    },
  )
  await addOrderStep(write, order.id, { kind: 'edited', happenedAt: now, text: `${follower.number} ${why}; ${cause.number} stands`, details: { left: joined } })
  write.record('order.edited', { type: 'order', id: order.id }, { number: orderNumber(order.seq), cause: cause.number, causeTestId: cause.id, follower: follower.number, why })
  write.changed('order', order.id)
}
