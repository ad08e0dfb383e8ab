import { In } from 'typeorm'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import { FieldTestEntity } from '#api/entities/field-test.entity.ts'
import { ReworkCellEntity } from '#api/entities/rework-cell.entity.ts'
import { ReworkOrderEntity } from '#api/entities/rework-order.entity.ts'
import { conflict, invalid, notFound } from '#api/errors.ts'
import { cellsInZones } from '#api/features/ground/cells-in-zones.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { loadLotTests } from '#api/features/ground/lot-tests.queries.ts'
import { insertOrder, withdrawOrder } from '#api/features/ground/order-records.ts'
import { addOrderStep, orderNumber } from '#api/features/ground/order-steps.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import type { GroundWriteAnswer } from '#api/features/placements/record-placement.service.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { cellsThatMayLeave } from '#shared/domain/order-closing.ts'
import type { CreateOrder } from '#shared/schemas/rework.ts'

/** Issues an order by hand, for ground that no failing test marked. Its cells belong to one lot. */
export async function createOrder(write: SiteWrite, input: CreateOrder): Promise<GroundWriteAnswer> {
  const { manager, siteId, now } = write
  const plan = await loadSitePlan(manager, siteId)
  const cells = cellsInZones(plan, input.cells, input.zoneId)
  const lotId = await onlyLot(write, plan, input.lift, cells)
  const { id, zoneId, lift, actions, remarks } = input
  const { seq } = await insertOrder(write, { id, zoneId, lift, causeTestId: null, actions, headline: remarks.slice(0, 200), cells })
  await addOrderStep(write, input.id, { kind: 'issued', happenedAt: now, text: input.remarks, details: {} })
  const number = orderNumber(seq)
  write.record('order.issued', { type: 'order', id: input.id }, { number, lift: input.lift, cells: cells.map((cell) => plan.label(cell)), actions: input.actions, remarks: input.remarks })
  write.changed('order', input.id)
  const change = await changeGround(write, plan, { lots: [lotId] })
  return { id: input.id, number, revision: write.revision, cells: change.cells.length, volume: 0 }
}

/**
 * Changes which cells an open order holds. A cell leaves only where a pass sampled after the failure lies in it, or
 * between it and the failure; cells that join belong to the order's lot.
 */
export async function editOrder(write: SiteWrite, id: string, wanted: readonly number[], reason: string): Promise<GroundWriteAnswer> {
  const { manager, siteId, now } = write
  const plan = await loadSitePlan(manager, siteId)
  const order = await loadOpenOrder(write, id)
  const cells = cellsInZones(plan, wanted, order.zoneId)
  const held = (await manager.findBy(ReworkCellEntity, { siteId, orderId: id })).filter((row) => row.leftAt === null).map((row) => row.cell)
  const leaving = held.filter((cell) => !cells.includes(cell))
  const joining = cells.filter((cell) => !held.includes(cell))
  if (leaving.length === 0 && joining.length === 0) throw conflict('The order holds exactly these cells already. Nothing was changed.')
  await refuseLeaving(write, plan, order, held, leaving)
  const lotId = await onlyLot(write, plan, order.lift, [...held, ...joining])

  if (leaving.length > 0) await manager.update(ReworkCellEntity, { siteId, orderId: id, cell: In(leaving) }, { leftAt: now })
  if (joining.length > 0) await manager.upsert(ReworkCellEntity, joining.map((cell) => ({ siteId, orderId: id, cell, leftAt: null })), ['siteId', 'orderId', 'cell'])
  const text = [leaving.length > 0 ? `${names(plan, leaving)} left` : '', joining.length > 0 ? `${names(plan, joining)} joined` : '', reason].filter(Boolean).join('; ')
  await addOrderStep(write, id, { kind: 'edited', happenedAt: now, text, details: { left: leaving, joined: joining } })
  const number = orderNumber(order.seq)
  write.record('order.edited', { type: 'order', id }, { number, left: leaving.map((cell) => plan.label(cell)), joined: joining.map((cell) => plan.label(cell)), reason })
  write.changed('order', id)
  const change = await changeGround(write, plan, { lots: [lotId] })
  return { id, number, revision: write.revision, cells: change.cells.length, volume: 0 }
}

/** The lead takes an order back that no failing test stands behind any more, with a reason. */
export async function withdrawByLead(write: SiteWrite, id: string, reason: string): Promise<GroundWriteAnswer> {
  const { manager, siteId } = write
  const plan = await loadSitePlan(manager, siteId)
  const order = await loadOpenOrder(write, id)
  const cells = await manager.findBy(ReworkCellEntity, { siteId, orderId: id })
  const cause = order.causeTestId ? await currentFailure(write, order) : null
  if (cause) throw conflict(`${cause} still fails, so its order stands. Void the test with a reason, or close the order by retests. Nothing was changed.`)
  await withdrawOrder(write, order, reason)
  const lots = await lotsOf(write, order.lift, cells.map((row) => row.cell))
  const change = await changeGround(write, plan, { lots })
  return { id, number: orderNumber(order.seq), revision: write.revision, cells: change.cells.length, volume: 0 }
}

