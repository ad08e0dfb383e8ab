import { area, featureCollection, intersect, polygon } from '@turf/turf'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { buildCells, makeCellLookup, neighbours4, neighbours8, SLIVER_SHARE } from '#shared/domain/cells.ts'
import { cellRectangle, cellSideMm, fitGrid, siteToGrid } from '#shared/domain/grid.ts'
import { clipToRectangle, measureRing } from '#shared/domain/plan-ring.ts'
import type { GridDefinition, GridPoint, SitePoint } from '#shared/domain/site-geometry.ts'
import { anyPolygon, SEEDED } from './plan-arbitraries.ts'

const grid: GridDefinition = { origin: { easting: 0, northing: 100 }, cellSize: 20, columns: 5, rows: 5, rotationDeg: 0, unit: 'm' }
const box = (west: number, south: number, east: number, north: number): SitePoint[] => [
  { easting: west, northing: south },
  { easting: east, northing: south },
  { easting: east, northing: north },
  { easting: west, northing: north },
]
const flat = { baseAt: () => 1_000_000, designAt: () => 4_000_000 }

/** Shoelace sum in plain form, as an outside check of measureRing. */
function shoelace(ring: readonly GridPoint[]): number {
  let twice = 0
  for (let i = 0; i < ring.length; i++) {
    const [a, b] = [ring[i], ring[(i + 1) % ring.length]]
    if (a && b) twice += a.u * b.v - b.u * a.v
  }
  return Math.abs(twice) / 2
}

