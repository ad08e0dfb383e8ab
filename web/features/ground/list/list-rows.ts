import { GROUND_FLAGS, groundStateOf, hasFlag, type GroundFlag, type GroundState } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { OVERLAY_LOOKS } from '#shared/look/ground-look.ts'
import type { Board } from '#shared/schemas/ground.ts'
import type { Lot } from '#shared/schemas/lot.ts'
import type { TestSummary } from '#shared/schemas/field-test.ts'
import { stateWord } from '#web/features/ground/cell/strip-rows.ts'
import type { GroundPlan } from '#web/features/ground/plan/ground-plan.ts'
import { liftWords } from '#web/features/ground/plan/ground-words.ts'
import { notYetWords } from '#web/features/ground/panel/not-yet-words.ts'
import type { Units } from '#web/lib/units.ts'

/** One cell as the map draws it at a cut, in words. */
export interface ListRow {
  readonly cell: number
  readonly label: string
  readonly zoneId: string
  readonly zone: string
  readonly lift: number
  readonly state: GroundState
  readonly flags: number
  /** "Meets spec, near a limit" */
  readonly stands: string
  readonly lot: string
  readonly test: string
  /** planned compacted volume of the layer in the cell; null for a foundation */
  readonly volumeCm3: number | null
  readonly topUm: number
  readonly next: string
}

const FLAGS = Object.keys(GROUND_FLAGS) as GroundFlag[]
const UM_PER_TENTH = 100
const UM_MM2_PER_CM3 = 1e6

type ListInput = {
  readonly plan: GroundPlan
  readonly sheet: GroundSheet
  readonly board: Board | undefined
  readonly lots: readonly Lot[]
  readonly tests: readonly TestSummary[]
  readonly units: Units
}

/** What each cell waits for, or that it is ready. */
function nextWords(board: Board | undefined, plan: GroundPlan, units: Units): ReadonlyMap<number, string> {
  const words = new Map<number, string>()
  for (const group of board?.ready ?? []) for (const cell of group.cells) words.set(cell, `Ready for ${liftWords(group.lift)}`)
  for (const group of board?.notYet ?? []) {
    const { title } = notYetWords(group, plan, units)
    const where = group.reason === 'at-grade' || group.reason === 'awaiting-inspection' ? '' : `, ${liftWords(group.lift)}`
    for (const cell of group.cells) words.set(cell, `${title}${where}`)
  }
  return words
}

/** Everything the map says at its cut, one row a cell of a zone, in the order of the sheet. */
export function listRows({ plan, sheet, board, lots, tests, units }: ListInput): ListRow[] {
  const lotNames = new Map(lots.map((lot) => [lot.seq, lot.name]))
  const testNumbers = new Map(tests.map((test) => [test.seq, test.number]))
  const next = nextWords(board, plan, units)
  return plan.cells.flatMap((geometry) => {
    const { cell } = geometry
    const zone = plan.zoneOf(cell)
    const state = groundStateOf(sheet.state[cell] ?? 0)
    const lift = sheet.lift[cell] ?? 0
    if (zone === undefined || state === 'none') return []
    const flags = sheet.flags[cell] ?? 0
    const layer = plan.layerOf(cell, lift)
    const overlays = FLAGS.filter((flag) => hasFlag(flags, flag)).map((flag) => OVERLAY_LOOKS[flag].word.toLowerCase())
    return {
      cell,
      label: plan.label(cell),
      zoneId: zone.id,
      zone: zone.name,
      lift,
      state,
      flags,
      stands: [stateWord(state, lift), ...overlays].join(', '),
      lot: lotNames.get(sheet.lot[cell] ?? 0) ?? '',
      test: testNumbers.get(sheet.test[cell] ?? 0) ?? '',
      volumeCm3: layer === undefined ? null : Math.round((geometry.areaMm2 * (layer.topUm - layer.bottomUm)) / UM_MM2_PER_CM3),
      topUm: (sheet.top[cell] ?? 0) * UM_PER_TENTH,
      next: next.get(cell) ?? '',
    }
  })
}

export interface ListFilter {
  readonly zoneId: string
  readonly state: GroundState | ''
  readonly text: string
}

/** Rows that a filter lets through; each word of the text must be somewhere in the row. */
export function filterRows(rows: readonly ListRow[], { zoneId, state, text }: ListFilter): ListRow[] {
  const words = text.toLowerCase().split(/\s+/).filter((word) => word !== '')
  return rows.filter((row) => {
    if (zoneId !== '' && row.zoneId !== zoneId) return false
    if (state !== '' && row.state !== state) return false
    if (words.length === 0) return true
    const said = `${row.label} ${row.zone} ${liftWords(row.lift)} ${row.stands} ${row.lot} ${row.test} ${row.next}`.toLowerCase()
    return words.every((word) => said.includes(word))
  })
}
