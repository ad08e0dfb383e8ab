import { cellLabel } from '#shared/domain/cell-label.ts'
import { formatCellRange } from '#shared/domain/cell-range.ts'
import { makeCellLookup, type CellLookup } from '#shared/domain/cells.ts'
import { cellLayers } from '#shared/domain/lift-schedule.ts'
import type { CellGeometry, Layer } from '#shared/domain/site-geometry.ts'
import type { Site, Zone } from '#shared/schemas/site.ts'

/** The site's plan as the Ground's parts ask it: cells, zones, planned layers. */
export interface GroundPlan {
  readonly site: Site
  readonly cells: readonly CellGeometry[]
  readonly lookup: CellLookup
  readonly label: (cell: number) => string
  /** "G11:I13, K12" */
  readonly range: (cells: readonly number[]) => string
  readonly zoneOf: (cell: number) => Zone | undefined
  readonly zone: (id: string) => Zone | undefined
  /** planned layers of a cell, lowest first; empty outside every zone */
  readonly layersOf: (cell: number) => readonly Layer[]
  readonly layerOf: (cell: number, lift: number) => Layer | undefined
}

export function buildGroundPlan(site: Site, cells: readonly CellGeometry[]): GroundPlan {
  const kept = new Map<number, readonly Layer[]>()
  const byId = new Map(site.zones.map((zone) => [zone.id, zone]))
  const zoneOf = (cell: number): Zone | undefined => site.zones[cells[cell]?.zone ?? -1]

  function layersOf(cell: number): readonly Layer[] {
    const before = kept.get(cell)
    if (before !== undefined) return before
    const geometry = cells[cell]
    const zone = zoneOf(cell)
    const made = geometry === undefined || zone === undefined ? [] : cellLayers(zone.liftPlan, geometry.baseUm, geometry.designUm)
    kept.set(cell, made)
    return made
  }

  return {
    site,
    cells,
    lookup: makeCellLookup(cells, site.grid.columns),
    label: (cell) => {
      const geometry = cells[cell]
      return geometry === undefined ? `#${cell}` : cellLabel(geometry)
    },
    range: (chosen) => formatCellRange(chosen.flatMap((cell) => cells[cell] ?? [])),
    zoneOf,
    zone: (id) => byId.get(id),
    layersOf,
    layerOf: (cell, lift) => layersOf(cell).find((layer) => layer.lift === lift),
  }
}
