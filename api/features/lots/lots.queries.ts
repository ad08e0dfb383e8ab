import { In, IsNull } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { AllocationEntity } from '#api/entities/allocation.entity.ts'
import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { CellLiftEntity } from '#api/entities/cell-lift.entity.ts'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { SpecificationEntity } from '#api/entities/specification.entity.ts'
import { notFound } from '#api/errors.ts'
import { groundStateOf, mayBeCovered } from '#shared/domain/ground-state.ts'
import { groupBy } from '#shared/domain/group-by.ts'
import { lotBlocks } from '#shared/domain/lot-blocks.ts'
import type { TestHolding } from '#shared/domain/lot-blocks.ts'
import type { Lot, LotQuery } from '#shared/schemas/lot.ts'

interface TestRow {
  readonly id: string
  readonly seq: number
  readonly outcome: TestHolding['outcome']
  readonly treated_as_fail: number
}

/** The lots of a site that hold or held fill of their own, by zone and lift where given, oldest first. */
export async function listLots(manager: EntityManager, siteId: string, { zoneId, lift }: LotQuery): Promise<Lot[]> {
  const lots = await manager.find(LotEntity, {
    where: { siteId, mergedInto: IsNull(), ...(zoneId === undefined ? {} : { zoneId }), ...(lift === undefined ? {} : { lift }) },
    order: { seq: 'ASC' },
  })
  return presentLots(manager, siteId, lots)
}

/** A lot of this site; where it was joined to another, that one. */
export async function loadLotView(manager: EntityManager, siteId: string, id: string): Promise<Lot> {
  const lot = await manager.findOneBy(LotEntity, { siteId, id })
  if (!lot) throw notFound()
  if (lot.mergedInto !== null) return loadLotView(manager, siteId, lot.mergedInto)
  const [view] = await presentLots(manager, siteId, [lot])
  if (!view) throw notFound()
  return view
}

async function presentLots(manager: EntityManager, siteId: string, lots: readonly LotEntity[]): Promise<Lot[]> {
  if (lots.length === 0) return []
  const ids = lots.map((lot) => lot.id)
  const cells = groupBy(await manager.find(CellLiftEntity, { where: { siteId, lotId: In(ids) }, order: { cell: 'ASC' } }), (row) => row.lotId ?? '')
  const shares = groupBy(await manager.findBy(AllocationEntity, { siteId, lotId: In(ids) }), (row) => row.lotId)
  const tests = await loadHolders(manager, siteId, [...shares.values()].flat().map((share) => share.testId))
  const staked = await countStakes(manager, siteId, ids)
  const released = await loadReleasedAt(manager, siteId, ids)
  const materials = new Map((await manager.findBy(BorrowMaterialEntity, { siteId })).map((material) => [material.id, material.name]))
  const versions = new Map((await manager.findBy(SpecificationEntity, { siteId })).map((specification) => [specification.id, specification.version]))
  return lots.map((lot) => {
    const own = cells.get(lot.id) ?? []
    const { id, seq, name, zoneId, lift, workDay, volumeCm3, spokenCm3, areaMm2, fCm3, required, taken, passing, owed, reruns, standing } = lot
    return {
      id,
      seq,
      name,
      zoneId,
      lift,
      materialId: lot.materialId ?? '',
      materialName: materials.get(lot.materialId ?? '') ?? '',
      workDay,
      specificationVersion: versions.get(lot.specificationId) ?? 0,
      cells: own.map((row) => row.cell),
      volumeCm3,
      spokenCm3,
      areaMm2,
      fCm3,
      required,
      taken,
      passing,
      owed,
      reruns,
      staked: staked.get(id) ?? 0,
      standing,
      releasedAt: standing === 'released' ? (released.get(id)?.toISOString() ?? null) : null,
      blocks: lotBlocks(volumeCm3, fCm3, holdingsOf(shares.get(id) ?? [], own, tests)),
    }
  })
}

function holdingsOf(shares: readonly AllocationEntity[], cells: readonly CellLiftEntity[], tests: ReadonlyMap<string, TestRow>): TestHolding[] {
  const covered = new Set(cells.filter((row) => mayBeCovered(groundStateOf(row.state))).map((row) => row.cell))
  return [...groupBy(shares, (share) => share.testId)].flatMap(([testId, own]): TestHolding[] => {
    const test = tests.get(testId)
    if (!test) return []
    return [
      {
        testId,
        seq: test.seq,
        outcome: test.treated_as_fail ? 'fail' : test.outcome,
        cm3: own.reduce((sum, share) => sum + share.cm3, 0),
        released: own.every((share) => covered.has(share.cell)),
      },
    ]
  })
}

async function loadHolders(manager: EntityManager, siteId: string, testIds: readonly string[]): Promise<Map<string, TestRow>> {
  if (testIds.length === 0) return new Map()
  const rows: TestRow[] = await manager.query('SELECT `id`, `seq`, `outcome`, `treated_as_fail` FROM `field_test` WHERE `site_id` = ? AND `id` IN (?)', [siteId, [...new Set(testIds)]])
  return new Map(rows.map((row) => [row.id, row]))
}

async function countStakes(manager: EntityManager, siteId: string, lotIds: readonly string[]): Promise<Map<string, number>> {
  const rows: { lot_id: string; n: string }[] = await manager.query(
    'SELECT `lot_id`, COUNT(*) AS `n` FROM `stake` WHERE `site_id` = ? AND `lot_id` IN (?) AND `retired_at` IS NULL GROUP BY `lot_id`',
    [siteId, lotIds],
  )
  return new Map(rows.map((row) => [row.lot_id, Number(row.n)]))
}

/** When the last release of a lot's cells that stands was given, acceptance included. */
async function loadReleasedAt(manager: EntityManager, siteId: string, lotIds: readonly string[]): Promise<Map<string, Date>> {
  const rows: { lot_id: string; at: Date | null }[] = await manager.query(
    "SELECT x.`lot_id`, MAX(COALESCE(r.`accepted_at`, r.`happened_at`)) AS `at` FROM `cell_lift` x JOIN `release_cell` c ON c.`site_id` = x.`site_id` AND c.`lift` = x.`lift` AND c.`cell` = x.`cell` AND c.`revoked_at` IS NULL JOIN `release_record` r ON r.`site_id` = c.`site_id` AND r.`id` = c.`release_id` AND r.`status` = 'released' WHERE x.`site_id` = ? AND x.`lot_id` IN (?) GROUP BY x.`lot_id`",
    [siteId, lotIds],
  )
  return new Map(rows.flatMap((row) => (row.at ? [[row.lot_id, row.at] as const] : [])))
}
