import { In } from 'typeorm'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { ReworkCellEntity } from '#api/entities/rework-cell.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { conflict } from '#api/errors.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { addOrderStep, orderNumber } from '#api/features/ground/order-steps.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import { authorizeStep } from '#api/features/rework/order-rights.ts'
import { loadOpenOrder, lotsOf, wrongStep } from '#api/features/rework/rework.service.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { retireIdleStakes } from '#api/features/stakes/retire-stakes.ts'
import { boundaryRing, cellOutline } from '#api/features/tests/locate-test.ts'
import { cellSideMm, gridToSite } from '#shared/domain/grid.ts'
import { passesToClose } from '#shared/domain/order-closing.ts'
import { drawStakes } from '#shared/domain/stakes.ts'
import type { OrderStepInput } from '#shared/schemas/rework.ts'

export interface StepAnswer {
  readonly id: string
  readonly number: string
  readonly revision: number
}

type Ready = Extract<OrderStepInput, { kind: 'ready' }>

/**
 * One step of an order: assigned, started, reported ready for retest, or help wanted. Reporting rework done puts every
 * test in those cells, at that lift and above, out of force, and draws the points of the retests inside the order.
 * @param seed 32 hexadecimal digits for the draw, fresh at this moment; it goes into the event
 */
export async function stepOrder(write: SiteWrite, orderId: string, step: OrderStepInput, seed: string): Promise<StepAnswer> {
  const { manager, siteId, now, role } = write
  authorizeStep(role, step.kind)
  const order = await loadOpenOrder(write, orderId)
  const happenedAt = 'happenedAt' in step ? notInFuture(new Date(step.happenedAt), now) : now
  if (happenedAt < order.openedAt && step.kind !== 'assigned') throw wrongStep(order, 'was issued after the time given.')
  const plan = await loadSitePlan(manager, siteId)
  const at = { siteId, id: orderId }

  switch (step.kind) {
    case 'assigned':
      await manager.update(ReworkOrderEntity, at, { assignedTo: step.to, updatedAt: now })
      await addOrderStep(write, orderId, { kind: 'assigned', happenedAt, text: step.to, details: {} })
      break
    case 'help':
      await addOrderStep(write, orderId, { kind: 'help', happenedAt, text: step.remarks, details: {} })
      break
    case 'started':
      if (order.state !== 'issued') throw conflict(`${orderNumber(order.seq)} is ${order.state === 'ready' ? 'reported done' : 'being worked on'} already. Nothing was changed.`)
      await manager.update(ReworkOrderEntity, at, { state: 'working', workingSince: happenedAt, updatedAt: now })
      await addOrderStep(write, orderId, { kind: 'started', happenedAt, text: '', details: {} })
      break
    case 'ready':
      await reportReady(write, plan, order, step, happenedAt, seed)
      break
  }
  const number = orderNumber(order.seq)
  write.record(`order.${step.kind}`, { type: 'order', id: orderId }, { number, ...step, ...(step.kind === 'ready' ? { seed } : {}) }, happenedAt)
  write.changed('order', orderId)
  if (step.kind === 'started' || step.kind === 'ready') {
    const cells = await heldCells(write, orderId)
    const change = await changeGround(write, plan, { lots: await lotsOf(write, order.lift, cells, true) })
    await retireIdleStakes(write, change.lots.values())
  }
  return { id: orderId, number, revision: write.revision }
}

async function heldCells({ manager, siteId }: SiteWrite, orderId: string): Promise<number[]> {
  return (await manager.findBy(ReworkCellEntity, { siteId, orderId })).filter((row) => row.leftAt === null).map((row) => row.cell)
}

async function reportReady(write: SiteWrite, plan: SitePlan, order: ReworkOrderEntity, step: Ready, happenedAt: Date, seed: string): Promise<void> {
  const { manager, siteId, now } = write
  if (order.state === 'ready') throw conflict(`${orderNumber(order.seq)} is reported done already. Nothing was changed.`)
  const cells = await heldCells(write, order.id)
  const rows = await manager.findBy(CellLiftEntity, { siteId, lift: order.lift, cell: In(cells) })
  const lots = await manager.findBy(LotEntity, { siteId, id: In(rows.flatMap((row) => row.lotId ?? [])) })
  const volume = rows.reduce((sum, row) => sum + row.volumeCm3, 0)
  const boundary = boundaryRing(plan)
  const points = drawStakes({
    // ground that has no fill on record yet has no lot: one retest
    owed: passesToClose(volume, lots.length > 0 ? Math.min(...lots.map((lot) => lot.fCm3)) : 0),
    standing: [],
    cells: cells.flatMap((cell) => {
      const geometry = plan.cells[cell]
      const unspokenCm3 = rows.find((row) => row.cell === cell)?.volumeCm3 ?? 0
      return geometry ? [{ cell, column: geometry.column, row: geometry.row, outline: cellOutline(plan, boundary, cell), unspokenCm3 }] : []
    }),
    sideMm: cellSideMm(plan.site.grid),
    setbackMm: plan.zone(order.zoneId).specification.body.stakeSetbackMm,
    seed,
  })
  await manager.update(ReworkOrderEntity, { siteId, id: order.id }, {
    state: 'ready',
    workingSince: order.workingSince ?? happenedAt,
    reportedAt: happenedAt,
    retestPoints: points.map(({ cell, u, v }) => ({ cell, ...gridToSite(plan.site.grid, { u, v }) })),
    updatedAt: now,
  })
  const { passes, waterLitres, depthUm, remarks } = step
  await addOrderStep(write, order.id, { kind: 'ready', happenedAt, text: remarks, details: { passes, waterLitres, depthUm } })
}
