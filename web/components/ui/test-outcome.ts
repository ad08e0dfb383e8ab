import type { Verdict } from '#shared/domain/verdict-types.ts'
import type { TestOutcome } from './test-mark.tsx'

type Judged = Pick<Verdict, 'outcome' | 'near' | 'treatedAsFail' | 'headline'>

/** The mark that a result is drawn with. */
export function markOf({ outcome, near }: Pick<Judged, 'outcome' | 'near'>): TestOutcome {
  if (outcome === 'fail') return 'fails'
  if (outcome === 'suspect') return 'suspect'
  return near ? 'near' : 'passes'
}

/** A result in the few words of a register. */
export function resultWord({ outcome, near, treatedAsFail, headline }: Judged): string {
  if (outcome === 'suspect') return treatedAsFail ? 'Suspect, below limit' : 'Suspect'
  if (outcome === 'pass') return near ? 'Meets spec, near' : 'Meets spec'
  return headline.split(',')[0] ?? headline
}
