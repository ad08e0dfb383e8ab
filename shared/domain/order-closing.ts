import { squaredDistance } from './failure-marks.ts'
import type { LotTest } from './lot-facts.ts'
import type { GridPoint } from './site-geometry.ts'
import { ceilRatio } from './whole-ratio.ts'

/**
 * Passes it takes to close a rework order: max(1, ⌈order volume / f⌉) (domain section 7).
 * @param volumeCm3 placed volume of its cells, whole cm³
 * @param fCm3 volume one test may speak for, whole cm³; 0 (nothing placed, or the foundation) asks one
 */
export function passesToClose(volumeCm3: number, fCm3: number): number {
  return fCm3 > 0 ? Math.max(1, ceilRatio(volumeCm3, 1, fCm3)) : 1
}

/**
 * How far an order is from closing: passes of required purpose inside it, sampled after its rework was reported.
 * @param order its cells, and when the rework was last reported (null: not yet, so nothing counts)
 * @param tests current results, one per chain
 * @param volumeOf placed volume of a cell, whole cm³
 */
export function orderProgress(
  order: { readonly cells: readonly number[]; readonly reportedAt: number | null },
  tests: readonly LotTest[],
  volumeOf: (cell: number) => number,
  fCm3: number,
): { volumeCm3: number; needed: number; passed: number; left: number; closes: boolean } {
  const { cells, reportedAt } = order
  const volumeCm3 = cells.reduce((sum, cell) => sum + volumeOf(cell), 0)
  const needed = passesToClose(volumeCm3, fCm3)
  const inside = new Set(cells)
  const current = tests.filter(
    (test) =>
      reportedAt !== null && inside.has(test.cell) && test.sampledAt > reportedAt && test.purpose === 'required' && !test.superseded,
  )
  const passed = current.filter((test) => test.outcome === 'pass').length
  const failed = current.some((test) => test.outcome === 'fail')
  return { volumeCm3, needed, passed, left: Math.max(0, needed - passed), closes: passed >= needed && !failed }
}

export interface BoundableCell {
  readonly cell: number
  readonly centroid: GridPoint
}

/**
 * The cells that may leave an order without rework, and the pass that lets each go: a pass sampled after the failure
 * that lies in the cell, or between it and the failure. Between is taken as inside the circle that has failure
 * and cell centroid as ends of its diameter, that is, where the pass sees the two at a right angle or wider. The
 * failure's own cell never leaves: without rework a second test there proves nothing.
 * @param failure where and when the failing test was sampled
 * @param passes current passes with their cells
 * @returns cells that may leave, in the order given, each with the earliest such pass
 */
export function cellsThatMayLeave(
  failure: { readonly at: GridPoint; readonly cell: number; readonly sampledAt: number },
  cells: readonly BoundableCell[],
  passes: readonly { readonly testId: string; readonly at: GridPoint; readonly cell: number; readonly sampledAt: number }[],
): { cell: number; testId: string }[] {
  const later = passes.filter((pass) => pass.sampledAt > failure.sampledAt).sort((a, b) => a.sampledAt - b.sampledAt)
  return cells.flatMap(({ cell, centroid }) => {
    if (cell === failure.cell) return []
    const pass = later.find((candidate) => candidate.cell === cell || liesBetween(candidate.at, failure.at, centroid))
    return pass === undefined ? [] : [{ cell, testId: pass.testId }]
  })
}

/** Right angle or wider at the point; a point on one of the two ends is not between them. */
function liesBetween(point: GridPoint, a: GridPoint, b: GridPoint): boolean {
  if (squaredDistance(point, a) === 0 || squaredDistance(point, b) === 0) return false
  return (a.u - point.u) * (b.u - point.u) + (a.v - point.v) * (b.v - point.v) <= 0
}
