import { randomUUID } from 'node:crypto'
import { QueryFailedError } from 'typeorm'
import type { EntityManager } from 'typeorm'
import type { WriteDeps } from '#api/deps.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { SpecificationEntity } from '#api/entities/specification.entity.ts'
import { ZoneEntity } from '#api/entities/zone.entity.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { insertRows } from '#api/features/sites/insert-rows.ts'
import { layOutSite } from '#api/features/sites/lay-out-site.ts'
import type { LaidOutSite } from '#api/features/sites/lay-out-site.ts'
import { presentSite } from '#api/features/sites/site.queries.ts'
import { deriveColumn } from '#shared/domain/column.ts'
import { groundStateCode } from '#shared/domain/ground-state.ts'
import { layerVolumeCm3 } from '#shared/domain/placement-volume.ts'
import type { CellGeometry } from '#shared/domain/site-geometry.ts'
import type { CreateSite, Site } from '#shared/schemas/site.ts'

/**
 * Makes a site with its zones, specifications and cells; whoever makes it becomes its QC lead.
 * @returns the site as GET answers it; for a repeated request (the same id and content) the first answer
 */
export async function createSite(deps: WriteDeps, userId: string, input: CreateSite): Promise<Site> {
  const layout = layOutSite(input)
  try {
    return await writeSite(deps, userId, input, layout)
  } catch (error) {
    // sent twice at the same time: the other one made the site, so that this one finds its answer
    if (isDuplicate(error)) return writeSite(deps, userId, input, layout)
    throw error
  }
}

function isDuplicate(error: unknown): boolean {
  return error instanceof QueryFailedError && (error.driverError as { readonly errno?: unknown }).errno === 1062
}

function writeSite(deps: WriteDeps, userId: string, input: CreateSite, layout: LaidOutSite): Promise<Site> {
  return writeToSite(
    deps,
    {
      siteId: input.id,
      userId,
      verb: 'site.setup',
      request: { id: input.id, body: input },
      create: (manager, now) => insertSite(manager, userId, input, now),
    },
    async (write) => {
      await insertPlan(write, layout)
      await insertGround(write, layout)
      write.record('site.created', { type: 'site', id: input.id }, {
        name: input.name,
        crs: input.crs,
        cells: layout.cells.length,
        zones: layout.zones.map(({ input: { id, name }, designCm3 }) => ({ id, name, designCm3 })),
      })
      write.changed('site', input.id)
      return presentSite(write, layout.cells)
    },
  )
}

async function insertSite(manager: EntityManager, userId: string, input: CreateSite, now: Date): Promise<void> {
  const { id, name, subtitle, crs, unitSystem, timeZone, dayCutHour, grid, boundary, waterDensity, verticalDatum } = input
  await manager.insert(SiteEntity, {
    id,
    name,
    subtitle,
    crsCode: crs,
    unitSystem,
    timeZone,
    dayCutHour,
    grid,
    boundary,
    rounding: input.zones[0]?.specification.rounding ?? { method: 'rounding', ties: 'even' },
    waterDensity,
    combinedFactor: 1,
    verticalDatum,
    createdBy: userId,
    createdAt: now,
    updatedAt: now,
  })
}

async function insertPlan({ manager, siteId, user, now }: SiteWrite, layout: LaidOutSite): Promise<void> {
  const stamps = { siteId, createdAt: now, updatedAt: now }
  for (const [position, { input, ...figures }] of layout.zones.entries()) {
    const { specification, ...zone } = input
    await manager.insert(ZoneEntity, { ...zone, ...figures, ...stamps, position })
    await manager.insert(SpecificationEntity, { ...stamps, id: randomUUID(), zoneId: zone.id, version: 1, body: specification, createdBy: user.id })
  }
}

const CELL_COLUMNS = [
  'site_id', 'cell', 'grid_column', 'grid_row', 'zone_id', 'zone_index', 'area_mm2', 'centroid_u', 'centroid_v', 'base_um', 'design_um',
  'surface_lift', 'ready', 'next_lift', 'next_cm3', 'block_lift', 'block_reason',
] as const
const CELL_LIFT_COLUMNS = ['site_id', 'lift', 'cell', 'zone_id', 'state', 'flags', 'lot_id', 'bottom_um', 'top_um', 'volume_cm3', 'spoken_cm3', 'naming_test_id'] as const
const LIFT_TOTAL_COLUMNS = ['site_id', 'zone_id', 'lift', 'state', 'cells', 'cm3'] as const

/** Every cell on its foundation, which waits for its inspection. */
async function insertGround({ manager, siteId }: SiteWrite, { cells, zones, layers }: LaidOutSite): Promise<void> {
  const zoneIdOf = ({ zone }: CellGeometry) => zones[zone]?.input.id ?? null
  const filled = cells.filter((cell) => zoneIdOf(cell) !== null)
  const waiting = groundStateCode('awaiting-test')
  const standing = (cell: CellGeometry) => {
    if (zoneIdOf(cell) === null) return [0, false, null, 0, null, null]
    const planned = layers[cell.cell] ?? []
    const column = deriveColumn({ layers: planned, rows: [] })
    const next = planned.find((layer) => layer.lift === column.nextLift)
    const nextCm3 = next ? layerVolumeCm3(cell.areaMm2, next.topUm - next.bottomUm) : 0
    return [column.surfaceLift, column.ready, column.nextLift, nextCm3, column.blockedBy?.lift ?? null, column.blockedBy?.reason ?? null]
  }
  await insertRows(manager, 'cell', CELL_COLUMNS, cells.map((cell) => [
    siteId, cell.cell, cell.column, cell.row, zoneIdOf(cell), cell.zone, cell.areaMm2, cell.centroid.u, cell.centroid.v, cell.baseUm, cell.designUm,
    ...standing(cell),
  ]))
  await insertRows(manager, 'cell_lift', CELL_LIFT_COLUMNS, filled.map((cell) => [
    siteId, 0, cell.cell, zoneIdOf(cell), waiting, 0, null, cell.baseUm, cell.baseUm, 0, 0, null,
  ]))
  await insertRows(manager, 'lift_total', LIFT_TOTAL_COLUMNS, zones.map(({ input }, index) => [
    siteId, input.id, 0, waiting, cells.filter((cell) => cell.zone === index).length, 0,
  ]))
}
