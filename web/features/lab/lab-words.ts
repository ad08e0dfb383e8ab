import { oversizeSieve } from '#shared/domain/oversize.ts'
import type { Curve, CurveUse } from '#shared/schemas/lab.ts'
import { isApiError } from '#web/lib/api-error.ts'
import type { Units } from '#web/lib/units.ts'

export const METHODS = ['D698', 'T 99', 'D1557', 'T 180'] as const
export const LETTERS = ['A', 'B', 'C', 'D'] as const

export const STATUS_WORDS: Readonly<Record<Curve['status'], string>> = { draft: 'Waits for approval', approved: 'Approved', superseded: 'Superseded', withdrawn: 'Withdrawn' }
export const FIT_WORDS: Readonly<Record<CurveUse, string>> = { spline: 'Smooth curve', quadratic: 'Quadratic', cubic: 'Cubic', reported: 'Laboratory’s own' }

const SIEVE_WORDS = { 'no-4': 'No. 4', '3/8-in': '3/8 in', '3/4-in': '3/4 in' } as const

/** The sieve whose retained part a curve leaves out. */
export function sieveWords(method: Curve['method'], procedure: Curve['procedure']): string {
  return SIEVE_WORDS[oversizeSieve(method, procedure)]
}

/** "117.6 pcf at 12.6 %", or a dash where there is no pair. */
export function pairWords(pair: Curve['pair'], units: Units): string {
  return pair === null ? '–' : `${units.density(pair.maxDryDensity)} at ${units.percent(pair.optimumMoisture)}`
}

/** What the server would not take, line by line. */
export function issuesOf(error: Error | null): string[] {
  if (error === null) return []
  const issues = isApiError(error) && typeof error.details === 'object' && error.details !== null && 'issues' in error.details ? error.details.issues : null
  if (!Array.isArray(issues)) return [error.message]
  const messages = issues.flatMap((issue: unknown) => (typeof issue === 'object' && issue !== null && 'message' in issue && typeof issue.message === 'string' ? [issue.message] : []))
  return messages.length === 0 ? [error.message] : [...new Set(messages)]
}
