import { groundStateOf, mayBeCovered } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { stateWord } from '#web/features/ground/cell/strip-rows.ts'
import type { GroundPlan } from '#web/features/ground/plan/ground-plan.ts'
import { capital, countOf, liftWords } from '#web/features/ground/plan/ground-words.ts'

const MOST_NAMED = 2

/** "12 of these cells sit on ground that is not released" */
export function coveredTitle(cells: readonly number[]): string {
  return `${cells.length} of these cells ${cells.length === 1 ? 'sits' : 'sit'} on ground that is not released`
}

/** What lies beneath, and what placing there does. */
export function coveredConsequence(plan: GroundPlan, surface: GroundSheet, cells: readonly number[]): string {
  const groups = new Map<string, { lift: number; word: string; cells: number[] }>()
  for (const cell of cells) {
    const lift = surface.lift[cell] ?? 0
    const state = groundStateOf(surface.state[cell] ?? 0)
    const word = mayBeCovered(state) ? 'a lift beneath it is not released' : stateWord(state, lift).toLowerCase()
    const group = groups.get(`${lift} ${word}`) ?? { lift, word, cells: [] }
    group.cells.push(cell)
    groups.set(`${lift} ${word}`, group)
  }
  const sorted = [...groups.values()].sort((a, b) => b.cells.length - a.cells.length)
  const named = sorted.slice(0, MOST_NAMED).map((group) => `${capital(liftWords(group.lift))} in ${plan.range(group.cells)}: ${group.word}.`)
  const rest = sorted.slice(MOST_NAMED).reduce((sum, group) => sum + group.cells.length, 0)
  const more = rest > 0 ? ` And ${countOf(rest, 'cell')} more.` : ''
  return `${named.join(' ')}${more} Placing now marks it covered too early, and everything above it stays in doubt until it is dealt with.`
}
