import type { VerdictChange } from '#shared/domain/rejudge.ts'
import { GROUND_STATES } from '#shared/domain/ground-state.ts'
import type { GroundState } from '#shared/domain/ground-state.ts'
import { groupBy } from '#shared/domain/group-by.ts'
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

function stateOfMove(name: string): GroundState {
  return GROUND_STATES.find((state) => state === name) ?? 'none'
}

export interface MoveLine {
  readonly to: GroundState
  readonly words: string
}

/** "406 cells: released to rework, lifts 1 to 9", one line a kind of move, the gravest first. */
export function moveLines(moves: RejudgeAnswer['moves']): MoveLine[] {
  const word = (name: string) => stateLook(stateOfMove(name)).word.toLowerCase()
  const kinds = [...groupBy(moves, ({ from, to }) => `${from} ${to}`).values()]
  return kinds
    .flatMap((same) => {
      const [first] = same
      if (first === undefined) return []
      const cells = same.reduce((sum, move) => sum + move.cells.length, 0)
      return [{ to: stateOfMove(first.to), words: `${countOf(cells, 'cell')}: ${word(first.from)} to ${word(first.to)}, ${liftsWords(same.map((move) => move.lift))}` }]
    })
    .sort((a, b) => rank(a.to) - rank(b.to))
}

const GRAVEST: readonly GroundState[] = ['rework', 'awaiting-retest', 'suspect', 'awaiting-test']

function rank(state: GroundState): number {
  const at = GRAVEST.indexOf(state)
  return at < 0 ? GRAVEST.length : at
}

/** "lift 4", "lifts 1 to 3", "lifts 1, 3, 7" */
function liftsWords(lifts: readonly number[]): string {
  const [first = 0, ...others] = [...new Set(lifts)].sort((a, b) => a - b)
  if (others.length === 0) return `lift ${first}`
  const last = others.at(-1) ?? first
  return last - first === others.length ? `lifts ${first} to ${last}` : `lifts ${[first, ...others].join(', ')}`
}

/** How many orders or releases are named one by one. */
const NAMED = 4

/** What becomes of rework orders: each by its number, or, where they are many, how many of each kind. */
export function orderLines(tests: RejudgeAnswer['tests'], done: boolean): string[] {
  const by = (order: RejudgeAnswer['tests'][number]['effect']['order']) => tests.filter((test) => test.effect.order === order && (order === 'issue' || test.orderNumber !== null))
  const lines = (own: RejudgeAnswer['tests'], one: (test: RejudgeAnswer['tests'][number]) => string, many: (n: number) => string) =>
    own.length > NAMED ? [many(own.length)] : own.map(one)
  return [
    // the number of an order that is only foreseen is not given yet
    ...lines(by('issue'), ({ number, orderNumber }) => `${done && orderNumber !== null ? orderNumber : 'A rework order'} for ${number}`, (n) => `Rework orders for ${n} tests`),
    ...lines(by('withdraw'), ({ number, orderNumber }) => `${orderNumber} withdrawn, as ${number} no longer fails`, (n) => `${n} orders withdrawn, as their tests no longer fail`),
    ...lines(by('hand-back'), ({ number, orderNumber }) => `${orderNumber} back to the failure before ${number}`, (n) => `${n} orders back to the failures before`),
    ...lines(by('stands'), ({ number, orderNumber }) => `${orderNumber} stands though ${number} no longer fails: work had begun`, (n) => `${n} orders stand, as work on them had begun`),
  ]
}

/** "A-012 revoked in 4 cells of lift 3"; where they are many, how many. */
export function releaseLines(releases: RejudgeAnswer['releases']): string[] {
  if (releases.length <= NAMED) return releases.map(({ number, lift, cells }) => `Release ${number} revoked in ${countOf(cells.length, 'cell')} of lift ${lift}`)
  const cells = releases.reduce((sum, release) => sum + release.cells.length, 0)
  return [`${releases.length} releases revoked in ${countOf(cells, 'cell')}`]
}

export { countOf }