/** An open order, or 404 / 409 in plain words. */
export async function loadOpenOrder({ manager, siteId }: SiteWrite, id: string): Promise<ReworkOrderEntity> {
  const order = await manager.findOneBy(ReworkOrderEntity, { siteId, id })
  if (!order) throw notFound()
  if (order.state === 'closed' || order.state === 'withdrawn') throw conflict(`${orderNumber(order.seq)} is ${order.state} already. Nothing was changed.`)
  return order
}

/** Lots that hold these cells at a lift or, with `above`, at that lift and every higher one. */
export async function lotsOf({ manager, siteId }: SiteWrite, lift: number, cells: readonly number[], above = false): Promise<string[]> {
  const rows: { lot_id: string }[] = await manager.query(
    `SELECT DISTINCT \`lot_id\` FROM \`cell_lift\` WHERE \`site_id\` = ? AND \`lift\` ${above ? '>=' : '='} ? AND \`cell\` IN (?) AND \`lot_id\` IS NOT NULL`,
    [siteId, lift, cells],
  )
  return rows.map((row) => row.lot_id)
}

async function onlyLot({ manager, siteId }: SiteWrite, plan: SitePlan, lift: number, cells: readonly number[]): Promise<string> {
  const rows = await manager.findBy(CellLiftEntity, { siteId, lift, cell: In([...cells]) })
  const bare = cells.filter((cell) => !rows.some((row) => row.cell === cell && row.lotId !== null))
  if (bare.length > 0) throw conflict(`Nothing is placed at lift ${lift} in ${names(plan, bare)}. Leave it out; what you entered was kept.`)
  const lots = new Set(rows.map((row) => row.lotId))
  const [lotId] = lots
  if (lots.size > 1 || !lotId) throw conflict('These cells belong to more than one lot. Issue an order for each lot; what you entered was kept.')
  return lotId
}

async function refuseLeaving(write: SiteWrite, plan: SitePlan, order: ReworkOrderEntity, held: readonly number[], leaving: readonly number[]): Promise<void> {
  const { manager, siteId } = write
  if (leaving.length === 0 || !order.causeTestId) return
  const cause = await manager.findOneByOrFail(FieldTestEntity, { siteId, id: order.causeTestId })
  const lots = await lotsOf(write, order.lift, held)
  const lotCells = lots.length > 0 ? await manager.findBy(CellLiftEntity, { siteId, lotId: In(lots) }) : []
  const tests = await loadLotTests(manager, siteId, order.lift, lotCells.map((row) => row.cell))
  const passes = tests.filter((test) => test.outcome === 'pass' && !test.superseded)
  const failure = { at: { u: cause.u, v: cause.v }, cell: cause.cell, sampledAt: cause.sampledAt.getTime() }
  const cells = leaving.flatMap((cell) => plan.cells[cell] ?? [])
  const may = new Set(cellsThatMayLeave(failure, cells, passes).map((found) => found.cell))
  const stay = leaving.filter((cell) => !may.has(cell))
  if (stay.length > 0) {
    throw conflict(`${names(plan, stay)} cannot leave yet: no passing test sampled after ${cause.number} lies in it or between it and the failure. Nothing was changed.`, { cells: stay })
  }
}

/** The number of the chain's current result when that fails, or null when it was voided, refuted or passed since. */
async function currentFailure({ manager, siteId }: SiteWrite, order: ReworkOrderEntity): Promise<string | null> {
  const cause = await manager.findOneByOrFail(FieldTestEntity, { siteId, id: order.causeTestId ?? '' })
  const chain = await manager.find(FieldTestEntity, { where: { siteId, chainId: cause.chainId }, order: { sampledAt: 'ASC', seq: 'ASC' } })
  const current = chain.findLast((test) => test.voidedAt === null)
  return current && (current.outcome === 'fail' || current.treatedAsFail) ? current.number : null
}

function names(plan: SitePlan, cells: readonly number[]): string {
  return cells.map((cell) => plan.label(cell)).join(', ')
}

/** Said when a step does not fit where the order stands. */
export function wrongStep(order: ReworkOrderEntity, words: string): Error {
  return invalid(`${orderNumber(order.seq)} ${words} Nothing was saved; what you entered was kept.`)
}