describe('the cells of a site', () => {
  it('are the whole grid when the boundary is, numbered row by row', () => {
    const cells = buildCells({ grid, boundary: box(0, 0, 100, 100), zones: [], ...flat })
    expect(cells).toHaveLength(25)
    expect(cells[7]).toEqual({
      cell: 7,
      column: 2,
      row: 1,
      zone: -1,
      areaMm2: 400_000_000,
      centroid: { u: 50_000, v: 30_000 },
      baseUm: 1_000_000,
      designUm: 1_000_000,
    })
  })

  it('are cut by the boundary, and slivers are left out', () => {
    // 40.1 m wide: the third column would be 0.1 m of 20 m, half a percent
    const cells = buildCells({ grid, boundary: box(0, 0, 40.1, 50), zones: [], ...flat })
    expect(cells.map((cell) => [cell.column, cell.row, cell.areaMm2])).toEqual([
      [0, 2, 200_000_000],
      [1, 2, 200_000_000],
      [0, 3, 400_000_000],
      [1, 3, 400_000_000],
      [0, 4, 400_000_000],
      [1, 4, 400_000_000],
    ])
    expect(cells[0]?.centroid).toEqual({ u: 10_000, v: 55_000 })
  })

  it('belong to the zone that holds their centroid, to exactly one of two that share an edge', () => {
    const zones = [{ ring: box(0, 0, 50, 100), top: 3 }, { ring: box(50, 0, 80, 100), top: 5 }]
    const cells = buildCells({
      grid,
      boundary: box(0, 0, 100, 100),
      zones,
      baseAt: ({ u }) => u,
      designAt: (zone, { v }) => zone.top * 1_000_000 + v,
    })
    expect(cells.slice(0, 5).map((cell) => cell.zone)).toEqual([0, 0, 1, 1, -1])
    expect(cells[1]).toMatchObject({ baseUm: 30_000, designUm: 3_010_000 })
    expect(cells[3]).toMatchObject({ baseUm: 70_000, designUm: 5_010_000 })
  })

  it('have areas that sum to the boundary, for any outline and rotation', () => {
    fc.assert(
      fc.property(anyPolygon, fc.double({ min: -90, max: 90, noNaN: true }), (boundary, rotationDeg) => {
        const turned = fitGrid(boundary, { cellSize: 25, rotationDeg, unit: 'us-ft' })
        const ring = boundary.map((point) => siteToGrid(turned, point))
        const whole = shoelace(ring)
        let sum = 0
        let slivers = 0
        // one ring of cells more on every side, for corners that rounding to the mm put over the grid's edge
        for (let row = -1; row <= turned.rows; row++) {
          for (let column = -1; column <= turned.columns; column++) {
            const share = measureRing(clipToRectangle(ring, cellRectangle(turned, { column, row })))?.areaMm2 ?? 0
            sum += share
            if (share > 0 && share < SLIVER_SHARE * cellSideMm(turned) ** 2) slivers += share
          }
        }
        expect(Math.abs(sum - whole)).toBeLessThan(1)
        const cells = buildCells({ grid: turned, boundary, zones: [], ...flat })
        const kept = cells.reduce((total, cell) => total + cell.areaMm2, 0)
        // each cell rounds by half a mm²; a corner rounded to the mm may stand 1 mm over the grid's edge
        const overEdge = 2 * (turned.columns + turned.rows) * cellSideMm(turned)
        expect(Math.abs(kept + slivers - whole)).toBeLessThan(cells.length + overEdge)
      }),
      { ...SEEDED, numRuns: 60 },
    )
  })

  it('have the areas an independent clipper finds', () => {
    fc.assert(
      fc.property(anyPolygon, fc.double({ min: -90, max: 90, noNaN: true }), (boundary, rotationDeg) => {
        const turned = fitGrid(boundary, { cellSize: 60, rotationDeg, unit: 'm' })
        const ring = boundary.map((point) => siteToGrid(turned, point))
        const closed = (points: readonly GridPoint[]) => [...points, points[0]].map((p) => [p?.u ?? 0, p?.v ?? 0])
        for (const cell of buildCells({ grid: turned, boundary, zones: [], ...flat }).slice(0, 12)) {
          const { left, right, top, bottom } = cellRectangle(turned, cell)
          const square = [{ u: left, v: top }, { u: right, v: top }, { u: right, v: bottom }, { u: left, v: bottom }]
          const common = intersect(featureCollection([polygon([closed(ring)]), polygon([closed(square)])]))
          const pieces = common?.geometry.type === 'Polygon' ? [common.geometry.coordinates] : (common?.geometry.coordinates ?? [])
          const outside = pieces.reduce((sum, [outer]) => sum + shoelace((outer as number[][]).map(([u, v]) => ({ u: u ?? 0, v: v ?? 0 }))), 0)
          expect(Math.abs(cell.areaMm2 - outside)).toBeLessThan(Math.max(2, 1e-6 * outside))
        }
      }),
      { ...SEEDED, numRuns: 40 },
    )
  })

  it('have plane areas, not those of the globe', () => {
    const [cell] = buildCells({ grid, boundary: box(0, 80, 20, 100), zones: [], ...flat })
    expect(cell?.areaMm2).toBe(400_000_000)
    expect(area(polygon([[[0, 0], [20, 0], [20, 20], [0, 20], [0, 0]]]))).not.toBeCloseTo(400, 0)
  })
})

describe('the look-up of cells', () => {
  const cells = buildCells({ grid, boundary: box(0, 0, 60, 40), zones: [], ...flat })
  const lookup = makeCellLookup(cells, grid.columns)

  it('finds a cell by its place and the place by its cell', () => {
    for (const cell of cells) {
      expect(lookup.at(cell.column, cell.row)).toBe(cell.cell)
      expect(lookup.addressOf(cell.cell)).toEqual({ column: cell.column, row: cell.row })
    }
    expect(lookup.at(3, 3)).toBeUndefined()
    expect(lookup.at(-1, 4)).toBeUndefined()
    expect(lookup.addressOf(99)).toBeUndefined()
  })

  it('finds neighbours by sides and by corners, never round the end of a row', () => {
    expect(cells.map((cell) => cell.cell)).toEqual([0, 1, 2, 3, 4, 5])
    expect(neighbours4(lookup, 0)).toEqual([1, 3])
    expect(neighbours8(lookup, 0)).toEqual([1, 3, 4])
    expect(neighbours4(lookup, 4)).toEqual([1, 3, 5])
    expect(neighbours8(lookup, 1)).toEqual([0, 2, 3, 4, 5])
    expect(neighbours8(lookup, 99)).toEqual([])
  })
})
