import type { EntityManager } from 'typeorm'
import { closeOrder } from '#api/features/ground/close-order.ts'
import { deriveFoundation } from '#api/features/ground/foundation.ts'
import { loadGroundTotals } from '#api/features/ground/ground-totals.queries.ts'
import { loadLot, withSiblings } from '#api/features/ground/lot-facts.queries.ts'
import type { LoadedLot } from '#api/features/ground/lot-facts.queries.ts'
import { saveLot } from '#api/features/ground/save-lot.ts'
import { deriveRows, rowsOfLot } from '#api/features/ground/layer-rows.ts'
import type { LayerRow } from '#api/features/ground/layer-rows.ts'
import { revokeBroken } from '#api/features/ground/revoke-release.ts'
import { saveRows } from '#api/features/ground/save-rows.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { deriveLot } from '#shared/domain/derive-lot.ts'
import type { LotDerivation } from '#shared/domain/lot-facts.ts'
import type { SitePoint } from '#shared/domain/site-geometry.ts'

/** What a change of facts can have moved. */
export interface GroundScope {
  readonly lots?: Iterable<string>
  /** foundation cells (lift 0) */
  readonly foundation?: Iterable<number>
  /** where the change came from, so that open boards ink in from there */
  readonly from?: SitePoint | null
}

export interface DerivedLot extends LoadedLot {
  readonly derived: LotDerivation
}

export interface GroundChange {
  /** cells in which anything changed */
  readonly cells: readonly number[]
  readonly lots: ReadonlyMap<string, DerivedLot>
}

/** More rounds than this mean that two rules undo each other: a programmer's error. */
const MOST_ROUNDS = 12

/**
 * Derives the touched lots and columns again from the facts, stores what changed, and puts the patch on the write: the
 * one way the Ground changes. Releases that lost their basis are revoked and orders with enough passes closed on the
 * way, each by its event, until nothing moves any more.
 */
export async function changeGround(write: SiteWrite, plan: SitePlan, scope: GroundScope): Promise<GroundChange> {
  const { manager, siteId } = write
  const lots = new Map<string, DerivedLot>()
  const waiting = new Set(await withSiblings(manager, siteId, scope.lots ?? []))
  for (let round = 0; waiting.size > 0; round++) {
    if (round > MOST_ROUNDS) throw new Error(`The ground of site ${siteId} does not settle`)
    for (const lotId of [...waiting]) {
      waiting.delete(lotId)
      const settled = await settleLot(write, plan, lotId)
      lots.set(lotId, settled)
    }
  }
  for (const lot of lots.values()) await saveLot(write, lot)

  const foundation = await deriveFoundation(manager, plan, [...(scope.foundation ?? [])])
  const rows: LayerRow[] = [...foundation]
  for (const lot of lots.values()) rows.push(...rowsOfLot(plan, lot))
  const change = await deriveRows(manager, plan, rows, [...lots.keys()])
  await saveRows(manager, plan, change)

  for (const lotId of lots.keys()) write.changed('lot', lotId)
  write.patch({
    entries: change.entries,
    lots: [...lots.keys()],
    totals: await loadGroundTotals(manager, plan, write.now),
    from: scope.from ?? null,
  })
  return { cells: [...new Set(change.entries.map((entry) => entry.cell))], lots }
}

/** Derives one lot until no release of it is broken and no order of it wants closing. */
async function settleLot(write: SiteWrite, plan: SitePlan, lotId: string): Promise<DerivedLot> {
  for (let round = 0; round <= MOST_ROUNDS; round++) {
    const loaded = await loadLot(write.manager, plan, lotId)
    const derived = deriveLot(loaded.facts)
    const closing = derived.orders.filter((order) => order.closes)
    if (derived.brokenReleases.length === 0 && closing.length === 0) return { ...loaded, derived }
    await revokeBroken(write, plan, loaded, derived.brokenReleases)
    for (const order of closing) await closeOrder(write, order.orderId)
  }
  throw new Error(`Lot ${lotId} does not settle`)
}

/** Reads and derives a lot without changing anything, for previews and checks. */
export async function deriveLotNow(manager: EntityManager, plan: SitePlan, lotId: string): Promise<DerivedLot> {
  const loaded = await loadLot(manager, plan, lotId)
  return { ...loaded, derived: deriveLot(loaded.facts) }
}
