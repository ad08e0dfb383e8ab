import { mayBeCovered, groundStateOf, hasFlag } from '#shared/domain/ground-state.ts'
import { WHOLE_CELL, placementVolume, type PlacementVolumeResult } from '#shared/domain/placement-volume.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import type { Material } from '#shared/schemas/lab.ts'
import type { CreatePlacement } from '#shared/schemas/placement.ts'
import type { Zone } from '#shared/schemas/site.ts'
import type { GroundPlan } from '#web/features/ground/plan/ground-plan.ts'
import { countOf } from '#web/features/ground/plan/ground-words.ts'
import type { Units } from '#web/lib/units.ts'

/** What is typed, as it is typed. */
export interface PlacementDraft {
  /** null follows the cells: the lift most of them take next */
  readonly lift: number | null
  readonly quarters: number
  readonly materialId: string
  /** datetime-local text on the site's clock */
  readonly happenedAt: string
  readonly loads: string
  readonly loadVolume: string
  readonly looseThickness: string
  readonly machine: string
  readonly passes: string
  readonly remarks: string
}

export type DraftField = 'cells' | 'lift' | 'materialId' | 'happenedAt' | 'loads' | 'loadVolume' | 'looseThickness' | 'passes'

export interface PlacementReading {
  readonly problems: Partial<Record<DraftField, string>>
  readonly zone: Zone | undefined
  readonly lift: number | null
  readonly lifts: readonly number[]
  /** chosen cells that cannot take the lift */
  readonly unfit: readonly number[]
  /** chosen cells whose ground below is not released, as the sheet knows it */
  readonly uncovered: readonly number[]
  readonly volume: PlacementVolumeResult | null
  /** what to send, without its id and reason; null while something is wrong */
  readonly input: Omit<CreatePlacement, 'id' | 'coverReason'> | null
}

/** The lift a cell takes next, by the working surface; a partly placed lift is topped up first. */
export function nextLiftOf(plan: GroundPlan, surface: GroundSheet, cell: number): number | null {
  const at = surface.lift[cell] ?? 0
  const partial = at > 0 && hasFlag(surface.flags[cell] ?? 0, 'partial')
  const lifts = plan.layersOf(cell).map((layer) => layer.lift)
  return lifts.find((lift) => (partial ? lift >= at : lift > at)) ?? null
}

/** The lift most cells take next, the lower one where two are as many; null where none takes any. */
export function defaultLift(plan: GroundPlan, surface: GroundSheet, cells: readonly number[]): number | null {
  const counts = new Map<number, number>()
  for (const cell of cells) {
    const lift = nextLiftOf(plan, surface, cell)
    if (lift !== null) counts.set(lift, (counts.get(lift) ?? 0) + 1)
  }
  const [most] = [...counts].sort(([a, m], [b, n]) => n - m || a - b)
  return most?.[0] ?? null
}

/** Whether fill of a lift would cover ground that is not released, as far as the working surface tells. */
export function coversTooEarly(plan: GroundPlan, surface: GroundSheet, cell: number, lift: number): boolean {
  const at = surface.lift[cell] ?? 0
  const flags = surface.flags[cell] ?? 0
  if (hasFlag(flags, 'doubt')) return true
  if (at >= lift) return false
  if (!mayBeCovered(groundStateOf(surface.state[cell] ?? 0))) return true
  return plan.layersOf(cell).some((layer) => layer.lift > at && layer.lift < lift)
}

function zoneProblem(plan: GroundPlan, cells: readonly number[]): string | undefined {
  const outside = cells.filter((cell) => plan.zoneOf(cell) === undefined)
  if (outside.length > 0) return `${plan.range(outside)} lies outside every zone. Leave it out.`
  const zones = new Set(cells.map((cell) => plan.zoneOf(cell)))
  if (zones.size < 2) return undefined
  const names = [...zones].map((zone) => zone?.name ?? '')
  return `These cells lie in ${names.slice(0, -1).join(', ')} and ${names.at(-1)}. Place one zone at a time.`
}

function liftProblem(plan: GroundPlan, surface: GroundSheet, cells: readonly number[], lift: number): { unfit: number[]; words: string | undefined } {
  const noLayer = cells.filter((cell) => plan.layerOf(cell, lift) === undefined)
  const placed = cells.filter((cell) => surface.lift[cell] === lift && !hasFlag(surface.flags[cell] ?? 0, 'partial'))
  const unfit = [...noLayer, ...placed].sort((a, b) => a - b)
  if (noLayer.length > 0) return { unfit, words: `Lift ${lift} is not planned in ${plan.range(noLayer)}: its fill starts higher or ends lower.` }
  if (placed.length > 0) return { unfit, words: `Lift ${lift} is already placed in ${plan.range(placed)}.` }
  return { unfit, words: undefined }
}

