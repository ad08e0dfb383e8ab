import { conflict } from '#api/errors.ts'
import { changeGround } from '#api/features/ground/change-ground.ts'
import { loadSitePlan } from '#api/features/ground/site-plan.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { loadLotsOfCells } from '#api/features/lots/lots-of-cells.queries.ts'
import { applyEffects } from '#api/features/rejudge/apply-effects.ts'
import type { Applied } from '#api/features/rejudge/apply-effects.ts'
import { loadCurvePair } from '#api/features/rejudge/curve-pair.ts'
import type { CurvePair } from '#api/features/rejudge/curve-pair.ts'
import { movesSince, readStates, revokedReleases, revokedBy } from '#api/features/rejudge/ground-moves.ts'
import { keepVerdicts } from '#api/features/rejudge/keep-verdicts.ts'
import { isReplanned, planRejudging } from '#api/features/rejudge/plan-rejudging.ts'
import type { Replanned } from '#api/features/rejudge/plan-rejudging.ts'
import { briefOf } from '#api/features/rejudge/rejudging.queries.ts'
import { authorizeRejudging } from '#api/features/rejudge/rejudge-rights.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { retireIdleStakes } from '#api/features/stakes/retire-stakes.ts'
import { refuseIf } from '#api/http/refuse-input.ts'
import type { Rejudge, RejudgeAnswer, Rehearse } from '#shared/schemas/rejudge.ts'

/**
 * Judges chosen tests of a superseded curve again by its successor, with a reason. The new verdict is frozen and in force,
 * the old one kept; marks and orders follow rejudgeEffect, releases whose basis is lost are revoked by the engine.
 */
export async function rejudgeTests(write: SiteWrite, curveId: string, input: Rejudge): Promise<RejudgeAnswer> {
  const pair = await loadCurvePair(write, curveId, input.by)
  if (pair.from.status !== 'superseded') throw conflict(`Curve ${pair.from.code} is in force, so its verdicts stand. Supersede it first; nothing was changed.`)
  return judgeChosen(write, pair, input, input.reason)
}

/** The same by a curve that has not taken the other's place yet: only for a rehearsal, which is taken back. */
export async function rehearseRejudging(write: SiteWrite, curveId: string, input: Rehearse): Promise<RejudgeAnswer> {
  return judgeChosen(write, await loadCurvePair(write, curveId, input.by), input, 'Rehearsal')
}

async function judgeChosen(write: SiteWrite, pair: CurvePair, { tests }: Pick<Rejudge, 'tests'>, reason: string): Promise<RejudgeAnswer> {
  const plan = await loadSitePlan(write.manager, write.siteId)
  const planned = await loadChosen(write, pair, [...new Set(tests)])
  const lifts = [...new Set(planned.map(({ test }) => test.lift))]
  const before = await readStates(write, lifts)
  const versions = await keepVerdicts(write, planned, pair, reason)
  const applied = await applyEffects(write, plan, planned, versions, `was judged again by ${pair.by.code}`)
  for (const one of applied) tell(write, plan, pair, one, reason)
  write.changed('curve', pair.from.id)

  const change = await changeGround(write, plan, { lots: await touchedLots(write, applied), from: placeOf(applied) })
  await retireIdleStakes(write, change.lots.values())
  const releases = await revokedReleases(write)
  return {
    revision: write.revision,
    tests: applied.map(({ planned: { test, change: kind, effect }, marks, order }) => ({
      id: test.id,
      number: test.number,
      change: kind,
      effect,
      marked: marks.reduce((sum, mark) => sum + mark.cells.length, 0),
      revoked: revokedBy(releases, test, marks),
      orderId: order?.id ?? null,
      orderNumber: order?.number ?? null,
    })),
    moves: await movesSince(write, lifts, before),
    releases: releases.map(({ number, lift, cells }) => ({ number, lift, cells: cells.map((cell) => cell.cell) })),
  }
}

/** The chosen tests as they will be judged; anything that cannot be done refuses the whole, with the test's number. */
async function loadChosen(write: SiteWrite, { from, by }: CurvePair, ids: readonly string[]): Promise<Replanned[]> {
  const planned = await planRejudging(write, from, by, ids)
  if (planned.length < ids.length) {
    throw conflict(`Of ${ids.length} chosen tests, ${ids.length - planned.length} are not judged by ${from.code} any more, or void. Look at the table again; nothing was changed.`)
  }
  authorizeRejudging(write.role, planned.map(({ test }) => test))
  refuseIf(planned.flatMap((one) => (isReplanned(one) ? [] : [{ path: 'body.tests', message: `${one.test.number} cannot be judged by ${by.code}. ${one.refusal}` }])))
  return planned.filter(isReplanned)
}

function tell(write: SiteWrite, plan: SitePlan, { from, by }: CurvePair, { planned, marks, order, version }: Applied, reason: string): void {
  const { test, verdict, effect } = planned
  write.record('test.rejudged', { type: 'test', id: test.id }, {
    number: test.number,
    reason,
    version,
    from: from.code,
    by: by.code,
    byCurveId: by.id,
    before: briefOf(test),
    after: briefOf(verdict),
    effect,
    ...(effect.marks === 'make' ? { marks: marks.map(({ kind, cells }) => ({ kind, cells: cells.map((cell) => plan.label(cell)) })) } : {}),
    orderNumber: order?.number ?? null,
  })
  write.changed('test', test.id)
}

async function touchedLots({ manager, siteId }: SiteWrite, applied: readonly Applied[]): Promise<string[]> {
  const byLift = new Map<number, Set<number>>()
  for (const { planned, touched } of applied) {
    const { test, change } = planned
    // a verdict that moves only its figures leaves the ground as it is
    if (change === 'figures') continue
    const cells = byLift.get(test.lift) ?? new Set()
    byLift.set(test.lift, cells)
    for (const cell of [test.cell, ...touched]) cells.add(cell)
  }
  const lots = new Set<string>()
  for (const [lift, cells] of byLift) for (const lot of await loadLotsOfCells(manager, siteId, lift, [...cells])) lots.add(lot)
  return [...lots]
}

/** Boards ink in from the place of a single test; several have no one place. */
function placeOf(applied: readonly Applied[]) {
  const [only, ...others] = applied
  return only && others.length === 0 ? { easting: only.planned.test.easting, northing: only.planned.test.northing } : null
}
