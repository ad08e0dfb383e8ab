import { VERDICT_CHANGES } from '#shared/domain/rejudge.ts'
import type { VerdictChange } from '#shared/domain/rejudge.ts'
import type { RejudgedTest } from '#shared/schemas/rejudge.ts'
import { CHANGE_WORDS } from './rejudge-words.ts'

/** Which rows are shown: those whose verdict changes, one kind of change, those that cannot be judged, or all. */
export type RejudgeFilter = 'changed' | 'all' | 'refused' | VerdictChange

/** Rows as they are shown: what changes most first, then by number. */
export function sortRejudged(tests: readonly RejudgedTest[]): RejudgedTest[] {
  const rank = ({ change }: RejudgedTest) => (change === null ? -1 : VERDICT_CHANGES.indexOf(change))
  return [...tests].sort((a, b) => rank(a) - rank(b) || a.number.localeCompare(b.number))
}

const isChanged = ({ change }: RejudgedTest): boolean => change !== null && change !== 'figures'

export function filterRejudged(tests: readonly RejudgedTest[], filter: RejudgeFilter): RejudgedTest[] {
  switch (filter) {
    case 'all':
      return [...tests]
    case 'changed':
      return tests.filter(isChanged)
    case 'refused':
      return tests.filter((test) => test.after === null)
    default:
      return tests.filter((test) => test.change === filter)
  }
}

/** The choices with their counts; kinds nobody is of are left out. */
export function filterChoices(tests: readonly RejudgedTest[]): { readonly value: RejudgeFilter; readonly label: string }[] {
  const count = (filter: RejudgeFilter) => filterRejudged(tests, filter).length
  const kinds = [...VERDICT_CHANGES.map((change) => [change, CHANGE_WORDS[change]] as const), ['refused', 'Cannot be judged'] as const]
  return [
    { value: 'changed', label: `Changed, ${count('changed')}` },
    ...kinds.filter(([kind]) => count(kind) > 0).map(([kind, words]) => ({ value: kind, label: `${words}, ${count(kind)}` })),
    { value: 'all', label: `All, ${tests.length}` },
  ]
}
