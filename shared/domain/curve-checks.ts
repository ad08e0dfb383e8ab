import type { LabPoint } from '#shared/domain/curve-points.ts'
import type { CurvePoint } from '#shared/domain/natural-cubic-spline.ts'
import { saturation, zeroAirVoidsDensity } from '#shared/domain/phase-relations.ts'
import type { Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'
import { convertDensity } from '#shared/units/density.ts'

/** Densities that no soil or rock fill has, kg/m³: outside these a mass, a volume or a unit is wrong. */
export const LEAST_DENSITY = 400
export const GREATEST_DENSITY = 3500

const MIN_POINTS = 4
const WIDEST_SPACING = 3
const LOW_PEAK_SATURATION = 75
const HIGH_PEAK_SATURATION = 95
const FITS_DIFFER = 0.5

/**
 * Why a set of laboratory points makes no reference curve, before any fitting.
 * @param points percent and kg/m³
 * @param waterDensity kg/m³
 * @returns the first reason, or null
 */
export function curveRefusal(
  points: readonly LabPoint[],
  gs: number,
  waterDensity: number,
  gsMeasured: boolean,
): Reason | null {
  if (!(gs >= 1.5 && gs <= 6)) return { code: 'gs-range', message: 'The specific gravity of the solids must lie between 1.5 and 6.' }
  if (!(waterDensity >= 900 && waterDensity <= 1100)) {
    return { code: 'water-density', message: 'The density of water must lie between 900 and 1,100 kg/m³.' }
  }
  if (points.length < MIN_POINTS) {
    return { code: 'too-few-points', message: `A curve needs at least ${MIN_POINTS} points; there are ${points.length}.` }
  }
  for (const [i, point] of points.entries()) {
    const reason = pointRefusal(point, i + 1)
    if (reason) return reason
  }
  const moistures = new Set(points.map((p) => settle(p.moisture)))
  if (moistures.size < points.length) {
    return { code: 'moistures-not-distinct', message: 'Two points have the same moisture. Average them or leave one out.' }
  }
  const index = points.findIndex((p) => settle(p.dryDensity) > settle(zeroAirVoidsDensity(p.moisture, gs, waterDensity)))
  if (index >= 0) {
    const blame = gsMeasured ? 'Check its masses and moisture.' : `Check its masses and moisture, and the assumed Gs of ${gs}.`
    return { code: 'above-zero-air-voids', message: `Point ${index + 1} lies above the zero-air-voids line. ${blame}` }
  }
  return null
}

function pointRefusal({ moisture, dryDensity }: LabPoint, number: number): Reason | null {
  if (!(moisture >= 0 && moisture <= 500)) {
    return { code: 'bad-point', message: `Point ${number}: moisture must be a percentage from 0 to 500.` }
  }
  if (!(dryDensity >= LEAST_DENSITY && dryDensity <= GREATEST_DENSITY)) {
    return { code: 'bad-point', message: `Point ${number}: no soil has this dry density. Check the masses, the volume and the unit.` }
  }
  return null
}

/**
 * What is worth knowing before a fitted curve is confirmed.
 * @param facts.points in order of moisture; pair in kg/m³ and percent
 */
export function curveWarnings(facts: {
  readonly points: readonly CurvePoint[]
  readonly pair: { readonly maxDryDensity: number; readonly optimumMoisture: number }
  readonly gs: number
  readonly waterDensity: number
  readonly differencePcf: number
  readonly differenceMoisture: number
  readonly summits: number
}): { warnings: Reason[]; peakSaturation: number | null } {
  const { points, pair } = facts
  const warnings: Reason[] = []
  const warn = (code: string, message: string) => warnings.push({ code, message })

  if (points.filter((p) => p.x < pair.optimumMoisture).length < 2) {
    warn('few-points-dry', 'Fewer than two points lie on the dry side of the peak.')
  }
  if (points.filter((p) => p.x > pair.optimumMoisture).length < 2) {
    warn('few-points-wet', 'Fewer than two points lie on the wet side of the peak.')
  }
  const gap = Math.max(...points.slice(1).map((p, i) => p.x - (points[i]?.x ?? p.x)))
  if (settle(gap) > WIDEST_SPACING) warn('wide-spacing', `Two neighbouring points are ${gap.toFixed(1)} % apart; ${WIDEST_SPACING} % is the most advised.`)

  const peak = saturation(pair.maxDryDensity, pair.optimumMoisture, facts.gs, facts.waterDensity)
  if (!peak.ok) warn('peak-saturation', peak.reason.message)
  else if (peak.value < LOW_PEAK_SATURATION || peak.value > HIGH_PEAK_SATURATION) {
    warn('peak-saturation', `The peak is ${peak.value.toFixed(0)} % saturated; ${LOW_PEAK_SATURATION} to ${HIGH_PEAK_SATURATION} % is usual. Check Gs and the points.`)
  }
  if (facts.differencePcf > FITS_DIFFER || facts.differenceMoisture > FITS_DIFFER) {
    warn('fits-differ', `The fits differ by up to ${facts.differencePcf.toFixed(1)} pcf and ${facts.differenceMoisture.toFixed(1)} % moisture. Look at the points before confirming.`)
  }
  if (facts.summits > 1) warn('several-summits', 'The curve has more than one summit: one point is likely wrong.')
  const above = Math.max(...points.map((p) => p.y)) - pair.maxDryDensity
  if (settle(above) > 0) {
    warn('point-above-maximum', `A measured point stands ${convertDensity(above, 'kg/m3', 'pcf').toFixed(1)} pcf above the curve's maximum.`)
  }
  return { warnings, peakSaturation: peak.ok ? peak.value : null }
}
