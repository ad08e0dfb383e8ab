import { scaleLinear, scaleUtc } from 'd3-scale'
import { line } from 'd3-shape'
import type { JudgedCountView } from '#shared/schemas/gauge.ts'

const DAY_MS = 86_400_000
/** a panel reaches at most so many times its limit, so that one slip does not flatten a month */
const FARTHEST = 3
const noon = (day: string): number => Date.parse(`${day}T12:00:00Z`)

export interface DriftPoint {
  readonly id: string
  readonly x: number
  readonly y: number
  readonly kind: 'good' | 'bad' | 'void'
  /** beyond the panel: it stands at the edge, and its value is said */
  readonly beyond: number | null
  /** it counts for its day */
  readonly stands: boolean
}

export type DriftFrame = { readonly left: number; readonly right: number; readonly top: number; readonly bottom: number }
export type DriftOf = 'density' | 'moisture'

/** Days to name, as many as stand side by side without touching. */
function dayTicks(from: number, to: number, width: number): number[] {
  const most = Math.max(2, Math.floor(width / 76))
  const days = Math.max(1, Math.round((to - from) / DAY_MS))
  const step = [1, 2, 4, 7, 14, 28, 56, 112].find((each) => days / each <= most - 1) ?? Math.ceil(days / most)
  return Array.from({ length: Math.floor(days / step) + 1 }, (_, index) => to - index * step * DAY_MS).reverse()
}

/**
 * One panel of the drift chart: each count's deviation from the reference of its day, a line through those that stand, and
 * the limits. Counts without a reference have no place on it.
 */
export function layOutDrift(counts: readonly JudgedCountView[], of: DriftOf, limit: number, frame: DriftFrame) {
  const { left, right, top, bottom } = frame
  const shown = counts.flatMap((count) => {
    const percent = of === 'density' ? count.densityPercent : count.moisturePercent
    return percent === null ? [] : [{ count, percent }]
  })
  const days = shown.map(({ count }) => noon(count.day))
  const [from, to] = [Math.min(...days), Math.max(...days)]
  const x = scaleUtc([from === to ? from - DAY_MS : from, to], [left + 6, right - 6])
  const standing = shown.filter(({ count }) => count.void === null).map(({ percent }) => Math.abs(percent) * 1.12)
  const reach = Math.min(limit * FARTHEST, Math.max(limit * 1.7, ...standing))
  const y = scaleLinear([-reach, reach], [bottom, top])
  const points = shown.map(({ count, percent }): DriftPoint => {
    const good = of === 'density' ? count.densityGood : count.moistureGood
    return { id: count.id, x: x(noon(count.day)), y: y(Math.max(-reach, Math.min(percent, reach))), kind: count.void !== null ? 'void' : good ? 'good' : 'bad', beyond: Math.abs(percent) > reach ? percent : null, stands: count.stands }
  })
  return {
    points,
    path: line<DriftPoint>((point) => point.x, (point) => point.y)(points.filter((point) => point.stands)) ?? '',
    zero: y(0),
    limits: [limit, -limit].map((value) => ({ value, y: y(value) })),
    days: shown.length === 0 ? [] : dayTicks(from, to, right - left).map((at) => ({ at, x: x(at) })),
    /** where a day lies, null outside the days shown */
    dayAt: (day: string): number | null => (noon(day) < from || noon(day) > to ? null : x(noon(day))),
  }
}
