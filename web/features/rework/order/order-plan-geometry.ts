import type { CellLookup } from '#shared/domain/cells.ts'
import { cellSideMm } from '#shared/domain/grid.ts'
import { groundStateOf, hasFlag, type GroundState } from '#shared/domain/ground-state.ts'
import type { GridDefinition, GridPoint } from '#shared/domain/site-geometry.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'

export type PlanSquare = { readonly cell: number; readonly x: number; readonly y: number; readonly own: boolean; readonly state: GroundState; readonly near: boolean }

/** A step between two neighbours. `low` is the unit vector to the lower side; `open`: a fall a person can be hurt by. */
export type PlanEdge = { readonly x: number; readonly y: number; readonly upright: boolean; readonly low: 1 | -1; readonly open: boolean }

export type OrderLayout = {
  readonly side: number
  readonly squares: readonly PlanSquare[]
  readonly edges: readonly PlanEdge[]
  /** drawing position of a grid position */
  readonly place: (point: GridPoint) => { readonly x: number; readonly y: number }
  readonly centre: { readonly x: number; readonly y: number }
}

export type OrderPlanInput = {
  readonly cells: readonly number[]
  readonly lift: number
  readonly state: GroundState
  readonly lookup: CellLookup
  readonly grid: GridDefinition
  readonly sheet: GroundSheet | undefined
  readonly width: number
  readonly height: number
}

const LARGEST = 52
const SMALLEST = 9
/** Tops in tenths of a millimetre: a step from 100 mm, an open edge from 300 mm, as the order's own hazards count. */
const STEP = 1_000
const OPEN = 3_000

/** The order's cells in the middle of a drawing with as much of the ground around them as it has room for. */
export function layOutOrder({ cells, lift, state, lookup, grid, sheet, width, height }: OrderPlanInput): OrderLayout {
  const places = cells.flatMap((cell) => lookup.addressOf(cell) ?? [])
  const columns = places.map((place) => place.column)
  const rows = places.map((place) => place.row)
  const [left, right, top, bottom] = places.length === 0 ? [0, 0, 0, 0] : [Math.min(...columns), Math.max(...columns), Math.min(...rows), Math.max(...rows)]
  const side = Math.max(SMALLEST, Math.min(LARGEST, width / (right - left + 3), height / (bottom - top + 3)))
  const xOf = (column: number) => width / 2 + (column - (left + right + 1) / 2) * side
  const yOf = (row: number) => height / 2 + (row - (top + bottom + 1) / 2) * side
  const own = new Set(cells)

  const squares: PlanSquare[] = []
  const edges: PlanEdge[] = []
  const first = { column: Math.max(0, Math.floor((left + right + 1) / 2 - width / 2 / side)), row: Math.max(0, Math.floor((top + bottom + 1) / 2 - height / 2 / side)) }
  for (let row = first.row; row < grid.rows && yOf(row) < height; row += 1) {
    for (let column = first.column; column < grid.columns && xOf(column) < width; column += 1) {
      const cell = lookup.at(column, row)
      if (cell === undefined) continue
      const shown = sheet === undefined ? 'not-placed' : groundStateOf(sheet.state[cell] ?? 0)
      const isOwn = own.has(cell)
      const covered = sheet !== undefined && sheet.lift[cell] !== lift
      squares.push({ cell, x: xOf(column), y: yOf(row), own: isOwn, state: isOwn && (sheet === undefined || covered) ? state : shown, near: hasFlag(sheet?.flags[cell] ?? 0, 'near') })
      if (sheet === undefined) continue
      const topUm = sheet.top[cell] ?? 0
      for (const upright of [true, false]) {
        const neighbour = upright ? lookup.at(column + 1, row) : lookup.at(column, row + 1)
        if (neighbour === undefined) continue
        const fall = topUm - (sheet.top[neighbour] ?? 0)
        if (Math.abs(fall) < STEP) continue
        edges.push({ x: upright ? xOf(column + 1) : xOf(column), y: upright ? yOf(row) : yOf(row + 1), upright, low: fall > 0 ? 1 : -1, open: Math.abs(fall) >= OPEN })
      }
    }
  }
  const sideMm = cellSideMm(grid)
  return { side, squares, edges, place: ({ u, v }) => ({ x: xOf(u / sideMm), y: yOf(v / sideMm) }), centre: { x: width / 2, y: height / 2 } }
}

/** Distance in mm from a grid position to the nearest of some cells; 0 inside one, null where there are none. */
export function distanceToCells(point: GridPoint, cells: readonly number[], lookup: CellLookup, grid: GridDefinition): number | null {
  const side = cellSideMm(grid)
  const distances = cells.flatMap((cell) => {
    const place = lookup.addressOf(cell)
    if (place === undefined) return []
    const across = Math.max(place.column * side - point.u, 0, point.u - (place.column + 1) * side)
    const down = Math.max(place.row * side - point.v, 0, point.v - (place.row + 1) * side)
    return [Math.hypot(across, down)]
  })
  return distances.length === 0 ? null : Math.min(...distances)
}
