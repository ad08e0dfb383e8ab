import type { CellAddress } from './grid.ts'
import { cellRectangle, cellSideMm, siteToGrid } from './grid.ts'
import { clipBand, measureRing, ringHolds } from './plan-ring.ts'
import type { CellGeometry, GridDefinition, GridPoint, SiteRing } from './site-geometry.ts'

/** A cut cell smaller than this share of a whole one is left out: no test could be taken in it. */
export const SLIVER_SHARE = 0.01

export interface CellsInput<Zone extends { readonly ring: SiteRing }> {
  readonly grid: GridDefinition
  /** a valid ring (checkRing) in site coordinates */
  readonly boundary: SiteRing
  /** in the order the cells' zone index counts; where two overlap the first holds the cell */
  readonly zones: readonly Zone[]
  /** existing (or stripped) ground, µm, at a grid position */
  readonly baseAt: (point: GridPoint) => number
  /** design top of fill of a zone, µm, at a grid position; not asked where no zone holds the cell */
  readonly designAt: (zone: Zone, point: GridPoint) => number
}

/**
 * The cells of a site: the grid cut by the boundary, in plane grid axes, never spherical (domain section 4).
 * @param input grid, boundary, zones and the two surfaces
 * @returns cells numbered from 0 row by row; areas in whole mm², centroids in whole mm; slivers below 1 % of a
 *   cell left out; a cell outside every zone has zone -1 and a design equal to its base (no fill belongs there)
 */
export function buildCells<Zone extends { readonly ring: SiteRing }>(input: CellsInput<Zone>): CellGeometry[] {
  const { grid, zones } = input
  const boundary = input.boundary.map((point) => siteToGrid(grid, point))
  const zoneRings = zones.map((zone) => zone.ring.map((point) => siteToGrid(grid, point)))
  const smallest = SLIVER_SHARE * cellSideMm(grid) ** 2
  const cells: CellGeometry[] = []
  for (let row = 0; row < grid.rows; row++) {
    const { top, bottom } = cellRectangle(grid, { column: 0, row })
    const strip = clipBand(boundary, 'v', top, bottom)
    if (strip.length === 0) continue
    for (let column = 0; column < grid.columns; column++) {
      const { left, right } = cellRectangle(grid, { column, row })
      const figure = measureRing(clipBand(strip, 'u', left, right))
      if (figure === undefined || figure.areaMm2 < smallest) continue
      const centroid = { u: Math.round(figure.centroid.u), v: Math.round(figure.centroid.v) }
      const zoneIndex = zoneRings.findIndex((ring) => ringHolds(ring, centroid))
      const zone = zones[zoneIndex]
      const baseUm = Math.round(input.baseAt(centroid))
      const designUm = zone === undefined ? baseUm : Math.round(input.designAt(zone, centroid))
      const areaMm2 = Math.round(figure.areaMm2)
      cells.push({ cell: cells.length, column, row, zone: zoneIndex, areaMm2, centroid, baseUm, designUm })
    }
  }
  return cells
}

/** From places in the grid to cells and back. */
export interface CellLookup {
  /** cell index at a column and row, or undefined where no cell of the site is */
  readonly at: (column: number, row: number) => number | undefined
  /** column and row of a cell, or undefined for an index that is none */
  readonly addressOf: (cell: number) => CellAddress | undefined
}

/**
 * Lookup between (column, row) and the dense cell index, in constant time.
 * @param cells the site's cells
 * @param columns number of columns of the grid, whole, 1 or more
 */
export function makeCellLookup(cells: readonly CellGeometry[], columns: number): CellLookup {
  const byPlace = new Map(cells.map((cell) => [cell.row * columns + cell.column, cell.cell]))
  const byCell = new Map(cells.map((cell) => [cell.cell, { column: cell.column, row: cell.row }]))
  return {
    at: (column, row) => (column < 0 || column >= columns ? undefined : byPlace.get(row * columns + column)),
    addressOf: (cell) => byCell.get(cell),
  }
}

const SIDES = [
  [0, -1],
  [-1, 0],
  [1, 0],
  [0, 1],
] as const
const SIDES_AND_CORNERS = [...SIDES, [-1, -1], [1, -1], [-1, 1], [1, 1]] as const

function neighbours(lookup: CellLookup, cell: number, steps: readonly (readonly [number, number])[]): number[] {
  const place = lookup.addressOf(cell)
  if (place === undefined) return []
  return steps
    .map(([right, down]) => lookup.at(place.column + right, place.row + down))
    .filter((neighbour) => neighbour !== undefined)
    .sort((a, b) => a - b)
}

/** The cells that share a side with a cell, lowest index first. */
export function neighbours4(lookup: CellLookup, cell: number): number[] {
  return neighbours(lookup, cell, SIDES)
}

/** The cells that share a side or a corner with a cell, lowest index first. */
export function neighbours8(lookup: CellLookup, cell: number): number[] {
  return neighbours(lookup, cell, SIDES_AND_CORNERS)
}
