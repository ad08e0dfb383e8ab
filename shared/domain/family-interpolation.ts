import type { LabPoint } from '#shared/domain/curve-points.ts'
import type { MemberShape } from '#shared/domain/family-member.ts'
import type { MaximumPair } from '#shared/domain/reference-curve.ts'

export interface BetweenFit {
  /** the neighbours, denser first */
  readonly members: readonly [string, string]
  readonly pair: MaximumPair
  readonly drawn: readonly LabPoint[]
}

const HALVINGS = 60
const SAMPLES = 41

/**
 * The curve through a point between two neighbours, in character with both (AASHTO T 272: parallel to the nearest curve).
 * Between neighbours A (t = 0) and B (t = 1) the peak runs along the spine, the straight line from peak to peak, and
 * the dry side at a share x of the optimum is the same mixture of theirs at that share: γ(x) = (1 − t)·γA(x·wA) + t·γB(x·wB).
 * At t = 0 and 1 it is the member itself, so that the family is gone through without a step. Only the dry side is used.
 * @param shapes members, densest first, optimums not falling
 * @param point percent, kg/m³
 * @returns the one curve found, or null where the point lies between no two neighbours
 */
export function fitBetween(shapes: readonly MemberShape[], point: LabPoint): BetweenFit | null {
  for (let i = 0; i + 1 < shapes.length; i++) {
    const [denser, lighter] = [shapes[i], shapes[i + 1]]
    if (!denser || !lighter) continue
    const t = shareThrough(denser, lighter, point)
    if (t !== null) return { members: [denser.id, lighter.id], pair: pairAt(denser, lighter, t), drawn: drawnAt(denser, lighter, t) }
  }
  return null
}

function mix(a: number, b: number, t: number): number {
  return a + (b - a) * t
}

function pairAt(a: MemberShape, b: MemberShape, t: number): MaximumPair {
  return {
    maxDryDensity: mix(a.pair.maxDryDensity, b.pair.maxDryDensity, t),
    optimumMoisture: mix(a.pair.optimumMoisture, b.pair.optimumMoisture, t),
  }
}

/** Density of the mixed curve at a share x of its optimum, undefined where a neighbour was not measured. */
function densityAtShare(a: MemberShape, b: MemberShape, t: number, x: number): number | undefined {
  const [low, high] = [a.densityAt(x * a.pair.optimumMoisture), b.densityAt(x * b.pair.optimumMoisture)]
  return low === undefined || high === undefined ? undefined : mix(low, high, t)
}

/** The mixture whose dry side passes through the point, found by halving: at one moisture it falls as t rises. */
function shareThrough(a: MemberShape, b: MemberShape, { moisture, dryDensity }: LabPoint): number | null {
  const rise = b.pair.optimumMoisture - a.pair.optimumMoisture
  // the curve whose peak stands at this moisture: below it the point would be wet of optimum
  const driest = rise > 0 ? Math.min(1, Math.max(0, (moisture - a.pair.optimumMoisture) / rise)) : 0
  const above = (t: number) => {
    const x = moisture / pairAt(a, b, t).optimumMoisture
    // where the peak stands at this moisture, x is 1 but for the last bit
    const density = x > 1 + 1e-9 ? undefined : densityAtShare(a, b, t, Math.min(x, 1))
    return density === undefined ? undefined : density - dryDensity
  }
  // and the one whose dry side was measured just as far down as this moisture
  const measured = Math.max(a.from / a.pair.optimumMoisture, b.from / b.pair.optimumMoisture) * (1 + 1e-12)
  const wettest = rise > 0 ? Math.min(1, (moisture / measured - a.pair.optimumMoisture) / rise) : 1
  if (wettest < driest) return null
  let [low, high] = [driest, wettest]
  const [atLow, atHigh] = [above(low), above(high)]
  if (atLow === undefined || atHigh === undefined || atLow < 0 || atHigh > 0) return null
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2
    const difference = above(middle)
    if (difference === undefined) return null
    if (difference >= 0) low = middle
    else high = middle
  }
  return (low + high) / 2
}

function drawnAt(a: MemberShape, b: MemberShape, t: number): LabPoint[] {
  const { optimumMoisture } = pairAt(a, b, t)
  const from = Math.max(a.from / a.pair.optimumMoisture, b.from / b.pair.optimumMoisture)
  const to = Math.min(a.to / a.pair.optimumMoisture, b.to / b.pair.optimumMoisture)
  return Array.from({ length: SAMPLES }, (_, i) => mix(from, to, i / (SAMPLES - 1))).flatMap((x) => {
    const dryDensity = densityAtShare(a, b, t, x)
    return dryDensity === undefined ? [] : [{ moisture: x * optimumMoisture, dryDensity }]
  })
}
