import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { gridToSite } from '#shared/domain/grid.ts'
import type { Crew } from '#seed/demo/demo-crew.ts'
import type { Day } from '#seed/demo/demo-calendar.ts'
import type { Shift } from '#seed/demo/demo-panels.ts'
import type { Fill, Foreman } from '#seed/demo/demo-work.ts'
import { sandConeSheet } from '#seed/demo/demo-sheets.ts'
import { createChance } from '#seed/demo/demo-random.ts'

interface Today {
  readonly foreman: Foreman
  readonly crew: Crew
  readonly plan: SitePlan
  readonly fillOf: (shift: Shift) => Fill
  readonly day: Day
  readonly carried: Awaited<ReturnType<Foreman['shift']>>
  readonly shifts: { readonly padToday: Shift; readonly courtToday: Shift; readonly basinToday: Shift }
}

/**
 * The day that is under way: yesterday's failure in work, the pad's next lift with a pass, an impossible reading and stakes
 * still to be tested, the court's lift tested and waiting for release, the basin's failing.
 */
export async function playToday({ foreman, crew, plan, fillOf, day, carried, shifts }: Today): Promise<void> {
  const { padToday, courtToday, basinToday } = shifts
  const [waiting, ...done] = carried
  for (const failure of done) await foreman.rework(failure, day)

  const courtLots = await foreman.place(courtToday, day.at(7.2))
  const basinLots = await foreman.place(basinToday, day.at(8.4))
  const padLots = await foreman.place(padToday, day.at(9.5))
  if (waiting) await foreman.startOrder(waiting.orderId, day.at(10))

  for (const lotId of courtLots) {
    for (const [index, stake] of (await crew.draw(lotId, day.at(11))).entries()) await foreman.testAt(courtToday, stake, day.at(11.4 + index * 0.3))
  }
  for (const lotId of basinLots) {
    const [first, second] = await crew.draw(lotId, day.at(12.6))
    if (first) await foreman.testAt(basinToday, first, day.at(13), 'too-dry')
    if (second) await foreman.testAt(basinToday, second, day.at(13.4))
  }
  for (const lotId of padLots) {
    const [first, second] = await crew.draw(lotId, day.at(14))
    if (first) await foreman.testAt(padToday, first, day.at(14.4))
    if (second) await foreman.testAt(padToday, second, day.at(14.9), 'impossible')
  }
  await leaveExceptions(plan, crew, fillOf, courtToday, day)
}

/** Two cells covered before their lift was released, and a verification test beside them. */
async function leaveExceptions(plan: SitePlan, crew: Crew, fillOf: (shift: Shift) => Fill, shift: Shift, day: Day): Promise<void> {
  const zone = plan.zones[shift.panel.zone]
  const cells = shift.panel.cells.slice(-2)
  const lift = shift.lift + 1
  const fill = fillOf({ ...shift, lift })
  if (!zone) return
  await crew.place(plan, { zoneId: zone.id, lift, cells, materialId: fill.materialId, looseToCompacted: fill.looseToCompacted, machine: fill.machine, at: day.at(15.2), coverReason: 'Two loads were dumped past the stake before the release came' })
  const [cell] = shift.panel.cells
  const geometry = plan.cells[cell ?? -1]
  if (!geometry) return
  const sheet = sandConeSheet({ dry: fill.maximum * 0.968, moisture: fill.optimum }, createChance('verification'))
  await crew.test({ zoneId: zone.id, lift: shift.lift, curveId: fill.curveId, place: gridToSite(plan.site.grid, geometry.centroid), at: day.at(15.6), purpose: 'verification', sheet })
}
