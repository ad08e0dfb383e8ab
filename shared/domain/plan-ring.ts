import type { CellRectangle } from './grid.ts'
import type { GridPoint } from './site-geometry.ts'

/** Area and centroid of a plane figure. */
export interface PlaneFigure {
  /** mm², never negative, not rounded */
  readonly areaMm2: number
  /** mm, not rounded */
  readonly centroid: GridPoint
}

/**
 * Area and centroid of a ring by the shoelace sum, taken about its first point so that large coordinates
 * cost no digits.
 * @param ring open ring in grid axes, mm, either direction
 * @returns area and centroid, or undefined for a ring without area
 */
export function measureRing(ring: readonly GridPoint[]): PlaneFigure | undefined {
  const origin = ring[0]
  if (origin === undefined) return undefined
  let twice = 0
  let momentU = 0
  let momentV = 0
  ring.forEach((from, i) => {
    const to = ring[(i + 1) % ring.length] ?? origin
    const u0 = from.u - origin.u
    const v0 = from.v - origin.v
    const u1 = to.u - origin.u
    const v1 = to.v - origin.v
    const cross = u0 * v1 - u1 * v0
    twice += cross
    momentU += (u0 + u1) * cross
    momentV += (v0 + v1) * cross
  })
  if (twice === 0) return undefined
  const centroid = { u: origin.u + momentU / (3 * twice), v: origin.v + momentV / (3 * twice) }
  return { areaMm2: Math.abs(twice) / 2, centroid }
}

/**
 * Whether a ring holds a point (crossing count). Of two rings that share an edge exactly one holds a point on it.
 * @param ring open ring in grid axes, mm
 * @param point grid position, mm
 */
export function ringHolds(ring: readonly GridPoint[], point: GridPoint): boolean {
  let inside = false
  ring.forEach((a, i) => {
    const b = ring[(i + 1) % ring.length] ?? a
    if (a.v > point.v === b.v > point.v) return
    // taken from the lower end whichever way the edge runs, so that both neighbours compute the same crossing
    const [low, high] = a.v < b.v ? [a, b] : [b, a]
    const crossing = low.u + ((point.v - low.v) / (high.v - low.v)) * (high.u - low.u)
    if (point.u < crossing) inside = !inside
  })
  return inside
}

type Axis = 'u' | 'v'

/** The part of a ring on one side of a line of one axis: one step of the Sutherland–Hodgman clip. */
function clipHalf(ring: readonly GridPoint[], axis: Axis, edge: number, keep: 'above' | 'below'): GridPoint[] {
  const within = (point: GridPoint) => (keep === 'above' ? point[axis] >= edge : point[axis] <= edge)
  const other: Axis = axis === 'u' ? 'v' : 'u'
  const kept: GridPoint[] = []
  ring.forEach((from, i) => {
    const to = ring[(i + 1) % ring.length] ?? from
    if (within(from)) kept.push(from)
    if (within(from) === within(to)) return
    const share = (edge - from[axis]) / (to[axis] - from[axis])
    const across = from[other] + share * (to[other] - from[other])
    kept.push(axis === 'u' ? { u: edge, v: across } : { u: across, v: edge })
  })
  return kept
}

/**
 * The part of a ring between two lines of one axis.
 * A ring that is not convex may come back with pieces joined along the lines; such joins run there and back,
 * so area and centroid by measureRing are still exact.
 * @param ring open ring in grid axes, mm
 * @param axis the axis the lines stand on
 * @param low lower line, mm
 * @param high upper line, mm, above low
 */
export function clipBand(ring: readonly GridPoint[], axis: Axis, low: number, high: number): GridPoint[] {
  return clipHalf(clipHalf(ring, axis, low, 'above'), axis, high, 'below')
}

/** The part of a ring inside a rectangle, with the same remark as clipBand. */
export function clipToRectangle(ring: readonly GridPoint[], rectangle: CellRectangle): GridPoint[] {
  return clipBand(clipBand(ring, 'v', rectangle.top, rectangle.bottom), 'u', rectangle.left, rectangle.right)
}
