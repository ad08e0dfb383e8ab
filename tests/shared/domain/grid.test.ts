import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cellRectangle, cellSideMm, cornerPoint, fitGrid, gridToSite, locate, locateGridPoint, siteToGrid } from '#shared/domain/grid.ts'
import type { GridDefinition } from '#shared/domain/site-geometry.ts'
import { anyGrid, anyPolygon, SEEDED } from './plan-arbitraries.ts'

const plain: GridDefinition = {
  origin: { easting: 1000, northing: 5000 },
  cellSize: 25,
  columns: 40,
  rows: 30,
  rotationDeg: 0,
  unit: 'ft',
}

describe('the grid', () => {
  it('runs columns to the east and rows to the south when it is not turned', () => {
    expect(siteToGrid(plain, { easting: 1010, northing: 4980 })).toEqual({ u: 3048, v: 6096 })
    expect(cornerPoint(plain, 1, 2)).toEqual({ easting: 1025, northing: 4950 })
  })

  it('runs columns to the north and rows to the east when turned 90° counter-clockwise', () => {
    const turned = { ...plain, rotationDeg: 90 }
    expect(siteToGrid(turned, { easting: 1010, northing: 5020 })).toEqual({ u: 6096, v: 3048 })
  })

  // C-3 of the check values: 1 US survey foot = 1200/3937 m, 1 international foot = 0.3048 m
  it('keeps the two feet apart', () => {
    expect(cellSideMm({ ...plain, cellSize: 3937, unit: 'us-ft' })).toBe(1_200_000)
    expect(cellSideMm({ ...plain, cellSize: 25 })).toBe(7620)
    expect(cellSideMm({ ...plain, cellSize: 10, unit: 'm' })).toBe(10_000)
    const far = { easting: 1000 + 5280 * 100, northing: 5000 }
    const apart = siteToGrid({ ...plain, unit: 'us-ft' }, far).u - siteToGrid(plain, far).u
    // 2 parts per million of 100 miles: 528,000 × 0.6096 µm
    expect(apart).toBe(322)
  })

  // practice.md item 13: round trip below 0.01 ft on a rotated grid
  it('brings any point back within 1 mm on any rotated grid', () => {
    fc.assert(
      fc.property(anyGrid, fc.double({ min: -2000, max: 2000, noNaN: true }), fc.double({ min: -2000, max: 2000, noNaN: true }), (grid, de, dn) => {
        const point = { easting: grid.origin.easting + de, northing: grid.origin.northing + dn }
        const back = gridToSite(grid, siteToGrid(grid, point))
        const perUnit = grid.unit === 'm' ? 1000 : 304.8
        expect(Math.hypot(back.easting - point.easting, back.northing - point.northing) * perUnit).toBeLessThan(1)
      }),
      { ...SEEDED, numRuns: 500 },
    )
  })

  it('brings whole millimetres back unchanged', () => {
    fc.assert(
      fc.property(anyGrid, fc.integer({ min: -9e5, max: 9e5 }), fc.integer({ min: -9e5, max: 9e5 }), (grid, u, v) => {
        expect(siteToGrid(grid, gridToSite(grid, { u, v }))).toEqual({ u: u + 0, v: v + 0 })
      }),
      { ...SEEDED, numRuns: 500 },
    )
  })

  it('locates a point in exactly the cell whose rectangle holds it', () => {
    const share = fc.double({ min: -0.2, max: 1.2, noNaN: true })
    fc.assert(
      fc.property(anyGrid, share, share, (grid, across, down) => {
        const side = cellSideMm(grid)
        const point = { u: Math.round(across * grid.columns * side), v: Math.round(down * grid.rows * side) }
        const found = locateGridPoint(grid, point)
        const holds = (column: number, row: number) => {
          const { left, right, top, bottom } = cellRectangle(grid, { column, row })
          return left <= point.u && point.u < right && top <= point.v && point.v < bottom
        }
        const holding = []
        for (let column = 0; column < grid.columns; column++) {
          for (let row = 0; row < grid.rows; row++) if (holds(column, row)) holding.push({ column, row })
        }
        expect(holding).toEqual(found === undefined ? [] : [found])
      }),
      { ...SEEDED, numRuns: 200 },
    )
  })

  it('gives a point on a grid line to the higher column and row, and none beyond the last', () => {
    expect(locate(plain, { easting: 1025, northing: 4975 })).toEqual({ column: 1, row: 1 })
    expect(locate(plain, { easting: 1000, northing: 5000 })).toEqual({ column: 0, row: 0 })
    expect(locate(plain, { easting: 2000, northing: 4990 })).toBeUndefined()
    expect(locate(plain, { easting: 999.9, northing: 4990 })).toBeUndefined()
  })

  it('covers a ring with the smallest grid of a given cell and rotation', () => {
    const ring = [
      { easting: 0, northing: 0 },
      { easting: 100, northing: 0 },
      { easting: 100, northing: 60 },
      { easting: 0, northing: 60 },
    ]
    const grid = fitGrid(ring, { cellSize: 25, rotationDeg: 0, unit: 'ft' })
    expect(grid).toMatchObject({ origin: { easting: 0, northing: 60 }, columns: 4, rows: 3 })
    fc.assert(
      fc.property(anyPolygon, fc.double({ min: -90, max: 90, noNaN: true }), (polygon, rotationDeg) => {
        const fitted = fitGrid(polygon, { cellSize: 20, rotationDeg, unit: 'us-ft' })
        for (const point of polygon) {
          const { u, v } = siteToGrid(fitted, point)
          expect(Math.min(u, v)).toBeGreaterThanOrEqual(-1)
          expect(u).toBeLessThanOrEqual(fitted.columns * cellSideMm(fitted) + 1)
          expect(v).toBeLessThanOrEqual(fitted.rows * cellSideMm(fitted) + 1)
        }
      }),
      { ...SEEDED, numRuns: 100 },
    )
  })
})
