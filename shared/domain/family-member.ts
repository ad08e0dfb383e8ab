import type { LabPoint } from '#shared/domain/curve-points.ts'
import { fitNaturalCubicSpline, splineAt, splineSummits } from '#shared/domain/natural-cubic-spline.ts'
import type { MaximumPair } from '#shared/domain/reference-curve.ts'

/** A curve of a family: its points (percent, kg/m³) and the approved pair. */
export interface FamilyMember {
  readonly id: string
  readonly code: string
  readonly method: string
  readonly procedure: string
  readonly points: readonly LabPoint[]
  readonly pair: MaximumPair
  readonly gs: number
}

export interface MemberShape extends Pick<FamilyMember, 'id' | 'code' | 'pair'> {
  /** moistures measured, percent */
  readonly from: number
  readonly to: number
  /** dry density, kg/m³, at a moisture; undefined outside what was measured */
  readonly densityAt: (moisture: number) => number | undefined
  readonly drawn: readonly LabPoint[]
}

const SAMPLES = 61

/**
 * A member's curve as a laboratory draws it (the spline of reference-curve.ts), moved so that its summit is the approved pair:
 * the pair is reported to 0.1 or is the laboratory's own, and a point on the peak must give exactly that pair.
 * A curve of fewer than two points has its peak alone.
 */
export function shapeOf({ id, code, pair, points }: FamilyMember): MemberShape {
  const sorted = points.map((p) => ({ x: p.moisture, y: p.dryDensity })).sort((a, b) => a.x - b.x)
  const distinct = sorted.filter((point, i) => i === 0 || point.x > (sorted[i - 1]?.x ?? 0))
  const [first, last] = [distinct[0], distinct.at(-1)]
  if (!first || !last || distinct.length < 2) {
    const { optimumMoisture, maxDryDensity } = pair
    return { id, code, pair, from: optimumMoisture, to: optimumMoisture, densityAt: (w) => (w === optimumMoisture ? maxDryDensity : undefined), drawn: [{ moisture: optimumMoisture, dryDensity: maxDryDensity }] }
  }
  const spline = fitNaturalCubicSpline(distinct)
  const [top] = splineSummits(spline).sort((a, b) => b.y - a.y)
  const shift = top ? { x: pair.optimumMoisture - top.x, y: pair.maxDryDensity - top.y } : { x: 0, y: 0 }
  const [from, to] = [first.x + shift.x, last.x + shift.x]
  const densityAt = (moisture: number) => {
    // the shift may put an end a hair beside itself
    const at = Math.min(Math.max(moisture - shift.x, first.x), last.x)
    if (Math.abs(at - (moisture - shift.x)) > 1e-9) return undefined
    const density = splineAt(spline, at)
    return density === undefined ? undefined : density + shift.y
  }
  const drawn = Array.from({ length: SAMPLES }, (_, i) => {
    const moisture = from + ((to - from) * i) / (SAMPLES - 1)
    return { moisture, dryDensity: densityAt(moisture) ?? last.y + shift.y }
  })
  return { id, code, pair, from, to, densityAt, drawn }
}
