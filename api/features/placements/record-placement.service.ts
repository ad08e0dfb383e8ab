import { BorrowMaterialEntity } from '#api/entities/borrow-material.entity.ts'
import { PlacementCellEntity } from '#api/entities/placement-cell.entity.ts'
import { PlacementEntity } from '#api/entities/placement.entity.ts'
import { conflict, invalid } from '#api/errors.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import { notInFuture } from '#api/features/ground/times.ts'
import { assignToLots } from '#api/features/placements/lots.service.ts'
import { loadPlacedQuarters, loadUncoverable } from '#api/features/placements/placed.queries.ts'
import { placeCells } from '#api/features/placements/place-cells.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { placementVolume } from '#shared/domain/placement-volume.ts'
import { looseToCompactedFactor } from '#shared/domain/volume-state.ts'
import type { CreatePlacement } from '#shared/schemas/placement.ts'

export interface GroundWriteAnswer {
  readonly id: string
  readonly number: string | null
  readonly revision: number
  readonly cells: number
  readonly volume: number
}

/** P-0041 of 41. */
export function placementNumber(seq: number): string {
  return `P-${String(seq).padStart(4, '0')}`
}

/**
 * Records fill placed. The placement's cells join or open lots; fill on ground that is not released asks for a reason
 * first (409 covered_too_early) and is marked covered too early with it.
 */
export async function recordPlacement(write: SiteWrite, input: CreatePlacement): Promise<GroundWriteAnswer> {
  const { manager, siteId, user, now } = write
  const plan = await loadSitePlan(manager, siteId)
  const zone = plan.zone(input.zoneId)
  const happenedAt = notInFuture(new Date(input.happenedAt), now)
  const material = await manager.findOneBy(BorrowMaterialEntity, { siteId, id: input.materialId })
  if (!material) throw invalid('That material is not on this site. Choose one of its borrow materials; what you entered was kept.')

  const placed = await loadPlacedQuarters(manager, siteId, input.lift, input.cells.map(({ cell }) => cell))
  const cells = placeCells(plan, zone, input, placed)
  const volume = placementVolume(
    {
      cells: cells.map(({ areaMm2, layer, quarters }) => ({ areaMm2, layer, quarters })),
      loads: input.loads > 0 ? input.loads : undefined,
      loadVolumeCm3: input.loadVolumeCm3,
      looseToCompacted: looseToCompactedFactor(material),
    },
    zone.volumeBasis,
  )
  if (!volume.ok) throw invalid(`${volume.reason} Nothing was saved; what you entered was kept.`)

  const uncoverable = await loadUncoverable(manager, plan, input.lift, cells.map(({ cell }) => cell))
  if (uncoverable.length > 0 && input.coverReason === null) {
    throw conflict(
      `${uncoverable.length} of these cells sit on ground that is not released. Leave them out, or say why fill goes there.`,
      { cells: uncoverable },
      'covered_too_early',
    )
  }

  const { lots, assigned } = await assignToLots(write, plan, zone, { ...input, happenedAt, cells })
  const seq = write.take('placement')
  await manager.insert(PlacementEntity, {
    siteId,
    id: input.id,
    seq,
    zoneId: zone.id,
    lift: input.lift,
    materialId: material.id,
    happenedAt,
    recordedAt: now,
    recordedBy: user.id,
    loads: input.loads,
    loadVolumeCm3: input.loadVolumeCm3,
    looseThicknessUm: input.looseThicknessUm,
    machine: input.machine,
    passes: input.passes,
    remarks: input.remarks,
    geometryCm3: volume.geometryCm3,
    loadsCm3: volume.loadsCm3 ?? 0,
    drivingCm3: volume.drivingCm3,
    coverReason: uncoverable.length > 0 ? input.coverReason : null,
    voidedAt: null,
    voidedBy: null,
    voidReason: null,
    createdAt: now,
    updatedAt: now,
  })
  const early = new Set(uncoverable)
  await manager.insert(
    PlacementCellEntity,
    cells.map(({ cell, quarters }, index) => ({
      siteId,
      placementId: input.id,
      cell,
      lift: input.lift,
      lotId: assigned(cell),
      quarters,
      volumeCm3: volume.perCell[index] ?? 0,
      coveredEarly: early.has(cell),
    })),
  )
  const number = placementNumber(seq)
  write.record(
    'placement.recorded',
    { type: 'placement', id: input.id },
    { number, ...input, cells: cells.map(({ cell, quarters }) => [plan.label(cell), quarters]), drivingCm3: volume.drivingCm3, coveredEarly: uncoverable.map((cell) => plan.label(cell)) },
    happenedAt,
  )
  write.changed('placement', input.id)
  const change = await changeGround(write, plan, { lots })
  return { id: input.id, number, revision: write.revision, cells: change.cells.length, volume: volume.drivingCm3 }
}
