import { convertLength, toMicrometres } from '#shared/units/length.ts'
import type { GridDefinition, GridPoint, SitePoint, SiteRing } from './site-geometry.ts'

/** A place in the grid: column and row, both counted from 0 (A1 is 0, 0). */
export interface CellAddress {
  readonly column: number
  readonly row: number
}

/** The rectangle of a cell in grid axes, mm, not rounded; the low edges belong to the cell, the high ones do not. */
export interface CellRectangle {
  readonly left: number
  readonly top: number
  readonly right: number
  readonly bottom: number
}

/** Unit vectors of the columns (+u) and the rows (+v, 90° clockwise from +u) in site axes. */
function gridAxes(rotationDeg: number): { cos: number; sin: number } {
  const turn = (rotationDeg * Math.PI) / 180
  return { cos: Math.cos(turn), sin: Math.sin(turn) }
}

/**
 * Site coordinates in grid axes.
 * @param grid the sheet's grid
 * @param point easting and northing in the site's unit, finite
 * @returns integer mm; the rounding moves a point by less than 1 mm (practice.md item 13 allows 0.01 ft)
 */
export function siteToGrid(grid: GridDefinition, point: SitePoint): GridPoint {
  const { cos, sin } = gridAxes(grid.rotationDeg)
  const east = point.easting - grid.origin.easting
  const north = point.northing - grid.origin.northing
  const u = Math.round(convertLength(east * cos + north * sin, grid.unit, 'mm'))
  const v = Math.round(convertLength(east * sin - north * cos, grid.unit, 'mm'))
  // adding 0 turns the -0 of a rounded small negative into 0, so that equal points compare equal
  return { u: u + 0, v: v + 0 }
}

/**
 * Grid axes in site coordinates, the reverse of siteToGrid.
 * @param grid the sheet's grid
 * @param point grid position in mm, whole or not
 * @returns easting and northing in the site's unit, not rounded
 */
export function gridToSite(grid: GridDefinition, point: GridPoint): SitePoint {
  const { cos, sin } = gridAxes(grid.rotationDeg)
  const along = convertLength(point.u, 'mm', grid.unit)
  const down = convertLength(point.v, 'mm', grid.unit)
  return {
    easting: grid.origin.easting + along * cos + down * sin,
    northing: grid.origin.northing + along * sin - down * cos,
  }
}

/** Side of a cell in mm, to the nearest µm and not to the mm, so that whole cells are all of one size. */
export function cellSideMm(grid: GridDefinition): number {
  return toMicrometres(grid.cellSize, grid.unit) / 1000
}

/**
 * Rectangle of a cell in grid axes.
 * @param grid the sheet's grid
 * @param address column and row from 0; may lie outside the sheet
 * @returns edges in mm, whole µm
 */
export function cellRectangle(grid: GridDefinition, { column, row }: CellAddress): CellRectangle {
  const side = cellSideMm(grid)
  return { left: column * side, top: row * side, right: (column + 1) * side, bottom: (row + 1) * side }
}

/** Index k of the half-open step [k·side, (k+1)·side) that holds the value, exact at the edges. */
function stepOf(value: number, side: number): number {
  const guess = Math.floor(value / side) + 0
  // the quotient can round across an edge that the products k·side put on the other side
  if (value < guess * side) return guess - 1
  if (value >= (guess + 1) * side) return guess + 1
  return guess
}

/**
 * The cell that holds a grid position, in constant time.
 * @param grid the sheet's grid
 * @param point grid position in mm
 * @returns column and row, or undefined outside the sheet; a point on an edge belongs to the higher column or row
 */
export function locateGridPoint(grid: GridDefinition, point: GridPoint): CellAddress | undefined {
  const side = cellSideMm(grid)
  const column = stepOf(point.u, side)
  const row = stepOf(point.v, side)
  const inside = column >= 0 && row >= 0 && column < grid.columns && row < grid.rows
  return inside ? { column, row } : undefined
}

/**
 * The cell that holds a site position, in constant time (domain section 4).
 * @param grid the sheet's grid
 * @param point easting and northing in the site's unit; taken to the nearest mm first
 * @returns column and row, or undefined outside the sheet
 */
export function locate(grid: GridDefinition, point: SitePoint): CellAddress | undefined {
  return locateGridPoint(grid, siteToGrid(grid, point))
}

/**
 * A corner where grid lines meet, for drawing.
 * @param grid the sheet's grid
 * @param column 0 (left edge) to grid.columns (right edge)
 * @param row 0 (top edge) to grid.rows (bottom edge)
 * @returns site position, not rounded
 */
export function cornerPoint(grid: GridDefinition, column: number, row: number): SitePoint {
  const side = cellSideMm(grid)
  return gridToSite(grid, { u: column * side, v: row * side })
}

/**
 * The smallest grid of a given cell size and rotation that covers a ring.
 * @param ring site coordinates, three or more finite points
 * @param options cell size in the site's unit (above 0), rotation in degrees counter-clockwise from east, unit
 * @returns a grid whose A1 corner and lowest edges touch the ring's extent in grid axes, at least 1 by 1
 */
export function fitGrid(
  ring: SiteRing,
  options: Pick<GridDefinition, 'cellSize' | 'rotationDeg' | 'unit'>,
): GridDefinition {
  const first = ring[0] ?? { easting: 0, northing: 0 }
  const trial: GridDefinition = { ...options, origin: first, columns: 1, rows: 1 }
  const points = ring.map((point) => siteToGrid(trial, point))
  const left = Math.min(...points.map((p) => p.u))
  const top = Math.min(...points.map((p) => p.v))
  const side = cellSideMm(trial)
  const count = (span: number) => Math.max(1, Math.ceil((span - 1) / side))
  return {
    ...trial,
    origin: gridToSite(trial, { u: left, v: top }),
    columns: count(Math.max(...points.map((p) => p.u)) - left),
    rows: count(Math.max(...points.map((p) => p.v)) - top),
  }
}
