import fc from 'fast-check'
import { PolynomialRegression } from 'ml-regression-polynomial'
import { linearRegression } from 'simple-statistics'
import { describe, expect, test } from 'vitest'
import { fitNaturalCubicSpline, splineAt, splineSummits } from '#shared/domain/natural-cubic-spline.ts'
import type { CurvePoint } from '#shared/domain/natural-cubic-spline.ts'
import { fitPolynomial, polynomialAt, polynomialSummit } from '#shared/domain/polynomial-fit.ts'

const seeded = { seed: 20261201, numRuns: 200 }

const points = fc
  .array(fc.record({ gap: fc.double({ min: 0.3, max: 4, noNaN: true }), y: fc.double({ min: 1400, max: 2100, noNaN: true }) }), {
    minLength: 4,
    maxLength: 9,
  })
  .map((rows) => {
    let x = 5
    return rows.map(({ gap, y }) => ({ x: (x += gap), y }))
  })

/**
 * An independent natural spline: one dense linear system for all 4(n−1) coefficients in powers of x − x_left
 * (values at both ends, equal first and second derivatives inside, no curvature at the ends), by full elimination.
 */
function denseSpline(knots: readonly CurvePoint[]): (x: number) => number {
  const n = knots.length - 1
  const size = 4 * n
  const rows: number[][] = []
  const row = (entries: [number, number][], right: number) => {
    const line = new Array<number>(size + 1).fill(0)
    for (const [column, value] of entries) line[column] = value
    line[size] = right
    rows.push(line)
  }
  const knot = (i: number) => knots[i] ?? { x: 0, y: 0 }
  for (let i = 0; i < n; i++) {
    const h = knot(i + 1).x - knot(i).x
    row([[4 * i, 1]], knot(i).y)
    row([[4 * i, 1], [4 * i + 1, h], [4 * i + 2, h * h], [4 * i + 3, h ** 3]], knot(i + 1).y)
    if (i === n - 1) continue
    row([[4 * i + 1, 1], [4 * i + 2, 2 * h], [4 * i + 3, 3 * h * h], [4 * i + 5, -1]], 0)
    row([[4 * i + 2, 2], [4 * i + 3, 6 * h], [4 * i + 6, -2]], 0)
  }
  const last = knot(n).x - knot(n - 1).x
  row([[2, 2]], 0)
  row([[4 * n - 2, 2], [4 * n - 1, 6 * last]], 0)
  const cell = (i: number, j: number) => rows[i]?.[j] ?? 0
  for (let k = 0; k < size; k++) {
    let pivot = k
    for (let i = k; i < size; i++) if (Math.abs(cell(i, k)) > Math.abs(cell(pivot, k))) pivot = i
    const swapped = rows[pivot] ?? []
    rows[pivot] = rows[k] ?? []
    rows[k] = swapped.map((value) => value / (swapped[k] ?? 1))
    for (let i = 0; i < size; i++) {
      const factor = cell(i, k)
      if (i !== k && factor !== 0) rows[i] = (rows[i] ?? []).map((value, j) => value - factor * cell(k, j))
    }
  }
  return (x) => {
    let i = 0
    while (i < n - 1 && x > knot(i + 1).x) i++
    const t = x - knot(i).x
    const at = (j: number) => cell(4 * i + j, size)
    return at(0) + at(1) * t + at(2) * t * t + at(3) * t ** 3
  }
}

