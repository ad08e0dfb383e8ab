import { describe, expect, it } from 'vitest'
import { buildBoard, buildMaterial, buildNotYet, buildOrder, buildPlacement, buildPlan, buildTwoZoneSite, CELL_LIFT_CM3 } from '#tests/factories/ground-view.ts'
import { buildTotals } from '#tests/factories/site-view.ts'
import { filledShare } from '#web/features/ground/panel/filled-share.ts'
import { firstStep } from '#web/features/ground/panel/first-step.ts'
import { lastLoadCm3, loadsFor } from '#web/features/ground/panel/loads.ts'
import { notYetWords } from '#web/features/ground/panel/not-yet-words.ts'
import { titleFacts } from '#web/features/ground/sheet/title-facts.ts'
import { makeUnits } from '#web/lib/units.ts'

const units = makeUnits('us', 'America/Los_Angeles')
const plan = buildPlan()
const say = (group: Parameters<typeof buildNotYet>[0], order?: ReturnType<typeof buildOrder>) => {
  const { title, detail } = notYetWords(buildNotYet(group), plan, units, order)
  return `${title} | ${detail}`
}

describe('what stands in the way, in words', () => {
  it.each([
    [{ owed: 2, stakes: ['N1', 'N2'] }, 'Waiting for 2 tests | Building pad, lift 2, 2 cells. Go to N1, N2'],
    [{ owed: 1 }, 'Waiting for 1 test | Building pad, lift 2, 2 cells. No stakes drawn'],
    [{ reason: 'suspect', testNumber: 'T-0218', cells: [3] }, 'Result can’t be right, run it again | T-0218 in Building pad, lift 2, 1 cell'],
    [{ reason: 'awaiting-release' }, 'Tests met, waiting for release | Building pad, lift 2, 2 cells'],
    [{ reason: 'awaiting-inspection', lift: 0 }, 'Foundation waits for inspection | Building pad, 2 cells'],
    [{ reason: 'awaiting-retest', orderNumber: 'R-014' }, 'Rework done, R-014 waits for its retest | Building pad, lift 2, 2 cells'],
  ] as const)('%o', (group, words) => {
    expect(say(group as Parameters<typeof buildNotYet>[0])).toBe(words)
  })

  it('gives a rework order its fault, its water and since when it is worked on', () => {
    const group = { reason: 'rework', orderNumber: 'R-014', headline: 'Too dry. Add water.', workingSince: '2026-12-01T21:50:00.000Z' } as const
    expect(say(group, buildOrder())).toBe('Rework R-014, too dry | 2 cells, add 5,680\u2009gal, working since 13:50')
    expect(say(group, buildOrder({ waterLitres: -3_785.411784 }))).toMatch(/dry off 1,000\u2009gal/)
    expect(say({ ...group, workingSince: null, orderState: 'issued' })).toBe('Rework R-014, too dry | 2 cells, not started')
  })
})

describe('loads', () => {
  it('are counted by the last load hauled, as compacted: 20 cy loose are 10 cy', () => {
    const load = lastLoadCm3([buildPlacement({ happenedAt: '2026-11-01T00:00:00.000Z', loadVolumeCm3: 1 }), buildPlacement()], [buildMaterial()])
    expect(loadsFor(CELL_LIFT_CM3 * 100, load)).toBe(617)
  })

  it('are left out where none was counted yet', () => {
    expect(lastLoadCm3([buildPlacement({ loads: 0 })], [buildMaterial()])).toBeNull()
    expect(loadsFor(1e9, null)).toBeNull()
  })
})

describe('the share filled to grade', () => {
  it('is rounded down, so that 100.0 is said only of a full site', () => {
    expect(filledShare(999_999, 1_000_000)).toBe(99.9)
    expect(filledShare(1_000_000, 1_000_000)).toBe(100)
    expect(filledShare(0, 0)).toBe(0)
  })
})

describe('the first step of an empty site', () => {
  const empty = buildBoard({ totals: buildTotals(), ready: [], notYet: [buildNotYet({ reason: 'awaiting-inspection', lift: 0, cells: [0, 1, 2] })] })

  it('is the inspection, by the one who may record it', () => {
    expect(firstStep(empty, plan, 'qc-lead')).toBe('No fill placed yet. Foundation waits for inspection in 3 cells. Record the inspection of the foundation first.')
    expect(firstStep(empty, plan, 'superintendent')).toMatch(/in 3 cells\. The QC lead records its inspection first\.$/)
  })
})

describe('the title block', () => {
  const facts = (input: Partial<Parameters<typeof titleFacts>[0]> = {}) =>
    Object.fromEntries(
      titleFacts({ site: buildTwoZoneSite(), units, cut: { kind: 'surface' }, lift: undefined, chosen: undefined, totals: buildBoard().totals, ...input }).map(({ label, value, of }) => [label, [value, of].filter((part) => part).join(' ')]),
    )

  it('says what is shown and how the site stands', () => {
    expect(facts()).toEqual({
      Showing: 'Working surface',
      'Placed today': '0 cy compacted',
      Frequency: '1 / 500 cy, each lot',
      'Tests, all lifts': '7 of 9 required',
      'Volume spoken for': '99.9\u2009%',
      'In rework': '2 cells',
      Datum: 'NAVD 88, ft',
    })
  })

  it('names the cut by its lift and elevation', () => {
    expect(facts({ cut: { kind: 'elevation', um: 304_800 }, lift: 2 }).Showing).toBe('Lift 2 cut at 1.00\u2009ft')
  })

  it('says "by zone" where zones are tested differently, and the zone’s own once a cell is chosen', () => {
    const site = buildTwoZoneSite()
    const [pad, court] = site.zones
    if (pad === undefined || court === undefined) throw new Error('two zones')
    const loose = { ...court, specification: { ...court.specification, frequency: [{ kind: 'per-lot' as const, atLeast: 3 }] } }
    expect(facts({ site: { ...site, zones: [pad, loose] } }).Frequency).toBe('By zone')
    expect(facts({ site: { ...site, zones: [pad, loose] }, chosen: loose }).Frequency).toBe('3 each lot')
  })

  it('has no share of volume before fill is placed', () => {
    expect(facts({ totals: buildTotals() })['Volume spoken for']).toBe('–')
  })
})
