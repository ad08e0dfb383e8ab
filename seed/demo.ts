import { startOfMinute } from 'date-fns'
import type { Deps } from '#api/deps.ts'
import { approveCurve, createCurve } from '#api/features/lab/curves.service.ts'
import { createMaterial } from '#api/features/lab/materials.service.ts'
import { setMember } from '#api/features/members/members.service.ts'
import { createSite } from '#api/features/sites/create-site.service.ts'
import { writeToSite } from '#api/features/site-head/write-to-site.ts'
import { silentPublisher } from '#api/realtime/publish.ts'
import { zeroAirVoidsDensity } from '#shared/domain/phase-relations.ts'
import { looseToCompactedFactor } from '#shared/domain/volume-state.ts'
import type { CreateMaterial } from '#shared/schemas/lab.ts'
import type { CreateSite } from '#shared/schemas/site.ts'
import { convertDensity } from '#shared/units/density.ts'
import { Apparatus } from '#seed/demo/demo-apparatus.ts'
import { createCalendar } from '#seed/demo/demo-calendar.ts'
import { Crew } from '#seed/demo/demo-crew.ts'
import { GaugeLog } from '#seed/demo/demo-gauges.ts'
import { attachDemoFiles } from '#seed/demo/demo-files.ts'
import { demoShifts } from '#seed/demo/demo-panels.ts'
import type { Shift } from '#seed/demo/demo-panels.ts'
import { createPeople, DEMO_PEOPLE } from '#seed/demo/demo-people.ts'
import type { DemoIds } from '#seed/demo/demo-people.ts'
import { createChance } from '#seed/demo/demo-random.ts'
import type { Chance } from '#seed/demo/demo-random.ts'
import { checkFamily, recordDraft, recordFamily } from '#seed/demo/demo-family.ts'
import { demoCurve, demoMaterials, demoSiteInput, emptySiteInput } from '#seed/demo/demo-site.ts'
import { playToday } from '#seed/demo/demo-today.ts'
import { Foreman } from '#seed/demo/demo-work.ts'
import type { Fill } from '#seed/demo/demo-work.ts'

/** Six weeks of six days. */
const DAYS = 36
const FIRST_SHIFT = 7.5
const SECOND_SHIFT = 8

interface Stage {
  readonly deps: Deps
  readonly people: DemoIds
  readonly chance: Chance
}

const RIDGE = { code: 'RB-3', gs: 2.68, method: 'D698', procedure: 'A', pcf: [[8.6, 110.9], [10.4, 115.5], [12.4, 117.6], [14.5, 115.3], [16.6, 109.4]] } as const
const PIT_RUN = { code: 'PR-1', gs: 2.66, method: 'D698', procedure: 'C', pcf: [[5, 121.2], [7, 125.9], [8.8, 127.6], [10.6, 125.8], [12.4, 121]], coarse: { bulkGravity: 2.63, moisture: 1.4 } } as const

/**
 * Makes the demo: five people, the site Alder Flats yard with six weeks of work that ends now, and an empty second site.
 * Everything is done through the services a click would call; the same clock gives the same figures.
 */
export async function seedDemo(server: Deps): Promise<void> {
  // to the whole minute, so that a start takes no part in it
  const now = startOfMinute(server.clock())
  let clock = now
  const deps = { ...server, clock: () => clock, publisher: silentPublisher }
  const chance = createChance('Alder Flats yard')
  const input = demoSiteInput(chance)
  const calendar = createCalendar(now, input.timeZone, DAYS)
  const [firstDay] = calendar.days
  if (!firstDay) throw new Error('The demo has no days')
  clock = firstDay.at(6)
  const people = await createPeople(server.dataSource.manager, chance, clock)
  const stage = { deps, people, chance }
  const fills = await openSite(stage, input, clock)
  await recordFamily({ deps, people, siteId: input.id }, fills.ridge.materialId, clock)
  await openSite(stage, emptySiteInput(chance), clock)

  const crew = new Crew({ deps, siteId: input.id, people, chance, setClock: (at) => (clock = at) })
  const gauges = new GaugeLog({ deps, siteId: input.id, people, setClock: (at) => (clock = at) })
  await gauges.open(firstDay)
  const apparatus = new Apparatus({ deps, siteId: input.id, people, setClock: (at) => (clock = at) })
  await apparatus.open(firstDay)
  const plan = await crew.plan()
  const { pad, court, panels, ...today } = demoShifts(plan)
  for (const panel of panels) await crew.prepareFoundation(plan, plan.zones[panel.zone]?.id ?? '', panel.cells, firstDay.at(6.2))
  const fillOf = (shift: Shift): Fill => (shift.panel.zone === 1 && shift.lift < 7 ? fills.pitRun : fills.ridge)
  const foreman = new Foreman({ plan, crew, chance, fillOf, gauges, apparatus })
  const carried = await playDays({ foreman, gauges }, calendar.days, pad, court)
  await gauges.today(calendar.today, calendar.days.length)
  await playToday({ foreman, crew, plan, fillOf, day: calendar.today, carried, shifts: today })
  clock = now
  await checkFamily({ deps, people, siteId: input.id }, fills.ridge.curveId, now)
  await recordDraft({ deps, people, siteId: input.id }, fills.pitRun.materialId, now)
  await gauges.correct(calendar.today, fills.ridge.materialId)
  clock = now
  await attachDemoFiles({ deps, siteId: input.id, people })
}

