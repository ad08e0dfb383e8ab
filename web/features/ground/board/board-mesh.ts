import type { MercatorPoint } from './board-projection.ts'

/** Mesh of the sheet: x, y from the centre in Mercator and column, row, interleaved; triangles by index. */
export interface BoardMesh {
  readonly centre: MercatorPoint
  /** from one column, and from one row, to the next, at the centre */
  readonly columnStep: MercatorPoint
  readonly rowStep: MercatorPoint
  readonly vertices: Float32Array
  readonly indices: Uint16Array
  /** quads along the columns and along the rows */
  readonly quads: readonly [columns: number, rows: number]
}

export interface MeshOptions {
  /** largest distance, in Mercator, between a triangle and the true place of a point in it */
  readonly tolerance: number
}

type ToMercator = (column: number, row: number) => MercatorPoint

/** 0.1 px at zoom 20 of 512 px tiles: under a centimetre on the ground. */
export const MESH_TOLERANCE = 0.1 / (512 * 2 ** 20)
const MOST_QUADS = 96

/** Farthest that straight quads of this size leave the true positions, looked for at their edges and middles. */
function bendOf(toMercator: ToMercator, size: readonly [number, number], quads: readonly [number, number]): number {
  const stepU = size[0] / quads[0]
  const stepV = size[1] / quads[1]
  const miss = (u: number, v: number, du: number, dv: number): number => {
    const a = toMercator(u - du, v - dv)
    const b = toMercator(u + du, v + dv)
    const true_ = toMercator(u, v)
    return Math.hypot((a.x + b.x) / 2 - true_.x, (a.y + b.y) / 2 - true_.y)
  }
  let worst = 0
  for (const i of [0, Math.floor(quads[0] / 2), quads[0] - 1]) {
    for (const j of [0, Math.floor(quads[1] / 2), quads[1] - 1]) {
      const u = (i + 0.5) * stepU
      const v = (j + 0.5) * stepV
      worst = Math.max(
        worst,
        miss(u, j * stepV, stepU / 2, 0),
        miss(i * stepU, v, 0, stepV / 2),
        miss(u, v, stepU / 2, -stepV / 2),
        miss(u, v, stepU / 2, stepV / 2),
      )
    }
  }
  return worst
}

function chooseQuads(toMercator: ToMercator, size: readonly [number, number], tolerance: number): [number, number] {
  const quads: [number, number] = [1, 1]
  while (bendOf(toMercator, size, quads) > tolerance && Math.max(...quads) < MOST_QUADS) {
    // split the longer side, so that quads stay near square, where the bend is least for their number
    const along = size[0] / quads[0] >= size[1] / quads[1] ? 0 : 1
    quads[along] += 1
  }
  return quads
}

/**
 * The few quads that carry the whole sheet: corners are projected exactly, so between them only the bend from
 * grid to Mercator is lost, and that stays below the tolerance.
 */
export function createBoardMesh(
  toMercator: ToMercator,
  size: { readonly columns: number; readonly rows: number },
  { tolerance }: MeshOptions = { tolerance: MESH_TOLERANCE },
): BoardMesh {
  const quads = chooseQuads(toMercator, [size.columns, size.rows], tolerance)
  const [across, down] = quads
  const centre = toMercator(size.columns / 2, size.rows / 2)
  const vertices = new Float32Array((across + 1) * (down + 1) * 4)
  let at = 0
  for (let j = 0; j <= down; j++) {
    for (let i = 0; i <= across; i++) {
      const column = (i / across) * size.columns
      const row = (j / down) * size.rows
      const point = toMercator(column, row)
      vertices.set([point.x - centre.x, point.y - centre.y, column, row], at)
      at += 4
    }
  }
  const indices = new Uint16Array(across * down * 6)
  at = 0
  for (let j = 0; j < down; j++) {
    for (let i = 0; i < across; i++) {
      const corner = j * (across + 1) + i
      indices.set([corner, corner + 1, corner + across + 1, corner + 1, corner + across + 2, corner + across + 1], at)
      at += 6
    }
  }
  const difference = (a: MercatorPoint, b: MercatorPoint): MercatorPoint => ({ x: (b.x - a.x) / 2, y: (b.y - a.y) / 2 })
  const [middleColumn, middleRow] = [size.columns / 2, size.rows / 2]
  const columnStep = difference(toMercator(middleColumn - 1, middleRow), toMercator(middleColumn + 1, middleRow))
  const rowStep = difference(toMercator(middleColumn, middleRow - 1), toMercator(middleColumn, middleRow + 1))
  return { centre, columnStep, rowStep, vertices, indices, quads }
}
