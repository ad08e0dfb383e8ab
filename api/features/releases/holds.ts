import type { PlanZone, SitePlan } from '#api/features/ground/site-plan.ts'

/** True when a release of these cells at this lift waits for the owner's acceptance. */
export function isHoldPoint(plan: SitePlan, zone: PlanZone, lift: number, cells: readonly number[]): boolean {
  const { holds } = zone
  if (lift === 0) return holds.foundation
  if (holds.everyLift) return true
  return cells.some((cell) => {
    const layers = plan.layersOf(cell)
    return (holds.firstLift && layers[0]?.lift === lift) || (holds.finalGrade && layers.at(-1)?.lift === lift)
  })
}