describe('natural cubic spline', () => {
  test('agrees everywhere with an independent solution of the full linear system', () => {
    fc.assert(
      fc.property(points, fc.double({ min: 0, max: 1, noNaN: true }), (knots, share) => {
        const [first, last] = [knots[0], knots.at(-1)]
        if (!first || !last) return
        const x = first.x + share * (last.x - first.x)
        expect(splineAt(fitNaturalCubicSpline(knots), x)).toBeCloseTo(denseSpline(knots)(x), 5)
      }),
      seeded,
    )
  })

  test('passes through its points and says nothing outside them', () => {
    fc.assert(
      fc.property(points, (knots) => {
        const spline = fitNaturalCubicSpline(knots)
        for (const { x, y } of knots) expect(splineAt(spline, x)).toBeCloseTo(y, 7)
        expect(splineAt(spline, (knots[0]?.x ?? 0) - 0.01)).toBeUndefined()
        expect(splineAt(spline, (knots.at(-1)?.x ?? 0) + 0.01)).toBeUndefined()
      }),
      seeded,
    )
  })

  test('finds every summit: as many as a fine search, each at least as high', () => {
    fc.assert(
      fc.property(points, (knots) => {
        const spline = fitNaturalCubicSpline(knots)
        const [low, high] = [knots[0]?.x ?? 0, knots.at(-1)?.x ?? 0]
        const samples = Array.from({ length: 4001 }, (_, i) => splineAt(spline, Math.min(high, low + ((high - low) * i) / 4000)) ?? 0)
        const found = samples.filter((y, i) => i > 0 && i < 4000 && y > (samples[i - 1] ?? y) && y >= (samples[i + 1] ?? y))
        const summits = splineSummits(spline)
        // A summit within one step of an end can escape the search, never the other way round.
        expect(summits.length).toBeGreaterThanOrEqual(found.length)
        if (found.length > 0) expect(Math.max(...summits.map((s) => s.y))).toBeGreaterThanOrEqual(Math.max(...found) - 1e-6)
      }),
      seeded,
    )
  })

  test('a straight line has no summit, and a summit on a knot is found once', () => {
    const line = [0, 1, 2, 3].map((x) => ({ x, y: 10 + 2 * x }))
    expect(splineSummits(fitNaturalCubicSpline(line))).toEqual([])
    const even = [-2, -1, 0, 1, 2].map((x) => ({ x, y: 5 - x * x }))
    const summits = splineSummits(fitNaturalCubicSpline(even))
    expect(summits).toHaveLength(1)
    expect(summits[0]?.x).toBeCloseTo(0, 9)
    expect(summits[0]?.y).toBeCloseTo(5, 9)
  })
})

describe('least-squares polynomial', () => {
  test('agrees with ml-regression-polynomial in degree 2 and 3 and simple-statistics in degree 1', () => {
    fc.assert(
      fc.property(points, fc.double({ min: 0, max: 1, noNaN: true }), (knots, share) => {
        const xs = knots.map((p) => p.x)
        const ys = knots.map((p) => p.y)
        const x = (xs[0] ?? 0) + share * ((xs.at(-1) ?? 0) - (xs[0] ?? 0))
        for (const degree of [2, 3] as const) {
          const theirs = new PolynomialRegression(xs, ys, degree).predict(x)
          expect(Math.abs(polynomialAt(fitPolynomial(knots, degree), x) - theirs)).toBeLessThan(1e-3)
        }
        const { m, b } = linearRegression(knots.map((p) => [p.x, p.y]))
        expect(polynomialAt(fitPolynomial(knots, 1), x)).toBeCloseTo(m * x + b, 6)
      }),
      seeded,
    )
  })

  test('gives back a cubic it was made from, with its summit', () => {
    // y = x³ − 6x² + 9x: maximum 4 at x = 1, minimum 0 at x = 3.
    const cubic = [0, 0.5, 1.5, 2, 2.5].map((x) => ({ x, y: x ** 3 - 6 * x ** 2 + 9 * x }))
    const summit = polynomialSummit(fitPolynomial(cubic, 3), 0, 2.5)
    expect(summit?.x).toBeCloseTo(1, 9)
    expect(summit?.y).toBeCloseTo(4, 9)
    expect(summit?.concave).toBe(false)
    expect(polynomialSummit(fitPolynomial(cubic, 3), 1.5, 2.5)).toBeNull()
  })

  test('has no summit where it bends upward', () => {
    const bowl = [0, 1, 2, 3].map((x) => ({ x, y: (x - 1.5) ** 2 }))
    expect(polynomialSummit(fitPolynomial(bowl, 2), 0, 3)).toBeNull()
  })
})
