import type { LabPoint } from '#shared/domain/curve-points.ts'
import { curveRefusal, curveWarnings } from '#shared/domain/curve-checks.ts'
import { fitNaturalCubicSpline, splineAt, splineSummits } from '#shared/domain/natural-cubic-spline.ts'
import type { CurvePoint } from '#shared/domain/natural-cubic-spline.ts'
import { WATER_DENSITY } from '#shared/domain/phase-relations.ts'
import { fitPolynomial, polynomialAt, polynomialSummit } from '#shared/domain/polynomial-fit.ts'
import type { Reason } from '#shared/domain/result.ts'
import { convertDensity } from '#shared/units/density.ts'

export type FitName = 'spline' | 'quadratic' | 'cubic'

/** Maximum dry density, kg/m³, and optimum moisture, percent. */
export type MaximumPair = { readonly maxDryDensity: number; readonly optimumMoisture: number }

/** An alternative fit: its pair, or why it has none. */
export type AlternativeFit =
  | (MaximumPair & { readonly ok: true; /** Bends downward all over the points. */ readonly concave: boolean })
  | { readonly ok: false; readonly reason: Reason }

export type CurveInput = {
  readonly points: readonly LabPoint[]
  readonly gs: number
  readonly gsMeasured?: boolean | undefined
  /** kg/m³; 1000 where left out. */
  readonly waterDensity?: number | undefined
  /** The fit to use; the spline where left out. */
  readonly use?: FitName | undefined
}

export type FittedCurve = {
  readonly ok: true
  readonly used: FitName
  /** The pair of the fit used, unrounded. */
  readonly pair: MaximumPair
  readonly spline: MaximumPair
  readonly quadratic: AlternativeFit
  readonly cubic: AlternativeFit
  /** Furthest that the other fits' pairs lie from the pair used: kg/m³ and points. */
  readonly difference: { readonly dryDensity: number; readonly moisture: number }
  /** The fits differ by 0.3 pcf or 0.3 % or more: whoever confirms the pair must be told. */
  readonly confirmKnowingly: boolean
  /** Saturation at the pair used, percent; null where it leaves no voids. */
  readonly peakSaturation: number | null
  readonly warnings: readonly Reason[]
  /** Dry density, kg/m³, of the fit used; undefined outside the measured moistures. */
  readonly curveAt: (moisture: number) => number | undefined
}

export type CurveFit = FittedCurve | { readonly ok: false; readonly reason: Reason }

/**
 * Fits a laboratory compaction curve and finds its maximum dry density and optimum moisture (D698, D1557, T 99,
 * T 180). The curve used is the natural cubic spline on moisture, the smooth line through the points that a
 * laboratory draws; least-squares quadratic and cubic stand beside it for scattered points.
 * @param input 4 or more points in any order: percent and kg/m³; gs 1.5 to 6
 * @returns the fits, with warnings, or why the points make no reference
 */
export function fitReferenceCurve(input: CurveInput): CurveFit {
  const waterDensity = input.waterDensity ?? WATER_DENSITY
  const refusal = curveRefusal(input.points, input.gs, waterDensity, input.gsMeasured ?? false)
  if (refusal) return { ok: false, reason: refusal }

  const points = toCurvePoints(input.points)
  const low = points[0]?.x ?? 0
  const high = points.at(-1)?.x ?? 0
  const spline = fitNaturalCubicSpline(points)
  const summits = splineSummits(spline)
  const top = highest(summits)
  const ends = Math.max(points[0]?.y ?? 0, points.at(-1)?.y ?? 0)
  if (!top || top.y < ends) return { ok: false, reason: NO_PEAK }

  const [quadratic, quadraticAt] = alternative(points, 2, low, high)
  const [cubic, cubicAt] = alternative(points, 3, low, high)
  const splinePair = { maxDryDensity: top.y, optimumMoisture: top.x }
  const used = input.use ?? 'spline'
  const chosen = { spline: { ok: true as const, ...splinePair }, quadratic, cubic }[used]
  if (!chosen.ok) return { ok: false, reason: chosen.reason }

  const pair = { maxDryDensity: chosen.maxDryDensity, optimumMoisture: chosen.optimumMoisture }
  const others = [splinePair, quadratic, cubic].filter((fit): fit is MaximumPair & typeof fit => 'maxDryDensity' in fit)
  const difference = {
    dryDensity: Math.max(...others.map((fit) => Math.abs(fit.maxDryDensity - pair.maxDryDensity))),
    moisture: Math.max(...others.map((fit) => Math.abs(fit.optimumMoisture - pair.optimumMoisture))),
  }
  const differencePcf = convertDensity(difference.dryDensity, 'kg/m3', 'pcf')
  const { warnings, peakSaturation } = curveWarnings({
    points, pair, gs: input.gs, waterDensity, differencePcf, differenceMoisture: difference.moisture, summits: summits.length,
  })
  const valueAt = { spline: (w: number) => splineAt(spline, w), quadratic: quadraticAt, cubic: cubicAt }[used]
  return {
    ok: true,
    used,
    pair,
    spline: splinePair,
    quadratic,
    cubic,
    difference,
    confirmKnowingly: differencePcf >= 0.3 || difference.moisture >= 0.3,
    peakSaturation,
    warnings,
    curveAt: (moisture) => (moisture >= low && moisture <= high ? valueAt(moisture) : undefined),
  }
}

const NO_PEAK: Reason = {
  code: 'no-peak',
  message: 'The points do not pass over a peak: at least one is needed on each side of it. Mould another specimen, drier or wetter.',
}

function toCurvePoints(points: readonly LabPoint[]): CurvePoint[] {
  return points.map((p) => ({ x: p.moisture, y: p.dryDensity })).sort((a, b) => a.x - b.x)
}

function highest(points: readonly CurvePoint[]): CurvePoint | undefined {
  return points.reduce<CurvePoint | undefined>((best, p) => (best && best.y >= p.y ? best : p), undefined)
}

function alternative(
  points: readonly CurvePoint[],
  degree: 2 | 3,
  low: number,
  high: number,
): [AlternativeFit, (moisture: number) => number] {
  const polynomial = fitPolynomial(points, degree)
  const summit = polynomialSummit(polynomial, low, high)
  const at = (moisture: number) => polynomialAt(polynomial, moisture)
  if (summit && summit.y >= Math.max(at(low), at(high))) {
    return [{ ok: true, maxDryDensity: summit.y, optimumMoisture: summit.x, concave: summit.concave }, at]
  }
  const name = degree === 2 ? 'quadratic' : 'cubic'
  return [{ ok: false, reason: { code: 'no-maximum', message: `The ${name} has no maximum inside the measured moistures.` } }, at]
}

/**
 * The spline through laboratory points, sampled evenly for drawing.
 * @param points two or more with distinct moistures, in any order
 * @param n number of samples, 2 or more
 * @returns n points from the driest to the wettest; none where there are fewer than two points
 */
export function sampleCurve(points: readonly LabPoint[], n: number): LabPoint[] {
  const sorted = toCurvePoints(points)
  const [first, last] = [sorted[0], sorted.at(-1)]
  if (!first || !last || last.x <= first.x || n < 2) return []
  const spline = fitNaturalCubicSpline(sorted)
  return Array.from({ length: n }, (_, i) => {
    // The last sample is the last point itself, not a sum that may fall a hair outside it.
    const moisture = i === n - 1 ? last.x : first.x + ((last.x - first.x) * i) / (n - 1)
    return { moisture, dryDensity: splineAt(spline, moisture) ?? last.y }
  })
}
