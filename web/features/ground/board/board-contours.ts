import type { PlanUnit } from '#shared/domain/site-geometry.ts'
import { fromMicrometres } from '#shared/units/length.ts'
import type { SheetPlace } from './board-projection.ts'
import type { BoardCells } from './board-types.ts'

const MOST_LEVELS = 16

/** Contour interval, in the unit, that a draughtsman would choose for a range of heights. */
export function contourInterval(range: number): number {
  const steps = [0.25, 0.5, 1, 2, 5, 10, 20, 50, 100]
  return steps.find((step) => range / step <= MOST_LEVELS) ?? 200
}

/** Where the level crosses between two corners, as a share of the way; undefined when it does not. */
function crossing(level: number, from: number, to: number): number | undefined {
  return from < level === to < level ? undefined : (level - from) / (to - from)
}

/** Segments of one level within the square of four neighbouring cell centres, clockwise from the top left. */
function squareSegments(level: number, heights: readonly number[], column: number, row: number): [SheetPlace, SheetPlace][] {
  const [a, b, c, d] = heights as [number, number, number, number]
  const top = crossing(level, a, b)
  const right = crossing(level, b, c)
  const bottom = crossing(level, d, c)
  const left = crossing(level, a, d)
  const points: SheetPlace[] = []
  if (top !== undefined) points.push({ column: column + top, row })
  if (right !== undefined) points.push({ column: column + 1, row: row + right })
  if (bottom !== undefined) points.push({ column: column + bottom, row: row + 1 })
  if (left !== undefined) points.push({ column, row: row + left })
  const [p, q, r, s] = points
  if (p === undefined || q === undefined) return []
  if (r === undefined || s === undefined) return [[p, q]]
  // a saddle: the middle says which corners belong together
  const middleBelow = (a + b + c + d) / 4 < level
  return a < level === middleBelow ? [[p, q], [r, s]] : [[p, s], [q, r]]
}

/**
 * Contours of the existing ground by marching squares over the cell centres.
 * @returns segments in columns and rows of the sheet; none where the heights are unknown
 */
export function contourSegments(
  cells: BoardCells,
  size: { readonly columns: number; readonly rows: number },
  unit: PlanUnit,
): [SheetPlace, SheetPlace][] {
  const heights = new Float64Array(size.columns * size.rows).fill(NaN)
  let low = Infinity
  let high = -Infinity
  for (let cell = 0; cell < cells.column.length; cell++) {
    const height = fromMicrometres(cells.baseUm[cell]!, unit)
    if (Number.isNaN(height)) continue
    heights[cells.row[cell]! * size.columns + cells.column[cell]!] = height
    low = Math.min(low, height)
    high = Math.max(high, height)
  }
  if (!(high > low)) return []
  const interval = contourInterval(high - low)
  const segments: [SheetPlace, SheetPlace][] = []
  for (let row = 0; row + 1 < size.rows; row++) {
    for (let column = 0; column + 1 < size.columns; column++) {
      const at = row * size.columns + column
      const corners = [heights[at]!, heights[at + 1]!, heights[at + size.columns + 1]!, heights[at + size.columns]!]
      if (corners.some(Number.isNaN)) continue
      const first = Math.ceil(Math.min(...corners) / interval)
      for (let level = first; level * interval <= Math.max(...corners); level++) {
        segments.push(...squareSegments(level * interval, corners, column + 0.5, row + 0.5))
      }
    }
  }
  return segments
}