type Failures = Awaited<ReturnType<Foreman['shift']>>

/** Spreads each crew's shifts over the days; every failure is put right the next morning, the last day's are carried over. */
async function playDays({ foreman, gauges }: { foreman: Foreman; gauges: GaugeLog }, days: readonly { at(hour: number): Date }[], pad: readonly Shift[], court: readonly Shift[]): Promise<Failures> {
  let failures: Failures = []
  let [padDone, courtDone] = [0, 0]
  for (const [index, day] of days.entries()) {
    await gauges.countAll(day, index)
    for (const failure of failures) await foreman.rework(failure, day)
    failures = []
    await foreman.catchUp([...pad, ...court], day)
    const until = (shifts: readonly Shift[]) => Math.round((shifts.length * (index + 1)) / days.length)
    while (padDone < until(pad)) failures.push(...(await foreman.shift(at(pad, padDone++), day, FIRST_SHIFT, padDone === pad.length ? 'too-dry' : undefined)))
    while (courtDone < until(court)) failures.push(...(await foreman.shift(at(court, courtDone++), day, SECOND_SHIFT)))
  }
  return failures
}

function at<T>(items: readonly T[], index: number): T {
  const item = items[index]
  if (item === undefined) throw new RangeError(`There is no item ${index}`)
  return item
}

/** A site with all its people, both materials and their approved curves. */
async function openSite({ deps, people, chance }: Stage, input: CreateSite, sampledAt: Date): Promise<{ ridge: Fill; pitRun: Fill }> {
  await createSite(deps, people['qc-lead'], input)
  const lead = { siteId: input.id, userId: people['qc-lead'] }
  for (const { role, email } of DEMO_PEOPLE) {
    if (role !== 'qc-lead') await writeToSite(deps, { ...lead, verb: 'people.manage' }, (write) => setMember(write, { email, role }))
  }
  const materials = demoMaterials(chance)
  const fill = async (material: CreateMaterial, curve: typeof RIDGE | typeof PIT_RUN, { machine, gravel }: Pick<Fill, 'machine' | 'gravel'>): Promise<Fill> => {
    await writeToSite(deps, { ...lead, verb: 'material.record' }, (write) => createMaterial(write, material))
    const { id } = await writeToSite(deps, { ...lead, verb: 'curve.record' }, (write) => createCurve(write, demoCurve(chance, { ...curve, materialId: material.id, sampledAt })))
    const { pair } = await writeToSite(deps, { ...lead, verb: 'curve.approve' }, (write) => approveCurve(write, id, 'spline'))
    if (!pair) throw new Error(`Curve ${curve.code} has no pair`)
    return {
      materialId: material.id,
      looseToCompacted: looseToCompactedFactor(material),
      curveId: id,
      maximum: convertDensity(pair.maxDryDensity, 'kg/m3', 'pcf'),
      optimum: pair.optimumMoisture,
      zeroAirVoids: (moisture) => convertDensity(zeroAirVoidsDensity(moisture, curve.gs), 'kg/m3', 'pcf'),
      machine,
      gravel,
    }
  }
  return { ridge: await fill(materials.ridge, RIDGE, { machine: 'Padfoot roller', gravel: false }), pitRun: await fill(materials.pitRun, PIT_RUN, { machine: 'Smooth drum roller', gravel: true }) }
}
