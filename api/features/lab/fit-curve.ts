import { fitReferenceCurve, sampleCurve } from '#shared/domain/reference-curve.ts'
import type { CurveFit, MaximumPair } from '#shared/domain/reference-curve.ts'
import { roundToPlace, settle } from '#shared/domain/rounding.ts'
import type { CreateCurve, Curve, CurveUse } from '#shared/schemas/lab.ts'
import { convertDensity } from '#shared/units/density.ts'
import type { DensityUnit } from '#shared/units/density.ts'

const SAMPLES = 81

/** The last place a maximum is reported to, in the unit the site shows (D698 reporting: 0.1 pcf, 0.1 %). */
const REPORTED_TO: Readonly<Record<'us' | 'si', { readonly unit: DensityUnit; readonly decimals: number }>> = {
  us: { unit: 'pcf', decimals: 1 },
  si: { unit: 'kN/m3', decimals: 2 },
}

type LabCurve = Pick<CreateCurve, 'points' | 'gs' | 'gsMeasured' | 'reported'>

export interface ChosenPair {
  readonly pair: MaximumPair
  readonly from: CurveUse
}

export function fitCurve({ points, gs, gsMeasured }: LabCurve, waterDensity: number): CurveFit {
  return fitReferenceCurve({ points, gs, gsMeasured, waterDensity })
}

/** A pair as a laboratory reports it: the maximum to 0.1 pcf or 0.01 kN/m³, the optimum to 0.1 %. */
export function roundPair({ maxDryDensity, optimumMoisture }: MaximumPair, unitSystem: 'us' | 'si'): MaximumPair {
  const { unit, decimals } = REPORTED_TO[unitSystem]
  const shown = roundToPlace(settle(convertDensity(maxDryDensity, 'kg/m3', unit)), decimals, 'even')
  return { maxDryDensity: convertDensity(shown, unit, 'kg/m3'), optimumMoisture: roundToPlace(settle(optimumMoisture), 1, 'even') }
}

/** The pair of one of the fits, or the reported one, as it would be used; or why there is none. */
export function pairOf(
  curve: LabCurve,
  use: CurveUse,
  unitSystem: 'us' | 'si',
  waterDensity: number,
): ({ readonly ok: true } & ChosenPair) | { readonly ok: false; readonly reason: string } {
  if (use === 'reported') {
    if (!curve.reported) return { ok: false, reason: 'The laboratory’s own pair was not entered with this curve.' }
    return { ok: true, from: use, pair: roundPair(curve.reported, unitSystem) }
  }
  const fit = fitCurve(curve, waterDensity)
  if (!fit.ok) return { ok: false, reason: fit.reason.message }
  const chosen = use === 'spline' ? { ok: true as const, ...fit.spline } : fit[use]
  if (!chosen.ok) return { ok: false, reason: chosen.reason.message }
  return { ok: true, from: use, pair: roundPair(chosen, unitSystem) }
}

/** The fits of a curve as they are answered: pairs unrounded, the line to draw, what to know before confirming. */
export function presentFit(curve: LabCurve, waterDensity: number): Curve['fit'] {
  const fit = fitCurve(curve, waterDensity)
  const moistures = new Set(curve.points.map((point) => settle(point.moisture)))
  const drawable = moistures.size === curve.points.length
  const drawn = drawable ? sampleCurve(curve.points, SAMPLES).map(({ moisture, dryDensity }): [number, number] => [moisture, dryDensity]) : []
  if (!fit.ok) return { spline: null, quadratic: null, cubic: null, refusal: fit.reason.message, warnings: [], drawn }
  const alternative = ({ quadratic, cubic }: typeof fit, name: 'quadratic' | 'cubic') => {
    const chosen = name === 'quadratic' ? quadratic : cubic
    return chosen.ok ? { maxDryDensity: chosen.maxDryDensity, optimumMoisture: chosen.optimumMoisture } : null
  }
  return {
    spline: fit.spline,
    quadratic: alternative(fit, 'quadratic'),
    cubic: alternative(fit, 'cubic'),
    refusal: null,
    warnings: fit.warnings.map(({ code, message }) => ({ code, message })),
    drawn,
  }
}
