import { groupBy } from './group-by.ts'
import type { GridPoint } from './site-geometry.ts'

/** A cell with the ring of its area cut by the boundary, grid axes, mm (open ring). */
export interface OutlinedCell {
  readonly cell: number
  readonly column: number
  readonly row: number
  readonly outline: readonly GridPoint[]
}

export type Segment = readonly [GridPoint, GridPoint]

/** Cut cells come back in fractions of a millimetre: a side this near to a grid line lies on it. */
const ON_LINE_MM = 1

/**
 * The outer edge of a lot: every side of its cells that is not shared with another cell of the lot.
 * @param cells the whole lot
 * @param sideMm side of a whole cell, mm, above 0
 */
export function lotEdge(cells: readonly OutlinedCell[], sideMm: number): Segment[] {
  const rows = groupBy(cells, (cell) => cell.row)
  const inLot = (column: number, row: number) => rows.get(row)?.some((cell) => cell.column === column) ?? false
  return cells.flatMap(({ column, row, outline }) =>
    outline.flatMap((from, i): Segment[] => {
      const to = outline[(i + 1) % outline.length]
      const on = (axis: 'u' | 'v', line: number) =>
        Math.abs(from[axis] - line * sideMm) < ON_LINE_MM && Math.abs(to[axis] - line * sideMm) < ON_LINE_MM
      const shared =
        (on('u', column) && inLot(column - 1, row)) ||
        (on('u', column + 1) && inLot(column + 1, row)) ||
        (on('v', row) && inLot(column, row - 1)) ||
        (on('v', row + 1) && inLot(column, row + 1))
      return shared ? [] : [[from, to]]
    }),
  )
}

/** Distance from a point to the nearest of the segments, mm; infinite where there are none. */
export function distanceToEdge(point: GridPoint, edge: readonly Segment[]): number {
  let nearest = Number.POSITIVE_INFINITY
  for (const [a, b] of edge) {
    const [du, dv] = [b.u - a.u, b.v - a.v]
    const length = du * du + dv * dv
    const along = length === 0 ? 0 : Math.min(1, Math.max(0, ((point.u - a.u) * du + (point.v - a.v) * dv) / length))
    nearest = Math.min(nearest, Math.hypot(point.u - a.u - along * du, point.v - a.v - along * dv))
  }
  return nearest
}
