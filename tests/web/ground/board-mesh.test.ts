import { describe, expect, test } from 'vitest'
import type { GridDefinition } from '#shared/domain/site-geometry.ts'
import { shiftMatrix } from '#web/features/ground/board/board-gpu.ts'
import { createBoardMesh, type BoardMesh } from '#web/features/ground/board/board-mesh.ts'
import { createBoardProjection, lonLatOf, mercatorOf, type BoardProjection } from '#web/features/ground/board/board-projection.ts'
import { BOARD_GRID, BOARD_SITE } from '#tests/fixtures/board-site.ts'

/** Web Mercator pixels across the world at zoom 20, tiles of 512. */
const WORLD_Z20 = 512 * 2 ** 20

/** Where the mesh draws a place of the sheet: affine within the triangle that holds it. */
function meshPlace({ vertices, indices, centre }: BoardMesh, column: number, row: number): { x: number; y: number } | undefined {
  for (let at = 0; at < indices.length; at += 3) {
    const [a, b, c] = [0, 1, 2].map((corner) => vertices.subarray(indices[at + corner]! * 4, indices[at + corner]! * 4 + 4)) as [
      Float32Array,
      Float32Array,
      Float32Array,
    ]
    const area = (b[2]! - a[2]!) * (c[3]! - a[3]!) - (c[2]! - a[2]!) * (b[3]! - a[3]!)
    const s = ((column - a[2]!) * (c[3]! - a[3]!) - (c[2]! - a[2]!) * (row - a[3]!)) / area
    const t = ((b[2]! - a[2]!) * (row - a[3]!) - (column - a[2]!) * (b[3]! - a[3]!)) / area
    if (s < -1e-6 || t < -1e-6 || s + t > 1 + 1e-6) continue
    const mix = (index: number): number => a[index]! + s * (b[index]! - a[index]!) + t * (c[index]! - a[index]!)
    return { x: centre.x + mix(0), y: centre.y + mix(1) }
  }
  return undefined
}

/** Farthest the mesh is from the exact projection over a lattice that avoids the mesh's own corners, pixels at zoom 20. */
function worstMiss(projection: BoardProjection, mesh: BoardMesh, samples: number): number {
  const { columns, rows } = projection.grid
  let worst = 0
  for (let i = 0; i < samples; i++) {
    for (let j = 0; j < samples; j++) {
      const column = ((i + 0.37) / samples) * columns
      const row = ((j + 0.61) / samples) * rows
      const drawn = meshPlace(mesh, column, row)!
      const exact = projection.sheetToMercator(column, row)
      worst = Math.max(worst, Math.hypot(drawn.x - exact.x, drawn.y - exact.y) * WORLD_Z20)
    }
  }
  return worst
}

const LARGE: GridDefinition = { origin: { easting: 560_000, northing: 5_930_000 }, cellSize: 20, columns: 500, rows: 500, rotationDeg: -31, unit: 'm' }

describe('the mesh of the sheet', () => {
  test('bends less than a tenth of a pixel at zoom 20 on an ordinary site, with a few dozen quads at most', () => {
    const projection = createBoardProjection(BOARD_GRID, BOARD_SITE.system)
    const mesh = createBoardMesh(projection.sheetToMercator, BOARD_GRID)
    expect(mesh.quads[0] * mesh.quads[1]).toBeLessThanOrEqual(36)
    expect(worstMiss(projection, mesh, 40)).toBeLessThan(0.1)
  })

  test('bends less than a tenth of a pixel at zoom 20 on a site of 10 by 10 km far from the middle of its zone', () => {
    const projection = createBoardProjection(LARGE, 'EPSG:32632')
    const mesh = createBoardMesh(projection.sheetToMercator, LARGE)
    expect(worstMiss(projection, mesh, 60)).toBeLessThan(0.1)
  })

  test('would bend by more than a pixel there as a single quad, so that the splitting is what keeps it straight', () => {
    const projection = createBoardProjection(LARGE, 'EPSG:32632')
    const single = createBoardMesh(projection.sheetToMercator, LARGE, { tolerance: 1 })
    expect(single.quads).toEqual([1, 1])
    expect(worstMiss(projection, single, 20)).toBeGreaterThan(1)
  })

  test('covers the whole sheet without overlap', () => {
    const projection = createBoardProjection(LARGE, 'EPSG:32632')
    const { vertices, indices } = createBoardMesh(projection.sheetToMercator, LARGE)
    let area = 0
    for (let at = 0; at < indices.length; at += 3) {
      const [a, b, c] = [0, 1, 2].map((corner) => indices[at + corner]! * 4) as [number, number, number]
      area += Math.abs((vertices[b + 2]! - vertices[a + 2]!) * (vertices[c + 3]! - vertices[a + 3]!) - (vertices[c + 2]! - vertices[a + 2]!) * (vertices[b + 3]! - vertices[a + 3]!)) / 2
    }
    expect(area).toBeCloseTo(500 * 500, 1)
  })
})

describe('the projection of the board', () => {
  const projection = createBoardProjection(BOARD_GRID, BOARD_SITE.system)

  test('goes to longitude and latitude and back to within a hundredth of a cell', () => {
    const { column, row } = projection.lonLatToSheet(projection.sheetToLonLat(11.5, 7.25))
    expect(column).toBeCloseTo(11.5, 3)
    expect(row).toBeCloseTo(7.25, 3)
  })

  test('goes to Mercator and back', () => {
    const [longitude, latitude] = lonLatOf(mercatorOf([-122.3, 47.6]))
    expect(longitude).toBeCloseTo(-122.3, 10)
    expect(latitude).toBeCloseTo(47.6, 10)
  })

  test('places the Mercator square as its definition does: the equator in the middle, 85.0511287798° at the top', () => {
    // EPSG Guidance Note 7-2, method 1024 (Popular Visualisation Pseudo Mercator): atan(sinh π) = 85.0511287798°
    expect(mercatorOf([0, 0])).toEqual({ x: 0.5, y: expect.closeTo(0.5, 12) })
    expect(mercatorOf([-180, 85.0511287798])).toEqual({ x: 0, y: expect.closeTo(0, 9) })
  })

  test('turns the plan so that the columns run level from left to right', () => {
    const turn = (projection.bearing * Math.PI) / 180
    const left = projection.sheetToMercator(0, 9.5)
    const right = projection.sheetToMercator(24, 9.5)
    const across = (right.x - left.x) * Math.cos(turn) + (right.y - left.y) * Math.sin(turn)
    const down = -(right.x - left.x) * Math.sin(turn) + (right.y - left.y) * Math.cos(turn)
    expect(Math.abs(down / across)).toBeLessThan(1e-9)
    expect(across).toBeGreaterThan(0)
  })
})

test('the matrix takes the centre in before it is rounded, so that no place jitters at street zoom', () => {
  const scale = 2 ** 23
  const centre = { x: 0.163_412_345_678_9, y: 0.352_198_765_432_1 }
  const matrix = [scale, 0, 0, 0, 0, -scale, 0, 0, 0, 0, 1, 0, -scale * centre.x, scale * centre.y, 0, 1]
  const shifted = shiftMatrix(matrix, centre.x, centre.y)
  expect(Math.abs(shifted[12]!)).toBeLessThan(1e-6)
  expect(Math.abs(shifted[13]!)).toBeLessThan(1e-6)
  expect([...shifted.subarray(0, 12)]).toEqual(matrix.slice(0, 12))
})
