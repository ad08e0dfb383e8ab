import type { CurvePoint } from '#shared/domain/natural-cubic-spline.ts'

/** A polynomial in t = (x − centre) / scale, lowest power first. */
export type Polynomial = { readonly centre: number; readonly scale: number; readonly coefficients: readonly number[] }

/**
 * Least-squares polynomial. x is centred and scaled before the normal equations are formed, which keeps them well
 * conditioned for the low degrees used here.
 * @param points at least degree + 1, with distinct x
 * @param degree 1 to 3
 */
export function fitPolynomial(points: readonly CurvePoint[], degree: 1 | 2 | 3): Polynomial {
  const xs = points.map((p) => p.x)
  const [low, high] = [Math.min(...xs), Math.max(...xs)]
  const centre = (low + high) / 2
  const scale = (high - low) / 2 || 1
  const size = degree + 1
  const rows = Array.from({ length: size }, () => new Array<number>(size + 1).fill(0))
  for (const { x, y } of points) {
    const t = (x - centre) / scale
    for (const [i, row] of rows.entries()) {
      for (let j = 0; j < size; j++) row[j] = (row[j] ?? 0) + t ** (i + j)
      row[size] = (row[size] ?? 0) + y * t ** i
    }
  }
  return { centre, scale, coefficients: solve(rows) }
}

/** Gaussian elimination with partial pivoting on an augmented matrix. */
function solve(rows: number[][]): number[] {
  const size = rows.length
  const at = (i: number, j: number) => rows[i]?.[j] ?? 0
  for (let k = 0; k < size; k++) {
    let pivot = k
    for (let i = k + 1; i < size; i++) if (Math.abs(at(i, k)) > Math.abs(at(pivot, k))) pivot = i
    ;[rows[k], rows[pivot]] = [rows[pivot] ?? [], rows[k] ?? []]
    for (let i = k + 1; i < size; i++) {
      const factor = at(i, k) / at(k, k)
      rows[i] = (rows[i] ?? []).map((value, j) => (j < k ? value : value - factor * at(k, j)))
    }
  }
  const result = new Array<number>(size).fill(0)
  for (let i = size - 1; i >= 0; i--) {
    const known = result.reduce((sum, value, j) => (j > i ? sum + at(i, j) * value : sum), 0)
    result[i] = (at(i, size) - known) / at(i, i)
  }
  return result
}

/** The polynomial's value at `x`. */
export function polynomialAt({ centre, scale, coefficients }: Polynomial, x: number): number {
  const t = (x - centre) / scale
  return coefficients.reduceRight((sum, coefficient) => sum * t + coefficient, 0)
}

/**
 * The local maximum of a quadratic or cubic strictly inside a range.
 * @returns the maximum, and whether the curve bends downward all over the range; null when it has no such maximum
 */
export function polynomialSummit(
  polynomial: Polynomial,
  low: number,
  high: number,
): (CurvePoint & { readonly concave: boolean }) | null {
  const [, b = 0, c = 0, d = 0] = polynomial.coefficients
  const size = Math.max(Math.abs(b), Math.abs(c), 1e-300)
  const inT = (x: number) => (x - polynomial.centre) / polynomial.scale
  let t: number
  if (Math.abs(d) < 1e-12 * size) {
    if (!(c < 0)) return null
    t = -b / (2 * c)
  } else {
    const discriminant = c * c - 3 * b * d
    if (!(discriminant > 0)) return null
    const root = Math.sqrt(discriminant)
    t = c > 0 ? (-c - root) / (3 * d) : b / (root - c)
  }
  if (!(t > inT(low) && t < inT(high))) return null
  const x = polynomial.centre + t * polynomial.scale
  const bend = (at: number) => 2 * c + 6 * d * inT(at)
  return { x, y: polynomialAt(polynomial, x), concave: bend(low) <= 0 && bend(high) <= 0 }
}
