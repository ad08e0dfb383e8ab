import { groundStateOf, type GroundState } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import type { GroundPlan } from '#web/features/ground/plan/ground-plan.ts'
import { capital, countOf, liftWords } from '#web/features/ground/plan/ground-words.ts'

const MOST_NAMED = 2

/** How the layer beneath stands. A released one hides an unreleased one further down. */
const STANDS: Readonly<Record<GroundState, string>> = {
  none: 'is not placed',
  'not-placed': 'is not placed',
  'awaiting-test': 'still waits for a test',
  'awaiting-retest': 'still waits for its retest',
  'meets-spec': 'meets spec and is not released yet',
  released: 'lies on a lift that is not released',
  'accepted-as-is': 'lies on a lift that is not released',
  recheck: 'is to be looked at again',
  rework: 'is in rework',
  suspect: 'carries a result that can’t be right',
}

function standsWords(state: GroundState, lift: number): string {
  return lift === 0 && state === 'awaiting-test' ? 'still waits for inspection' : STANDS[state]
}

/** "12 of these cells sit on ground that is not released" */
export function coveredTitle(cells: readonly number[]): string {
  return `${cells.length} of these cells ${cells.length === 1 ? 'sits' : 'sit'} on ground that is not released`
}

/** What lies beneath, and what placing there does. */
export function coveredConsequence(plan: GroundPlan, surface: GroundSheet, cells: readonly number[]): string {
  const groups = new Map<string, { lift: number; stands: string; cells: number[] }>()
  for (const cell of cells) {
    const lift = surface.lift[cell] ?? 0
    const stands = standsWords(groundStateOf(surface.state[cell] ?? 0), lift)
    const group = groups.get(`${lift} ${stands}`) ?? { lift, stands, cells: [] }
    group.cells.push(cell)
    groups.set(`${lift} ${stands}`, group)
  }
  const sorted = [...groups.values()].sort((a, b) => b.cells.length - a.cells.length)
  const named = sorted.slice(0, MOST_NAMED).map((group) => `${capital(liftWords(group.lift))} in ${plan.range(group.cells)} ${group.stands}.`)
  const rest = sorted.slice(MOST_NAMED).reduce((sum, group) => sum + group.cells.length, 0)
  const more = rest > 0 ? ` And ${countOf(rest, 'cell')} more.` : ''
  return `${named.join(' ')}${more} Placing now marks it covered too early, and everything above it stays in doubt until it is dealt with.`
}
