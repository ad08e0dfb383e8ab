import { convex, featureCollection, point as featureOf, tin } from '@turf/turf'
import { ringHolds } from './plan-ring.ts'
import type { GridPoint } from './site-geometry.ts'

/** A surveyed point in grid axes: mm, mm, and elevation in µm. */
export interface SurveyPoint extends GridPoint {
  readonly zUm: number
}

export type ElevationResult = { readonly ok: true; readonly um: number } | { readonly ok: false; readonly reason: string }

/** A ground or design surface that can be asked for its elevation. */
export interface Surface {
  /** whole µm at a grid position, or why there is none */
  readonly elevationAt: (point: GridPoint) => ElevationResult
}

export type SurfaceResult = { readonly ok: true; readonly surface: Surface } | { readonly ok: false; readonly reason: string }

type Triangle = readonly [SurveyPoint, SurveyPoint, SurveyPoint]
type Edge = readonly [SurveyPoint, SurveyPoint]

/** Twice the signed area of a triangle, mm². */
function cross(a: GridPoint, b: GridPoint, c: GridPoint): number {
  return (b.u - a.u) * (c.v - a.v) - (c.u - a.u) * (b.v - a.v)
}

function triangulate(points: readonly SurveyPoint[]): Triangle[] {
  const features = points.map((p) => featureOf([p.u, p.v], { zUm: p.zUm }))
  const triangles: Triangle[] = []
  for (const { geometry, properties } of tin(featureCollection(features), 'zUm').features) {
    const heights = [properties?.['a'], properties?.['b'], properties?.['c']]
    const [a, b, c] = (geometry.coordinates[0] ?? []).map(([u, v], i) => ({ u: u ?? 0, v: v ?? 0, zUm: Number(heights[i]) }))
    if (a && b && c && cross(a, b, c) !== 0) triangles.push([a, b, c])
  }
  return triangles
}

/** Elevation in a triangle by barycentric weights, or undefined outside it. */
function elevationIn([a, b, c]: Triangle, point: GridPoint): number | undefined {
  const whole = cross(a, b, c)
  const atA = cross(b, c, point) / whole
  const atB = cross(c, a, point) / whole
  const atC = cross(a, b, point) / whole
  return Math.min(atA, atB, atC) < 0 ? undefined : atA * a.zUm + atB * b.zUm + atC * c.zUm
}

/** Triangles by square of a coarse mesh, about one triangle a square, so that a look-up does not depend on their number. */
function indexTriangles(triangles: readonly Triangle[], outline: readonly GridPoint[]): (point: GridPoint) => readonly Triangle[] {
  const left = Math.min(...outline.map((p) => p.u))
  const top = Math.min(...outline.map((p) => p.v))
  const span = Math.max(...outline.map((p) => Math.max(p.u - left, p.v - top)))
  const count = Math.ceil(Math.sqrt(triangles.length))
  const step = (offset: number) => Math.floor((offset / span) * count)
  const squares = new Map<number, Triangle[]>()
  for (const triangle of triangles) {
    const us = triangle.map((p) => step(p.u - left))
    const vs = triangle.map((p) => step(p.v - top))
    for (let i = Math.min(...us); i <= Math.max(...us); i++) {
      for (let j = Math.min(...vs); j <= Math.max(...vs); j++) {
        const key = j * (count + 1) + i
        const square = squares.get(key)
        if (square === undefined) squares.set(key, [triangle])
        else square.push(triangle)
      }
    }
  }
  return (point) => squares.get(step(point.v - top) * (count + 1) + step(point.u - left)) ?? []
}

/** The edges that only one triangle has. */
function outerEdges(triangles: readonly Triangle[]): Edge[] {
  const edges = new Map<string, Edge>()
  for (const [a, b, c] of triangles) {
    for (const edge of [[a, b], [b, c], [c, a]] as const) {
      const key = edge.map((p) => `${p.u},${p.v}`).sort().join(' ')
      if (!edges.delete(key)) edges.set(key, edge)
    }
  }
  return [...edges.values()]
}