type Whole = { readonly ok: true; readonly value: number | null } | { readonly ok: false; readonly reason: string }

/** A whole number, null where nothing is typed. */
function readWhole(text: string, most: number, units: Units): Whole {
  if (text.trim() === '') return { ok: true, value: null }
  const read = units.parse.number(text)
  if (!read.ok) return read
  return Number.isInteger(read.value) && read.value >= 0 && read.value <= most ? read : { ok: false, reason: `A whole number up to ${units.number(most)}` }
}

type ReadInput = {
  readonly draft: PlacementDraft
  readonly cells: readonly number[]
  readonly plan: GroundPlan
  readonly surface: GroundSheet
  readonly materials: readonly Material[]
  readonly units: Units
}

/** What a draft comes to: the lift, both volumes, what is wrong and what to send. */
export function readPlacement({ draft, cells, plan, surface, materials, units }: ReadInput): PlacementReading {
  const problems: Partial<Record<DraftField, string>> = {}
  const mixed = zoneProblem(plan, cells)
  const zone = mixed === undefined ? plan.zoneOf(cells[0] ?? -1) : undefined
  if (mixed !== undefined) problems.cells = mixed
  const lifts = [...new Set(cells.flatMap((cell) => plan.layersOf(cell).map((layer) => layer.lift)))].sort((a, b) => b - a)
  const lift = draft.lift ?? defaultLift(plan, surface, cells)
  if (cells.length > 0 && mixed === undefined && lift === null) problems.cells = `${countOf(cells.length, 'cell')} at design grade: no lift is left to place.`
  const fit = zone === undefined || lift === null ? { unfit: [], words: undefined } : liftProblem(plan, surface, cells, lift)
  if (fit.words !== undefined) problems.lift = fit.words

  const material = materials.find((each) => each.id === draft.materialId)
  if (material === undefined) problems.materialId = 'Choose the borrow material'
  const happenedAt = units.parse.instant(draft.happenedAt)
  if (happenedAt === null) problems.happenedAt = 'Give a date and time'
  const loads = readWhole(draft.loads, 20_000, units)
  if (!loads.ok) problems.loads = loads.reason
  const passes = readWhole(draft.passes, 200, units)
  if (!passes.ok) problems.passes = passes.reason
  const loose = draft.looseThickness.trim() === '' ? null : units.parse.thicknessUm(draft.looseThickness)
  if (loose !== null && (!loose.ok || loose.value <= 0 || loose.value > 5_000_000)) problems.looseThickness = loose.ok ? 'Above 0 and below 5 m' : loose.reason
  const loadVolume = draft.loadVolume.trim() === '' ? null : units.parse.volumeCm3(draft.loadVolume)
  const loadCount = loads.ok ? (loads.value ?? 0) : 0
  if (loadVolume !== null && (!loadVolume.ok || loadVolume.value < 0 || loadVolume.value > 1e9)) problems.loadVolume = loadVolume.ok ? 'Above 0' : loadVolume.reason
  else if (loadCount > 0 && (loadVolume?.value ?? 0) === 0) problems.loadVolume = 'Give the volume of one load'

  const layered = lift === null ? [] : cells.flatMap((cell) => {
    const layer = plan.layerOf(cell, lift)
    const geometry = plan.cells[cell]
    return layer === undefined || geometry === undefined ? [] : [{ areaMm2: geometry.areaMm2, layer, quarters: cells.length === 1 ? draft.quarters : WHOLE_CELL }]
  })
  const loadVolumeCm3 = loadVolume?.ok === true ? loadVolume.value : 0
  const counted = loadCount > 0 && loadVolumeCm3 > 0 && material !== undefined
  const volume =
    zone === undefined || layered.length === 0
      ? null
      : placementVolume({ cells: layered, loads: counted ? loadCount : undefined, loadVolumeCm3, looseToCompacted: material?.looseToCompacted ?? 1 }, zone.volumeBasis)

  const uncovered = lift === null ? [] : cells.filter((cell) => coversTooEarly(plan, surface, cell, lift))
  const ready = Object.keys(problems).length === 0 && zone !== undefined && lift !== null && happenedAt !== null && cells.length > 0
  const input = ready
    ? {
        zoneId: zone.id,
        lift,
        cells: cells.map((cell) => ({ cell, quarters: cells.length === 1 ? draft.quarters : WHOLE_CELL })),
        materialId: draft.materialId,
        happenedAt,
        loads: loadCount,
        loadVolumeCm3,
        looseThicknessUm: loose?.ok === true ? loose.value : null,
        machine: draft.machine.trim(),
        passes: passes.ok ? passes.value : null,
        remarks: draft.remarks.trim(),
      }
    : null
  return { problems, zone, lift, lifts, unfit: fit.unfit, uncovered, volume, input }
}
