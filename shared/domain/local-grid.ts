import type { SitePoint } from '#shared/domain/site-geometry.ts'

/** A point known in both systems: on the site's own grid, and in the coordinate system it is tied to. */
export interface ControlPoint {
  readonly name: string
  readonly local: SitePoint
  readonly system: SitePoint
}

/**
 * A 2-D similarity from a local grid to a coordinate system: E = a·e − b·n + c, N = b·e + a·n + d. Its scale is √(a² + b²), which
 * holds the change of unit; its turn is atan2(b, a), counter-clockwise.
 */
export interface Similarity {
  readonly a: number
  readonly b: number
  readonly c: number
  readonly d: number
}

/** How far a control point lies from where the tie puts it, in units of the coordinate system. */
export interface ControlResidual {
  readonly name: string
  readonly easting: number
  readonly northing: number
  readonly distance: number
}

export type LocalGridTie =
  | {
      readonly ok: true
      readonly similarity: Similarity
      readonly scale: number
      /** degrees, counter-clockwise, of the local east axis in the system */
      readonly rotationDeg: number
      readonly residuals: readonly ControlResidual[]
      /** root of the mean squared distance; 0 for two points, which fit exactly */
      readonly rms: number
      /** the one point that spoils the others, where that can be told (four points or more) */
      readonly bad: string | null
    }
  | { readonly ok: false; readonly code: 'too-few' | 'same-place' | 'not-a-number'; readonly reason: string }

/** A point is named bad where the others agree this many times better without it. */
const SPOILS = 4

/**
 * Ties a local grid to a coordinate system by least squares over its control points.
 * @param points two or more, in the units of their systems
 * @param tolerance distance, in units of the coordinate system, that a good control point may be off by
 * @returns the similarity with its residuals and the point that is likely wrong; or why there is none
 * Source: least squares of a conformal (Helmert) transformation, in any textbook of surveying adjustments.
 */
export function tieLocalGrid(points: readonly ControlPoint[], tolerance: number): LocalGridTie {
  const numbers = points.flatMap(({ local, system }) => [local.easting, local.northing, system.easting, system.northing])
  if (!numbers.every(Number.isFinite)) return { ok: false, code: 'not-a-number', reason: 'Every control point needs four coordinates.' }
  if (points.length < 2) return { ok: false, code: 'too-few', reason: 'Two control points or more tie a local grid.' }
  const similarity = fit(points)
  if (similarity === null) return { ok: false, code: 'same-place', reason: 'The control points stand at one place. Give points that lie apart.' }
  const residuals = points.map((point) => residualOf(similarity, point))
  const rms = rmsOf(residuals)
  return {
    ok: true,
    similarity,
    scale: Math.hypot(similarity.a, similarity.b),
    rotationDeg: (Math.atan2(similarity.b, similarity.a) * 180) / Math.PI,
    residuals,
    rms,
    bad: rms > tolerance ? badPoint(points, rms) : null,
  }
}

/** A point of the local grid in the coordinate system. */
export function toSystem({ a, b, c, d }: Similarity, { easting, northing }: SitePoint): SitePoint {
  return { easting: a * easting - b * northing + c, northing: b * easting + a * northing + d }
}

/** A point of the coordinate system on the local grid, the reverse of toSystem. */
export function toLocal({ a, b, c, d }: Similarity, { easting, northing }: SitePoint): SitePoint {
  const square = a * a + b * b
  const [x, y] = [easting - c, northing - d]
  return { easting: (a * x + b * y) / square, northing: (a * y - b * x) / square }
}

/** Least squares about the centroids, so that large coordinates lose nothing; null where the points coincide. */
function fit(points: readonly ControlPoint[]): Similarity | null {
  const mean = (of: (point: ControlPoint) => number) => points.reduce((sum, point) => sum + of(point), 0) / points.length
  const [e0, n0] = [mean(({ local }) => local.easting), mean(({ local }) => local.northing)]
  const [x0, y0] = [mean(({ system }) => system.easting), mean(({ system }) => system.northing)]
  let [square, along, across, spread] = [0, 0, 0, 0]
  for (const { local, system } of points) {
    const [e, n, x, y] = [local.easting - e0, local.northing - n0, system.easting - x0, system.northing - y0]
    square += e * e + n * n
    along += e * x + n * y
    across += e * y - n * x
    spread += x * x + y * y
  }
  if (square === 0 || spread === 0) return null
  const [a, b] = [along / square, across / square]
  if (a === 0 && b === 0) return null
  return { a, b, c: x0 - a * e0 + b * n0, d: y0 - b * e0 - a * n0 }
}

function residualOf(similarity: Similarity, { name, local, system }: ControlPoint): ControlResidual {
  const found = toSystem(similarity, local)
  const [easting, northing] = [system.easting - found.easting, system.northing - found.northing]
  return { name, easting, northing, distance: Math.hypot(easting, northing) }
}

function rmsOf(residuals: readonly ControlResidual[]): number {
  return residuals.length <= 2 ? 0 : Math.sqrt(residuals.reduce((sum, { distance }) => sum + distance ** 2, 0) / residuals.length)
}

/** The point without which the rest agree far better. Three points cannot tell: any two of them fit exactly. */
function badPoint(points: readonly ControlPoint[], rms: number): string | null {
  if (points.length < 4) return null
  const without = points.map((point) => {
    const rest = points.filter((other) => other !== point)
    const similarity = fit(rest)
    return { name: point.name, rms: similarity === null ? Infinity : rmsOf(rest.map((other) => residualOf(similarity, other))) }
  })
  const [best, second] = without.toSorted((a, b) => a.rms - b.rms)
  if (best === undefined || second === undefined) return null
  return best.rms * SPOILS < rms && best.rms * SPOILS < second.rms ? best.name : null
}
