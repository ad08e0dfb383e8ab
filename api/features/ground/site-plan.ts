import type { EntityManager } from 'typeorm'
import { CellEntity } from '#api/entities/cell.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { SpecificationEntity } from '#api/entities/specification.entity.ts'
import { ZoneEntity } from '#api/entities/zone.entity.ts'
import { invalid, notFound } from '#api/errors.ts'
import { cellLabel } from '#shared/domain/cell-label.ts'
import { makeCellLookup } from '#shared/domain/cells.ts'
import type { CellLookup } from '#shared/domain/cells.ts'
import { cellLayers } from '#shared/domain/lift-schedule.ts'
import type { CellGeometry, Layer } from '#shared/domain/site-geometry.ts'

export interface PlanZone extends ZoneEntity {
  readonly specification: SpecificationEntity
}

/** A site's plan: what the ground computations need and what seldom changes. */
export interface SitePlan {
  readonly site: SiteEntity
  readonly zones: readonly PlanZone[]
  readonly cells: readonly CellGeometry[]
  readonly lookup: CellLookup
  /** planned layers of a cell, lowest first; empty outside every zone */
  layersOf(cell: number): readonly Layer[]
  zoneOf(cell: number): PlanZone | undefined
  zone(id: string): PlanZone
  label(cell: number): string
}

interface CellsOfSite {
  readonly cells: readonly CellGeometry[]
  readonly lookup: CellLookup
  readonly layers: Map<number, readonly Layer[]>
}

/** Cells never change once a site is made, so that every node may keep them. */
const kept = new Map<string, CellsOfSite>()
const KEPT_SITES = 50

async function loadCells(manager: EntityManager, site: SiteEntity): Promise<CellsOfSite> {
  const known = kept.get(site.id)
  if (known) return known
  const rows = await manager.find(CellEntity, { where: { siteId: site.id }, order: { cell: 'ASC' } })
  const cells = rows.map(
    (row): CellGeometry => ({
      cell: row.cell,
      column: row.gridColumn,
      row: row.gridRow,
      zone: row.zoneIndex,
      areaMm2: row.areaMm2,
      centroid: { u: row.centroidU, v: row.centroidV },
      baseUm: row.baseUm,
      designUm: row.designUm,
    }),
  )
  const loaded = { cells, lookup: makeCellLookup(cells, site.grid.columns), layers: new Map<number, readonly Layer[]>() }
  if (cells.length > 0) {
    if (kept.size >= KEPT_SITES) kept.delete([...kept.keys()][0] ?? '')
    kept.set(site.id, loaded)
  }
  return loaded
}

/** Loads the plan with each zone's specification in force. */
export async function loadSitePlan(manager: EntityManager, siteId: string): Promise<SitePlan> {
  const site = await manager.findOneBy(SiteEntity, { id: siteId })
  if (!site) throw notFound()
  const zoneRows = await manager.find(ZoneEntity, { where: { siteId }, order: { position: 'ASC' } })
  const specifications = await manager.find(SpecificationEntity, { where: { siteId }, order: { version: 'ASC' } })
  const inForce = new Map(specifications.map((specification) => [specification.zoneId, specification]))
  const zones = zoneRows.flatMap((zone): PlanZone[] => {
    const specification = inForce.get(zone.id)
    return specification ? [{ ...zone, specification }] : []
  })
  const { cells, lookup, layers } = await loadCells(manager, site)
  const byId = new Map(zones.map((zone) => [zone.id, zone]))

  function layersOf(cell: number): readonly Layer[] {
    const before = layers.get(cell)
    if (before) return before
    const geometry = cells[cell]
    const zone = geometry && zones[geometry.zone]
    const made = geometry && zone ? cellLayers(zone.liftPlan, geometry.baseUm, geometry.designUm) : []
    layers.set(cell, made)
    return made
  }

  return {
    site,
    zones,
    cells,
    lookup,
    layersOf,
    zoneOf: (cell) => zones[cells[cell]?.zone ?? -1],
    zone(id) {
      const zone = byId.get(id)
      if (!zone) throw invalid('That zone is not part of this site. Choose one of its zones; what you entered was kept.')
      return zone
    },
    label(cell) {
      const geometry = cells[cell]
      return geometry ? cellLabel(geometry) : `#${cell}`
    },
  }
}

/** The planned layer of a lift in a cell, or undefined where no fill of that lift belongs there. */
export function layerOf(plan: SitePlan, cell: number, lift: number): Layer | undefined {
  return plan.layersOf(cell).find((layer) => layer.lift === lift)
}