/** Elevation at the nearest place of the nearest edge. */
function elevationBeside(edges: readonly Edge[], point: GridPoint): number {
  let nearest = Infinity
  let zUm = Number.NaN
  for (const [a, b] of edges) {
    const length2 = (b.u - a.u) ** 2 + (b.v - a.v) ** 2
    const along = ((point.u - a.u) * (b.u - a.u) + (point.v - a.v) * (b.v - a.v)) / length2
    const share = Math.min(1, Math.max(0, along))
    const distance2 = (a.u + share * (b.u - a.u) - point.u) ** 2 + (a.v + share * (b.v - a.v) - point.v) ** 2
    if (distance2 >= nearest) continue
    nearest = distance2
    zUm = a.zUm + share * (b.zUm - a.zUm)
  }
  return zUm
}

function findDuplicate(points: readonly SurveyPoint[]): string | undefined {
  const seen = new Map<string, { readonly index: number; readonly zUm: number }>()
  for (const [index, { u, v, zUm }] of points.entries()) {
    const other = seen.get(`${u},${v}`)
    if (other !== undefined && other.zUm !== zUm) {
      return `Points ${other.index + 1} and ${index + 1} are at the same place with different elevations.`
    }
    seen.set(`${u},${v}`, other ?? { index, zUm })
  }
  return undefined
}

/**
 * A surface through surveyed points: Delaunay triangles, flat between their corners.
 * @param points three or more, finite, not all on one line
 * @returns a surface that knows the convex outline of the points and nothing beyond it; or the reason there is none
 */
export function makeSurface(points: readonly SurveyPoint[]): SurfaceResult {
  const duplicate = findDuplicate(points)
  if (duplicate !== undefined) return { ok: false, reason: duplicate }
  const distinct = [...new Map(points.map((p) => [`${p.u},${p.v}`, p])).values()]
  if (distinct.length < 3) return { ok: false, reason: 'A surface needs three or more points at different places.' }
  const hull = convex(featureCollection(distinct.map((p) => featureOf([p.u, p.v]))))?.geometry.coordinates[0]
  const triangles = triangulate(distinct)
  if (hull === undefined || triangles.length === 0) return { ok: false, reason: 'The points of the surface all lie on one line.' }
  const outline = hull.slice(1).map(([u, v]) => ({ u: u ?? 0, v: v ?? 0 }))
  const near = indexTriangles(triangles, outline)
  const edges = outerEdges(triangles)
  const elevationAt = (point: GridPoint): ElevationResult => {
    for (const triangle of near(point)) {
      const zUm = elevationIn(triangle, point)
      if (zUm !== undefined) return { ok: true, um: Math.round(zUm) }
    }
    // the triangulation can leave hair-thin gaps along its outline; what lies in them is still surveyed ground
    if (ringHolds(outline, point)) return { ok: true, um: Math.round(elevationBeside(edges, point)) }
    return { ok: false, reason: 'The place lies outside the surveyed points.' }
  }
  return { ok: true, surface: { elevationAt } }
}

/**
 * A flat surface, level or sloping.
 * @param through a grid position on it, mm, and its elevation, µm
 * @param slope rise in percent along the columns (+u) and along the rows (+v, downward on the sheet)
 */
export function planeSurface(
  through: SurveyPoint,
  slope: { readonly uPercent: number; readonly vPercent: number } = { uPercent: 0, vPercent: 0 },
): Surface {
  // 1 % of 1 mm is 10 µm
  const rise = (point: GridPoint) => 10 * (slope.uPercent * (point.u - through.u) + slope.vPercent * (point.v - through.v))
  return { elevationAt: (point) => ({ ok: true, um: Math.round(through.zUm + rise(point)) }) }
}
