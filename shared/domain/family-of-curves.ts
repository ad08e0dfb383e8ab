import type { LabPoint } from '#shared/domain/curve-points.ts'
import { shapeOf } from '#shared/domain/family-member.ts'
import type { FamilyMember, MemberShape } from '#shared/domain/family-member.ts'
import { fitBetween } from '#shared/domain/family-interpolation.ts'
import { zeroAirVoidsDensity } from '#shared/domain/phase-relations.ts'
import type { MaximumPair } from '#shared/domain/reference-curve.ts'
import type { Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'
import { convertDensity } from '#shared/units/density.ts'

export type { FamilyMember } from '#shared/domain/family-member.ts'

/** Fewest curves that make a family (AASHTO R 75). */
export const FAMILY_LEAST = 3
/** The point lies between these shares of the optimum of the curve used, percent (AASHTO T 272). */
export const USABLE_SHARE = { least: 80, most: 100 } as const
/** A point this near to a curve lies on it: 0.5 pcf, in kg/m³. Common practice. */
export const ON_CURVE_KG_M3 = convertDensity(0.5, 'pcf', 'kg/m3')
/** Beyond either the curve in use is said to be off: 2 pcf, in kg/m³, and 1.5 points of moisture. Common practice. */
export const CURVE_OFF_LIMIT = { dryDensity: convertDensity(2, 'pcf', 'kg/m3'), moisture: 1.5 } as const

export interface FamilyInput {
  /** curves of one method and letter */
  readonly members: readonly FamilyMember[]
  /** the one-point: percent of dry mass, kg/m³ dry */
  readonly point: LabPoint
  /** method and letter the point was compacted by */
  readonly compacted: Pick<FamilyMember, 'method' | 'procedure'>
  /** kg/m³ */
  readonly waterDensity: number
}

export type FamilyFit =
  | {
      readonly ok: true
      /** on a member, or between two of them, denser first */
      readonly on: 'curve' | 'between'
      readonly members: readonly string[]
      /** the pair of the curve the point lies on, unrounded where it lies between */
      readonly pair: MaximumPair
      /** moisture of the point, percent of that optimum */
      readonly shareOfOptimum: number
      /** may be used: on the dry side, from 80 to 100 % of the optimum */
      readonly usable: boolean
      /** why it may not, and what to do; null where it may */
      readonly unusable: Reason | null
      readonly warnings: readonly Reason[]
      /** the curve the point lies on, for drawing, as far as the neighbours were measured */
      readonly drawn: readonly LabPoint[]
    }
  | { readonly ok: false; readonly reason: Reason; readonly warnings: readonly Reason[] }

/**
 * Finds where one compacted point lies in a family of curves, and the maximum and optimum that follow (AASHTO T 272; the
 * family as AASHTO R 75 makes it). On a curve, that curve's pair; between two, the peak of the curve drawn through the point
 * in character with them; outside the family nothing is extrapolated.
 * @param input members with their approved pairs; the point in percent and kg/m³
 */
export function fitFamily({ members, point, compacted, waterDensity }: FamilyInput): FamilyFit {
  const refusal = familyRefusal(members, point, compacted, waterDensity)
  if (refusal) return { ok: false, reason: refusal, warnings: [] }
  const shapes = members.map(shapeOf).sort((a, b) => b.pair.maxDryDensity - a.pair.maxDryDensity || a.pair.optimumMoisture - b.pair.optimumMoisture)
  const warnings = familyWarnings(shapes)
  if (shapes.some((shape, i) => i > 0 && shape.pair.optimumMoisture < (shapes[i - 1]?.pair.optimumMoisture ?? 0))) {
    return { ok: false, reason: CROSSING, warnings }
  }
  const onCurve = (shape: MemberShape) => found('curve', [shape.id], shape.pair, point, shape.drawn, warnings)
  const isDry = (shape: MemberShape) => settle(point.moisture) <= settle(shape.pair.optimumMoisture)
  const on = nearestMember(shapes.filter(isDry), point)
  if (on) return onCurve(on)
  const between = fitBetween(shapes, point)
  if (between) return found('between', between.members, between.pair, point, between.drawn, warnings)
  // the wet sides run together and cross the dry sides of lighter curves: they come last, and tell only to go drier
  const wet = nearestMember(shapes.filter((shape) => !isDry(shape)), point)
  if (wet) return onCurve(wet)
  return { ok: false, reason: outside(shapes, point), warnings }
}

const CROSSING: Reason = {
  code: 'family-crosses',
  message: 'These curves are no family: a lighter one has its optimum drier than a denser one. Check their points, or take the odd one out.',
}

const NO_FAMILY: Reason = { code: 'no-family', message: 'No approved curve of this material and method is there to compare with.' }

function familyRefusal(members: readonly FamilyMember[], { moisture, dryDensity }: LabPoint, compacted: FamilyInput['compacted'], waterDensity: number): Reason | null {
  if (members.length === 0) return NO_FAMILY
  const odd = members.find((member) => member.method !== compacted.method || member.procedure !== compacted.procedure)
  if (odd) {
    return { code: 'other-method', message: `${odd.code} is by ${odd.method} ${odd.procedure}, the point by ${compacted.method} ${compacted.procedure}. A family and its points are compacted by one method and letter.` }
  }
  if (!(moisture > 0 && moisture <= 500 && dryDensity > 0)) return { code: 'bad-point', message: 'The point needs a moisture above 0 % and a density above 0.' }
  const gs = Math.max(...members.map((member) => member.gs))
  if (settle(dryDensity) > settle(zeroAirVoidsDensity(moisture, gs, waterDensity))) {
    return { code: 'above-zero-air-voids', message: `The point lies above the zero-air-voids line of Gs ${gs}. Check its masses and moisture.` }
  }
  return null
}

function familyWarnings(shapes: readonly MemberShape[]): Reason[] {
  const warnings: Reason[] = []
  if (shapes.length < FAMILY_LEAST) {
    const has = shapes.length === 1 ? 'one curve' : `${shapes.length} curves`
    warnings.push({ code: 'small-family', message: `A family has at least ${FAMILY_LEAST} curves; this has ${has}.` })
  }
  return warnings
}

/** Of these members the nearest that the point lies on. */
function nearestMember(shapes: readonly MemberShape[], point: LabPoint): MemberShape | null {
  const near = shapes.flatMap((shape) => {
    const density = shape.densityAt(point.moisture)
    return density === undefined ? [] : [{ shape, distance: Math.abs(density - point.dryDensity) }]
  })
  const [best] = near.filter(({ distance }) => settle(distance) <= ON_CURVE_KG_M3).sort((a, b) => a.distance - b.distance)
  return best?.shape ?? null
}

function found(on: 'curve' | 'between', members: readonly string[], pair: MaximumPair, point: LabPoint, drawn: readonly LabPoint[], warnings: readonly Reason[]): FamilyFit {
  const shareOfOptimum = settle((100 * point.moisture) / pair.optimumMoisture)
  const unusable = unusableReason(shareOfOptimum, pair)
  return { ok: true, on, members, pair, shareOfOptimum, usable: unusable === null, unusable, warnings, drawn }
}

function unusableReason(share: number, { optimumMoisture }: MaximumPair): Reason | null {
  const range = `${((USABLE_SHARE.least / 100) * optimumMoisture).toFixed(1)} to ${optimumMoisture.toFixed(1)} %`
  if (share > USABLE_SHARE.most) {
    return { code: 'wet-of-optimum', message: `Wet of optimum: the curves run together there. Mould another specimen drier, at ${range} moisture.` }
  }
  if (share < USABLE_SHARE.least) {
    return { code: 'too-dry', message: `At ${share.toFixed(0)} % of the optimum the point is too dry to tell the curves apart. Mould another specimen wetter, at ${range} moisture.` }
  }
  return null
}

/** In words where a point lies that no curve of the family passes through. */
function outside(shapes: readonly MemberShape[], { moisture, dryDensity }: LabPoint): Reason {
  const [densest, lightest] = [shapes[0], shapes.at(-1)]
  if (!densest || !lightest) return NO_FAMILY
  if (moisture > lightest.pair.optimumMoisture) {
    return { code: 'wet-of-family', message: `Wetter than every optimum of the family. Mould another specimen drier, below ${lightest.pair.optimumMoisture.toFixed(1)} % moisture.` }
  }
  const top = densest.densityAt(moisture)
  const dryOfAll = moisture <= densest.pair.optimumMoisture
  if (dryOfAll && top !== undefined && dryDensity > top) {
    return { code: 'above-family', message: `Denser than ${densest.code}, the densest curve. The family does not reach that far and is not extrapolated: run a full curve of this soil.` }
  }
  if (!dryOfAll && dryDensity > spineAt(shapes, moisture)) {
    return { code: 'above-spine', message: 'Above the line of the peaks: wet of the optimum of its own curve. Mould another specimen drier.' }
  }
  const bottom = lightest.densityAt(moisture)
  if (bottom !== undefined && dryDensity < bottom) {
    return { code: 'below-family', message: `Lighter than ${lightest.code}, the lightest curve. The family does not reach that far and is not extrapolated: run a full curve of this soil.` }
  }
  return { code: 'drier-than-measured', message: 'Drier than the curves were measured. Mould another specimen wetter.' }
}

/** Density of the spine, the line from peak to peak, kg/m³; moisture from the first optimum to the last. */
function spineAt(shapes: readonly MemberShape[], moisture: number): number {
  const index = shapes.findIndex((shape) => shape.pair.optimumMoisture >= moisture)
  const [a, b] = [shapes[index - 1]?.pair, shapes[index]?.pair]
  if (!a || !b) return (b ?? a)?.maxDryDensity ?? 0
  const rise = b.optimumMoisture - a.optimumMoisture
  return a.maxDryDensity + ((b.maxDryDensity - a.maxDryDensity) * (moisture - a.optimumMoisture)) / rise
}

export interface CurveOff {
  /** of the curve in use against the pair found, kg/m³ and points; positive where the curve in use is the higher */
  readonly dryDensity: number
  readonly moisture: number
  /** beyond one of the limits of CURVE_OFF_LIMIT */
  readonly off: boolean
}

/** How far the curve in use lies from the pair that a usable point gives. */
export function curveOff(inUse: MaximumPair, fit: FamilyFit): CurveOff | null {
  if (!fit.ok || !fit.usable) return null
  const dryDensity = inUse.maxDryDensity - fit.pair.maxDryDensity
  const moisture = inUse.optimumMoisture - fit.pair.optimumMoisture
  const off = settle(Math.abs(dryDensity)) > settle(CURVE_OFF_LIMIT.dryDensity) || settle(Math.abs(moisture)) > CURVE_OFF_LIMIT.moisture
  return { dryDensity, moisture, off }
}
