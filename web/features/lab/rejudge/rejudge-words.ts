import type { VerdictChange } from '#shared/domain/rejudge.ts'
import { GROUND_STATES } from '#shared/domain/ground-state.ts'
import type { GroundState } from '#shared/domain/ground-state.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import type { RejudgeAnswer, RejudgedTest } from '#shared/schemas/rejudge.ts'

export const CHANGE_WORDS: Readonly<Record<VerdictChange, string>> = {
  'to-fail': 'Would fail',
  'to-suspect': 'Would be suspect',
  'to-pass': 'Would pass',
  reasons: 'Other reasons',
  near: 'Nearness to a limit',
  figures: 'Figures only',
}

/** What judging the test again would do to its marks and its order, in one line; empty where nothing. */
export function effectWords({ effect, orderNumber, inForce, change }: Pick<RejudgedTest, 'effect' | 'orderNumber' | 'inForce' | 'change'>): string {
  if (effect === null) return ''
  const order = orderNumber ?? 'Its order'
  switch (effect.order) {
    case 'issue':
      return 'Marks its ground and issues or joins a rework order'
    case 'withdraw':
      return effect.marks === 'make' ? `${order} is withdrawn, its ground marked suspect` : `${order} is withdrawn, its marks fall`
    case 'hand-back':
      return `${order} goes back to the failure before it`
    case 'stands':
      return `${order} stands: work on it has begun. Its marks fall`
    case 'reword':
      return change === 'reasons' ? `${order} takes the new reasons` : ''
    case 'none':
      if (effect.marks === 'make') return 'Marks its ground as suspect'
      return effect.marks === 'lift' ? (inForce ? 'Its marks fall' : 'Its ground has a later answer') : ''
  }
}

const countOf = (n: number, word: string): string => `${n.toLocaleString('en-US')} ${word}${n === 1 ? '' : 's'}`

/** The state a move names, for its swatch. */
export function stateOfMove(name: string): GroundState {
  return GROUND_STATES.find((state) => state === name) ?? 'none'
}

/** "6 cells of lift 4: released to rework" */
export function moveWords({ lift, from, to, cells }: RejudgeAnswer['moves'][number]): string {
  const word = (name: string) => stateLook(stateOfMove(name)).word.toLowerCase()
  return `${countOf(cells.length, 'cell')} of lift ${lift}: ${word(from)} to ${word(to)}`
}

/** What becomes of rework orders, one line an order. */
export function orderLines(tests: RejudgeAnswer['tests'], done: boolean): string[] {
  const lines = tests.flatMap(({ number, effect, orderNumber }) => {
    // the number of an order that is only foreseen is not given yet
    if (effect.order === 'issue') return [done && orderNumber !== null ? `${orderNumber} for ${number}` : `An order for ${number}`]
    if (orderNumber === null) return []
    if (effect.order === 'withdraw') return [`${orderNumber} withdrawn, as ${number} no longer fails`]
    if (effect.order === 'hand-back') return [`${orderNumber} back to the failure before ${number}`]
    if (effect.order === 'stands') return [`${orderNumber} stands though ${number} no longer fails: work had begun`]
    return []
  })
  return [...new Set(lines)]
}

/** "A-012: 4 cells of lift 3 revoked" */
export function releaseWords({ number, lift, cells }: RejudgeAnswer['releases'][number]): string {
  return `${number}: ${countOf(cells.length, 'cell')} of lift ${lift} revoked`
}

export { countOf }
