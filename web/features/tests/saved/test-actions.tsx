import { useState } from 'react'
import { Link } from 'react-router-dom'
import { reduceSheet } from '#shared/domain/reduce-sheet.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import type { Verb } from '#shared/policies/policy.ts'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { currentOfChain } from './test-chain.tsx'
import { VoidDialog } from './void-dialog.tsx'

export interface Offered {
  readonly retest: boolean
  readonly rerun: boolean
  readonly voiding: boolean
}

/** What this person may do about the test as it stands. */
export function offeredActions(test: TestDetail, can: (verb: Verb) => boolean): Offered {
  const { purpose, outcome, treatedAsFail, voided, verdict } = test
  const records = purpose === 'referee' ? can('test.record-qc') || can('test.record-qa') : can(purpose === 'verification' ? 'test.record-qa' : 'test.record-qc')
  const voids = can(purpose === 'verification' || purpose === 'referee' ? 'test.void-qa' : 'test.void-qc')
  const counts = currentOfChain(test.chain)?.id === test.id
  const failed = outcome === 'fail' || treatedAsFail
  const reduced = reduceSheet(test.sheet)
  const doubtful = outcome === 'suspect' || verdict.advice.length > 0 || (reduced.ok && reduced.flags.length > 0)
  return { retest: records && counts && failed, rerun: records && (voided || (counts && doubtful)), voiding: voids && !voided }
}

export function TestActions({ test }: { test: TestDetail }) {
  const { site, can } = useSite()
  const [asking, setAsking] = useState(false)
  const { retest, rerun, voiding } = offeredActions(test, can)
  const follow = (kind: 'retest' | 'rerun'): string => `${paths.newTest(site.id)}?follows=${test.id}&kind=${kind}`
  return (
    <span className="ml-auto flex flex-wrap gap-[10px] print:hidden">
      {voiding && (
        <Button kind="danger" onClick={() => setAsking(true)} className="pointer-coarse:min-h-12">
          Void with reason
        </Button>
      )}
      {rerun && (
        <Link to={follow('rerun')} className={buttonClasses(test.outcome === 'suspect' && !retest ? 'primary' : 'plain', 'regular', 'pointer-coarse:min-h-12')}>
          Run it again
        </Link>
      )}
      {retest && (
        <Link to={follow('retest')} className={buttonClasses('primary', 'regular', 'pointer-coarse:min-h-12')}>
          Record a retest
        </Link>
      )}
      {asking && <VoidDialog test={test} open onOpenChange={setAsking} />}
    </span>
  )
}
