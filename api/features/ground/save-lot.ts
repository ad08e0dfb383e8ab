import { AllocationEntity } from '#api/entities/allocation.entity.ts'
import { LotEntity } from '#api/entities/lot.entity.ts'
import type { DerivedLot } from '#api/features/ground/change-ground.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import type { DerivedPair } from '#shared/domain/lot-facts.ts'

/** The derived columns of a lot: what `recompute` proves equal to a fresh derivation. */
export function derivedColumns({ derived }: DerivedLot) {
  return {
    volumeCm3: derived.volumeCm3,
    spokenCm3: derived.cells.reduce((sum, cell) => sum + cell.spokenCm3, 0),
    areaMm2: derived.areaMm2,
    fCm3: derived.fCm3,
    required: derived.required,
    taken: derived.taken,
    passing: derived.passing,
    owed: derived.owed,
    reruns: derived.reruns,
    toStake: derived.toStake,
    standing: derived.standing,
  } satisfies Partial<LotEntity>
}

/** One row a (test, cell): a frozen share and a free one of the same pair are one volume. */
export function allocationRows(siteId: string, { lot, derived }: DerivedLot): AllocationEntity[] {
  const rows = new Map<string, AllocationEntity>()
  for (const pair of derived.pairs) {
    const key = `${pair.testId} ${pair.cell}`
    rows.set(key, merge(rows.get(key), { siteId, lotId: lot.id, ...pick(pair) }))
  }
  return [...rows.values()]
}

function pick({ testId, cell, cm3, frozen, far }: DerivedPair) {
  return { testId, cell, cm3, frozen, far }
}

function merge(known: AllocationEntity | undefined, row: AllocationEntity): AllocationEntity {
  return known ? { ...row, cm3: known.cm3 + row.cm3, frozen: known.frozen || row.frozen, far: known.far || row.far } : row
}

export async function saveLot(write: SiteWrite, lot: DerivedLot): Promise<void> {
  const { manager, siteId, now } = write
  await manager.update(LotEntity, { siteId, id: lot.lot.id }, { ...derivedColumns(lot), updatedAt: now })
  await manager.delete(AllocationEntity, { siteId, lotId: lot.lot.id })
  const rows = allocationRows(siteId, lot)
  if (rows.length > 0) await manager.insert(AllocationEntity, rows)
}
