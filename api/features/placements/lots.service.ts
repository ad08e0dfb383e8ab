import { randomUUID } from 'node:crypto'
import { IsNull } from 'typeorm'
import { LotEntity } from '#api/entities/lot.entity.ts'
import { PlacementCellEntity } from '#api/entities/placement-cell.entity.ts'
import { StakeEntity } from '#api/entities/stake.entity.ts'
import type { PlanZone, SitePlan } from '#api/features/ground/site-plan.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { assignLots } from '#shared/domain/assign-lots.ts'
import type { ExistingLot, PlacedCell } from '#shared/domain/assign-lots.ts'
import { lotKey, workDay } from '#shared/domain/lots.ts'

interface Placing {
  readonly lift: number
  readonly materialId: string
  readonly happenedAt: Date
  readonly cells: readonly PlacedCell[]
}

interface Assigned {
  /** lots that gained fill */
  readonly lots: readonly string[]
  readonly assigned: (cell: number) => string
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** "Pad L10, Dec 1", with a letter for the second piece of the same day on. */
export function lotName(zone: Pick<PlanZone, 'shortName'>, lift: number, day: string, piece: number): string {
  const [, month, date] = day.split('-').map(Number)
  const letter = piece === 0 ? '' : ` ${String.fromCharCode(97 + (piece % 26))}${piece >= 26 ? Math.floor(piece / 26) : ''}`
  return `${zone.shortName} L${lift}, ${MONTHS[(month ?? 1) - 1]} ${date}${letter}`
}

/** Finds or opens the lots a placement's cells belong to; lots it bridges become the oldest one. */
export async function assignToLots(write: SiteWrite, plan: SitePlan, zone: PlanZone, placing: Placing): Promise<Assigned> {
  const { manager, siteId, now } = write
  const { lift, materialId } = placing
  const day = workDay(placing.happenedAt.getTime(), plan.site.timeZone, plan.site.dayCutHour)
  const standing = await manager.find(LotEntity, { where: { siteId, zoneId: zone.id, lift, mergedInto: IsNull() }, order: { seq: 'ASC' } })
  const existing = await withCells(write, plan, zone, standing)
  const key = lotKey(zone.lotBasis, { zoneId: zone.id, lift, materialId, day })
  const { assignments, newLots, merges } = assignLots(existing, placing.cells, key)

  for (const { from, into } of merges) await mergeLot(write, from, into)
  const pieces = standing.filter((lot) => lot.workDay === day && lot.materialId === materialId).length
  const opened: string[] = []
  for (let index = 0; index < newLots; index++) {
    const id = randomUUID()
    opened.push(id)
    await manager.insert(LotEntity, {
      siteId,
      id,
      seq: write.take('lot'),
      name: lotName(zone, lift, day, await nextPiece(write, zone, lift, day, pieces + index)),
      zoneId: zone.id,
      lift,
      materialId,
      workDay: day,
      specificationId: zone.specification.id,
      mergedInto: null,
      volumeCm3: 0,
      spokenCm3: 0,
      areaMm2: 0,
      fCm3: 0,
      required: 0,
      taken: 0,
      passing: 0,
      owed: 0,
      reruns: 0,
      toStake: 0,
      standing: 'not-placed',
      createdAt: now,
      updatedAt: now,
    })
  }
  const lotOf = new Map(assignments.map((assignment) => [assignment.cell, 'lotId' in assignment ? assignment.lotId : (opened[assignment.newLotIndex] ?? '')]))
  return {
    lots: [...new Set(lotOf.values())],
    assigned(cell) {
      const lot = lotOf.get(cell)
      if (!lot) throw new Error(`Cell ${cell} was given no lot`)
      return lot
    },
  }
}

/** Two lots of one day never share a name, whatever their materials. */
async function nextPiece(write: SiteWrite, zone: PlanZone, lift: number, day: string, least: number): Promise<number> {
  const { manager, siteId } = write
  const names = new Set((await manager.findBy(LotEntity, { siteId, zoneId: zone.id, lift, workDay: day })).map((lot) => lot.name))
  let piece = least
  while (names.has(lotName(zone, lift, day, piece))) piece++
  return piece
}

async function withCells(write: SiteWrite, plan: SitePlan, zone: PlanZone, lots: readonly LotEntity[]): Promise<ExistingLot[]> {
  const { manager, siteId } = write
  if (lots.length === 0) return []
  const rows: { lot_id: string; cell: number }[] = await manager.query(
    'SELECT DISTINCT pc.`lot_id`, pc.`cell` FROM `placement_cell` pc JOIN `placement` p ON p.`site_id` = pc.`site_id` AND p.`id` = pc.`placement_id` WHERE pc.`site_id` = ? AND pc.`lot_id` IN (?) AND p.`voided_at` IS NULL',
    [siteId, lots.map((lot) => lot.id)],
  )
  return lots.map((lot) => ({
    lotId: lot.id,
    seq: lot.seq,
    key: lotKey(zone.lotBasis, { zoneId: zone.id, lift: lot.lift, materialId: lot.materialId ?? '', day: lot.workDay }),
    cells: rows.flatMap((row): PlacedCell[] => {
      const geometry = row.lot_id === lot.id ? plan.cells[row.cell] : undefined
      return geometry ? [{ cell: row.cell, column: geometry.column, row: geometry.row }] : []
    }),
  }))
}

/** Fill and stakes of a bridged lot go to the older one; its row stays, saying where it went. */
async function mergeLot(write: SiteWrite, from: string, into: string): Promise<void> {
  const { manager, siteId, now } = write
  await manager.update(PlacementCellEntity, { siteId, lotId: from }, { lotId: into })
  await manager.update(StakeEntity, { siteId, lotId: from }, { lotId: into })
  await manager.query('DELETE FROM `allocation` WHERE `site_id` = ? AND `lot_id` = ?', [siteId, from])
  await manager.update(
    LotEntity,
    { siteId, id: from },
    { mergedInto: into, volumeCm3: 0, spokenCm3: 0, areaMm2: 0, fCm3: 0, required: 0, taken: 0, passing: 0, owed: 0, reruns: 0, toStake: 0, standing: 'not-placed', updatedAt: now },
  )
  write.record('lot.merged', { type: 'lot', id: from }, { into })
  write.changed('lot', from)
}
