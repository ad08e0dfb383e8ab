import type { GroundState } from '#shared/domain/ground-state.ts'
import { railBands } from '#shared/domain/lift-schedule.ts'
import type { GroundCut } from '#shared/ground-codec.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import type { Board } from '#shared/schemas/ground.ts'
import type { Zone } from '#shared/schemas/site.ts'
import type { LiftShare } from '#web/components/drawing/lift-bar.tsx'

export interface RailBand {
  readonly lift: number
  readonly bottomUm: number
  readonly topUm: number
  /** where the sheet is cut when the band is picked */
  readonly middleUm: number
  readonly shares: readonly LiftShare[]
  /** the shares in words: "54 % awaiting test, 46 % not placed" */
  readonly words: string
}

/** One ruler of the rail: of every zone where all are cut alike, else of one zone. */
export interface RailScale {
  readonly key: string
  readonly name: string
  readonly zoneIds: readonly string[]
  /** from the top down */
  readonly bands: readonly RailBand[]
}

type LiftTotals = Board['lifts']

/** Blocks read from the settled to the open, as in a title block: released first, not placed last. */
const ORDER: readonly GroundState[] = ['released', 'accepted-as-is', 'recheck', 'meets-spec', 'awaiting-test', 'awaiting-retest', 'rework', 'suspect', 'not-placed']

function sharesOf(lift: number, zoneIds: readonly string[], totals: LiftTotals): LiftShare[] {
  const cells = new Map<GroundState, number>()
  for (const total of totals) {
    if (total.lift !== lift || !zoneIds.includes(total.zoneId)) continue
    for (const entry of total.states) cells.set(entry.state, (cells.get(entry.state) ?? 0) + entry.cells)
  }
  const all = [...cells.values()].reduce((sum, count) => sum + count, 0)
  if (all === 0) return []
  return ORDER.flatMap((state) => {
    const count = cells.get(state) ?? 0
    return count === 0 ? [] : [{ state, share: count / all }]
  })
}

function wordsOf(shares: readonly LiftShare[]): string {
  if (shares.length === 0) return 'no fill planned in these cells'
  const percent = (share: number): string => (share > 0 && share < 0.01 ? 'under 1 %' : `${Math.round(share * 100)} %`)
  return shares.map(({ state, share }) => `${percent(share)} ${stateLook(state).word.toLowerCase()}`).join(', ')
}

/** True when one ruler stands for every zone: level lifts of one thickness from one datum. */
function cutAlike(zones: readonly Zone[]): boolean {
  const plans = zones.map((zone) => zone.liftPlan)
  const first = plans[0]
  if (first?.kind !== 'level') return zones.length < 2
  return plans.every((plan) => plan.kind === 'level' && plan.datumUm === first.datumUm && plan.thicknessUm === first.thicknessUm)
}

function scaleOf(zones: readonly Zone[], name: string, totals: LiftTotals): RailScale {
  const zoneIds = zones.map((zone) => zone.id)
  const plan = zones[0]?.liftPlan
  const bottom = Math.min(...zones.map((zone) => zone.minBaseUm))
  const top = Math.max(...zones.map((zone) => zone.maxDesignUm))
  const planned = plan === undefined || !(top > bottom) ? [] : railBands(plan, bottom, top)
  const bands = planned
    .map((layer): RailBand => {
      const shares = sharesOf(layer.lift, zoneIds, totals)
      return { ...layer, middleUm: Math.round((layer.bottomUm + layer.topUm) / 2), shares, words: wordsOf(shares) }
    })
    // a thin band that joined its neighbour in every cell holds none and is no lift to look at
    .filter((band) => totals.length === 0 || band.shares.length > 0)
    .reverse()
  return { key: zoneIds.join(' '), name, zoneIds, bands }
}

/** The rulers of the lift rail: one for all zones, or one a zone. */
export function railScales(zones: readonly Zone[], totals: LiftTotals): RailScale[] {
  if (zones.length === 0) return []
  if (cutAlike(zones)) return [scaleOf(zones, zones.length === 1 ? (zones[0]?.name ?? '') : 'All zones', totals)]
  return zones.map((zone) => scaleOf([zone], zone.name, totals))
}

/** The band a cut goes through, undefined on the working surface and outside the ruler. */
export function bandAt(scale: RailScale | undefined, cut: GroundCut): RailBand | undefined {
  if (cut.kind === 'surface') return undefined
  return scale?.bands.find((band) => cut.um > band.bottomUm && cut.um <= band.topUm)
}

/** One band up (+1) or down (−1) from a cut. From the surface down is the highest band; up from it is the surface. */
export function stepCut(scale: RailScale | undefined, cut: GroundCut, step: 1 | -1): GroundCut {
  const bands = scale?.bands ?? []
  const surface: GroundCut = { kind: 'surface' }
  const at = (index: number): GroundCut => {
    const band = bands[index]
    return band === undefined ? surface : { kind: 'elevation', um: band.middleUm }
  }
  if (cut.kind === 'surface') return step === -1 ? at(0) : surface
  const inside = bandAt(scale, cut)
  const nearest = inside === undefined ? bands.findIndex((band) => band.middleUm <= cut.um) : bands.indexOf(inside)
  const index = nearest === -1 ? bands.length - 1 : nearest
  if (step === 1) return index === 0 ? surface : at(index - 1)
  return at(Math.min(index + 1, bands.length - 1))
}

