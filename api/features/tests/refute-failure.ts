import { isFailure } from '#api/features/tests/mark-ground.ts'
import type { Chain } from '#api/features/tests/test-chain.ts'
import type { Verdict } from '#shared/domain/verdict-types.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'

interface Rerun extends Pick<CreateTest, 'follows' | 'remarks'> {
  readonly verdict: Pick<Verdict, 'outcome'>
  /** farther away than a re-run may be */
  readonly elsewhere: boolean
}

/** Fewest letters that say a cause. */
const LEAST_CAUSE = 3

/**
 * Whether a re-run refutes a doubted reading that is treated as a failure: it passes within 1 m, and the cause is on record
 * (domain section 3). A plain failure of the chain is refuted by nothing but rework.
 * @returns null where there is nothing to refute or nothing refutes it
 */
export function refutes(chain: Chain, { follows, remarks, verdict, elsewhere }: Rerun): 'refuted' | 'cause-missing' | null {
  if (follows?.kind !== 'rerun' || verdict.outcome !== 'pass' || elsewhere) return null
  const failures = chain.tests.filter((test) => test.voidedAt === null && isFailure(test))
  if (failures.length === 0 || failures.some((test) => !test.treatedAsFail)) return null
  return remarks.length >= LEAST_CAUSE ? 'refuted' : 'cause-missing'
}
