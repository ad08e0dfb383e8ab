/** A point of a curve in the plane. */
export type CurvePoint = { readonly x: number; readonly y: number }

/** One piece, y = a + b·t + c·t² + d·t³ with t = x − x0, for x0 ≤ x ≤ x1. */
type Piece = { readonly x0: number; readonly x1: number; readonly a: number; readonly b: number; readonly c: number; readonly d: number }

/** A natural cubic spline; made by {@link fitNaturalCubicSpline}. */
export type NaturalCubicSpline = { readonly pieces: readonly Piece[] }

/**
 * The natural cubic spline through points: twice continuously differentiable, no curvature at the ends (de Boor,
 * A Practical Guide to Splines, ch. IV). Solves the tridiagonal system for the second derivatives by elimination.
 * @param points two or more, in rising order of distinct x
 */
export function fitNaturalCubicSpline(points: readonly CurvePoint[]): NaturalCubicSpline {
  const second = secondDerivatives(points)
  const pieces = points.slice(0, -1).map((left, i) => {
    const right = points[i + 1] ?? left
    const [m0, m1] = [second[i] ?? 0, second[i + 1] ?? 0]
    const h = right.x - left.x
    return {
      x0: left.x,
      x1: right.x,
      a: left.y,
      b: (right.y - left.y) / h - (h * (2 * m0 + m1)) / 6,
      c: m0 / 2,
      d: (m1 - m0) / (6 * h),
    }
  })
  return { pieces }
}

function secondDerivatives(points: readonly CurvePoint[]): number[] {
  const at = (i: number) => points[i] ?? { x: 0, y: 0 }
  const count = points.length
  const upper: number[] = [0]
  const right: number[] = [0]
  // Forward sweep over the interior points; both ends are held at zero curvature.
  for (let i = 1; i < count - 1; i++) {
    const h0 = at(i).x - at(i - 1).x
    const h1 = at(i + 1).x - at(i).x
    const turn = (at(i + 1).y - at(i).y) / h1 - (at(i).y - at(i - 1).y) / h0
    const pivot = 2 * (h0 + h1) - h0 * (upper[i - 1] ?? 0)
    upper.push(h1 / pivot)
    right.push((6 * turn - h0 * (right[i - 1] ?? 0)) / pivot)
  }
  // Back substitution.
  const second = new Array<number>(count).fill(0)
  for (let i = count - 2; i >= 1; i--) second[i] = (right[i] ?? 0) - (upper[i] ?? 0) * (second[i + 1] ?? 0)
  return second
}

/**
 * The spline's value.
 * @returns y at `x`, or undefined outside the points: a laboratory curve is not carried beyond what was measured
 */
export function splineAt(spline: NaturalCubicSpline, x: number): number | undefined {
  const piece = spline.pieces.find((p) => x >= p.x0 && x <= p.x1)
  return piece && valueOf(piece, x - piece.x0)
}

function valueOf({ a, b, c, d }: Piece, t: number): number {
  return a + t * (b + t * (c + t * d))
}

/**
 * Every place where the spline turns from rising to falling, found exactly from the roots of each piece's derivative.
 * @returns summits strictly between the ends, in order of x
 */
export function splineSummits(spline: NaturalCubicSpline): CurvePoint[] {
  const summits: CurvePoint[] = []
  const last = spline.pieces.at(-1)
  for (const piece of spline.pieces) {
    const h = piece.x1 - piece.x0
    for (const t of summitsOf(piece)) {
      // A summit on a knot belongs to the piece on its left; the ends of the curve are no summits.
      const onLeftKnot = t <= 1e-12 * h
      if (onLeftKnot || t > h * (1 + 1e-12) || (piece === last && t >= h * (1 - 1e-12))) continue
      summits.push({ x: piece.x0 + t, y: valueOf(piece, t) })
    }
  }
  return summits
}

/** Where b + 2c·t + 3d·t² passes zero on the way down. */
function summitsOf({ b, c, d }: Piece): number[] {
  if (Math.abs(d) < 1e-14 * Math.max(Math.abs(c), Math.abs(b), 1e-300)) return c < 0 ? [-b / (2 * c)] : []
  const discriminant = c * c - 3 * b * d
  if (!(discriminant > 0)) return []
  // Of the two roots, the one with a negative second derivative; written to avoid the difference of near equals.
  const root = Math.sqrt(discriminant)
  return c > 0 ? [(-c - root) / (3 * d)] : [b / (root - c)]
}
