import { NO_VALUE } from '#shared/units/format.ts'
import type { GroundCut, GroundTotals } from '#shared/ground-codec.ts'
import type { Site, Zone } from '#shared/schemas/site.ts'
import { convertArea } from '#shared/units/area.ts'
import { convertVolume } from '#shared/units/volume.ts'
import type { Units } from '#web/lib/units.ts'

export interface TitleFact {
  readonly key: string
  readonly label: string
  readonly value: string
  /** what the value is of */
  readonly of?: string
  readonly bad?: boolean
  /** comes first on a narrow screen */
  readonly essential: boolean
}

type Rule = Zone['specification']['frequency'][number]

/** "1 / 500" and "cy, each lot". */
export function frequencyWords(rule: Rule, units: Units): { value: string; of: string } {
  const us = units.system === 'us'
  switch (rule.kind) {
    case 'volume':
      return { value: `1 / ${units.number(convertVolume(rule.perCm3, 'cm3', us ? 'yd3' : 'm3'))}`, of: `${units.marks.volume}, each lot` }
    case 'area':
      return { value: `1 / ${units.number(convertArea(rule.perMm2, 'mm2', us ? 'ft2' : 'm2'))}`, of: `${units.marks.area}, each lot` }
    case 'per-lot':
      return { value: String(rule.atLeast), of: 'each lot' }
    case 'per-lift-day':
      return { value: String(rule.atLeast), of: 'each lift and day' }
  }
}

function frequencyFact(zones: readonly Zone[], chosen: Zone | undefined, units: Units): TitleFact {
  const fact = { key: 'frequency', label: 'Frequency', essential: false }
  const zone = chosen ?? zones[0]
  const rules = zone?.specification.frequency ?? []
  const rule = rules.find((each) => each.kind === 'volume') ?? rules[0]
  if (rule === undefined) return { ...fact, value: NO_VALUE }
  const texts = new Set(zones.map((each) => JSON.stringify(each.specification.frequency)))
  if (chosen === undefined && texts.size > 1) return { ...fact, value: 'By zone' }
  const words = frequencyWords(rule, units)
  const more = rules.length - 1
  return { ...fact, value: words.value, of: more > 0 ? `${words.of}, and ${more === 1 ? '1 rule' : `${more} rules`} more` : words.of }
}

/** Rounded down, so that "100.0 %" is said only when every cubic yard is spoken for. */
function spokenShare({ spokenForCm3, placedCm3 }: GroundTotals): number | null {
  return placedCm3 > 0 ? Math.floor((spokenForCm3 / placedCm3) * 1000 + 1e-9) / 10 : null
}

type TitleInput = {
  readonly site: Pick<Site, 'zones' | 'verticalDatum'>
  readonly units: Units
  readonly cut: GroundCut
  readonly lift: number | undefined
  readonly chosen: Zone | undefined
  readonly totals: GroundTotals | undefined
}

/** The title block: what the sheet shows and how the whole site stands. Figures are the server's. */
export function titleFacts({ site, units, cut, lift, chosen, totals }: TitleInput): TitleFact[] {
  const spoken = totals === undefined ? null : spokenShare(totals)
  return [
    cut.kind === 'surface'
      ? { key: 'showing', label: 'Showing', value: 'Working surface', essential: true }
      : { key: 'showing', label: 'Showing', value: lift === undefined ? 'Cut' : `Lift ${lift}`, of: `cut at ${units.elevation(cut.um)}`, essential: true },
    { key: 'today', label: 'Placed today', value: totals === undefined ? NO_VALUE : units.volumeNumber(totals.placedTodayCm3), of: `${units.marks.volume} compacted`, essential: true },
    frequencyFact(site.zones, chosen, units),
    { key: 'tests', label: 'Tests, all lifts', value: totals === undefined ? NO_VALUE : units.number(totals.testsTaken), of: `of ${totals === undefined ? NO_VALUE : units.number(totals.testsRequired)} required`, essential: true },
    { key: 'spoken', label: 'Volume spoken for', value: spoken === null ? NO_VALUE : units.percent(spoken), essential: false },
    { key: 'rework', label: 'In rework', value: totals === undefined ? NO_VALUE : units.number(totals.cellsInRework), of: totals?.cellsInRework === 1 ? 'cell' : 'cells', bad: (totals?.cellsInRework ?? 0) > 0, essential: true },
    { key: 'datum', label: 'Datum', value: '', of: [site.verticalDatum, units.marks.elevation].filter((part) => part !== '').join(', '), essential: false },
  ]
}
