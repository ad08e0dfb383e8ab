import { Link, useLocation } from 'react-router-dom'
import { recordTestAnswerSchema, type TestDetail } from '#shared/schemas/field-test.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { countOf } from '#web/features/tests/outcome-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { currentOfChain } from './test-chain.tsx'

/** What saving just did, of the page that sent us here. */
function useJustSaved(testId: string) {
  const state: unknown = useLocation().state
  const saved = typeof state === 'object' && state !== null && 'saved' in state ? recordTestAnswerSchema.safeParse(state.saved) : null
  return saved?.success === true && saved.data.id === testId ? saved.data : null
}

/** Whether the test is in force, and what saving it did. */
export function TestNotices({ test }: { test: TestDetail }) {
  const { site, units } = useSite()
  const saved = useJustSaved(test.id)
  const current = currentOfChain(test.chain)
  const marked = { fail: 'went to rework', suspect: 'are in doubt', hold: 'are on hold' }[test.marks[0]?.kind ?? 'fail']
  return (
    <div className="grid gap-2 not-empty:mb-[18px]">
      {saved !== null && (
        <Banner title={`${saved.number} saved.`} action={saved.orderId !== null && <Link to={paths.reworkOrder(site.id, saved.orderId)}>Open {saved.orderNumber}</Link>}>
          {saved.marked > 0 ? `${countOf(saved.marked, 'cell')} ${saved.marked === 1 ? marked.replace('are', 'is') : marked}.` : `${saved.headline}.`}
        </Banner>
      )}
      {test.void !== null && (
        <Banner tone="bad" title={`Void since ${units.dateTime(test.void.at)}, by ${test.void.by.name}.`}>
          {test.void.reason}
        </Banner>
      )}
      {test.void === null && test.gauge !== null && test.gauge.state !== 'good' && (
        <Banner tone="off" title={test.gauge.message} action={test.gauge.gaugeId !== null && <Link to={`${paths.gauges(site.id)}?gauge=${test.gauge.gaugeId}`}>Open the gauge</Link>}>
          {test.gauge.state === 'not-named' ? 'It is noted where ground is released on it.' : 'Until that is put right the test releases no ground.'}
        </Banner>
      )}
      {test.void === null && test.superseded && (
        <Banner tone="off" title="Out of force.">
          Rework was reported done in its cell after it was taken; it speaks for nothing any more.
        </Banner>
      )}
      {test.void === null && current !== undefined && current.id !== test.id && (
        <Banner tone="off" title={`${current.number} counts now.`} action={<Link to={paths.test(site.id, current.id)}>Open {current.number}</Link>}>
          A later test of this chain took its place.
        </Banner>
      )}
    </div>
  )
}
