import { findCoordinateSystem, toLonLat, toSite, type LonLat } from '#shared/domain/coordinate-systems.ts'
import { cellSideMm, cornerPoint, siteToGrid } from '#shared/domain/grid.ts'
import type { GridDefinition, SitePoint } from '#shared/domain/site-geometry.ts'

/** Web Mercator, 0 to 1 across the world, y down. */
export interface MercatorPoint {
  readonly x: number
  readonly y: number
}

/** A place counted in columns and rows from the sheet's corner; fractions are places within a cell. */
export interface SheetPlace {
  readonly column: number
  readonly row: number
}

export interface BoardProjection {
  readonly grid: GridDefinition
  readonly siteToLonLat: (point: SitePoint) => LonLat
  readonly lonLatToSite: (lonLat: LonLat) => SitePoint
  readonly sheetToLonLat: (column: number, row: number) => LonLat
  readonly lonLatToSheet: (lonLat: LonLat) => SheetPlace
  readonly siteToSheet: (point: SitePoint) => SheetPlace
  readonly sheetToMercator: (column: number, row: number) => MercatorPoint
  /** compass bearing of the top of the screen that lays the columns level, A at the left */
  readonly bearing: number
}

export function mercatorOf([longitude, latitude]: LonLat): MercatorPoint {
  const radians = (latitude * Math.PI) / 180
  return { x: (longitude + 180) / 360, y: 0.5 - Math.log(Math.tan(Math.PI / 4 + radians / 2)) / (2 * Math.PI) }
}

export function lonLatOf({ x, y }: MercatorPoint): LonLat {
  return [x * 360 - 180, (Math.atan(Math.sinh((0.5 - y) * 2 * Math.PI)) * 180) / Math.PI]
}

/**
 * Ways between the sheet, the site's coordinates and the map.
 * @throws Error when the code is none of ours: the server has checked it before it gets here
 */
export function createBoardProjection(grid: GridDefinition, code: string): BoardProjection {
  const system = findCoordinateSystem(code)
  if (system === undefined) throw new Error(`No coordinate system has the code ${code}`)
  const siteToLonLat = (point: SitePoint): LonLat => toLonLat(system, point)
  const sheetToLonLat = (column: number, row: number): LonLat => siteToLonLat(cornerPoint(grid, column, row))
  const sheetToMercator = (column: number, row: number): MercatorPoint => mercatorOf(sheetToLonLat(column, row))
  const side = cellSideMm(grid)
  const siteToSheet = (point: SitePoint): SheetPlace => {
    const { u, v } = siteToGrid(grid, point)
    return { column: u / side, row: v / side }
  }
  const left = sheetToMercator(0, grid.rows / 2)
  const right = sheetToMercator(grid.columns, grid.rows / 2)
  const levelBearing = (Math.atan2(right.x - left.x, left.y - right.y) * 180) / Math.PI
  return {
    grid,
    siteToLonLat,
    lonLatToSite: (lonLat) => toSite(system, lonLat),
    sheetToLonLat,
    lonLatToSheet: (lonLat) => siteToSheet(toSite(system, lonLat)),
    siteToSheet,
    sheetToMercator,
    bearing: levelBearing - 90,
  }
}
