import { Link } from 'react-router-dom'
import type { OrderStepInput } from '#shared/schemas/rework.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { useUnits } from '#web/lib/site-context.tsx'
import type { KeptStep } from './kept-steps.ts'

const DONE: Readonly<Record<OrderStepInput['kind'], string>> = { assigned: 'assigned', started: 'started', ready: 'ready for retest', help: 'lead wanted' }

/** What is kept on this phone, and what the server would not take. */
export function KeptBanner({ steps, sending, signInNeeded, onPutAway }: { steps: readonly KeptStep[]; sending: boolean; signInNeeded: boolean; onPutAway: (id: string) => void }) {
  const units = useUnits()
  const waiting = steps.filter((kept) => kept.refused === null)
  const names = waiting.map(({ orderNumber, step }) => `${orderNumber} ${DONE[step.kind]}${'happenedAt' in step ? ` at ${units.time(step.happenedAt)}` : ''}`)
  return (
    <>
      {waiting.length > 0 && !sending && (
        <Banner tone="off" title="Kept on this phone." action={signInNeeded ? <Link to={paths.signIn(window.location.pathname)}>Sign in</Link> : undefined}>
          {names.join(', ')}. {signInNeeded ? 'It is sent once you have signed in again.' : 'It is sent as soon as there is a signal.'}
        </Banner>
      )}
      {steps
        .filter((kept) => kept.refused !== null)
        .map(({ orderNumber, step, refused }) => (
          <Banner
            key={step.id}
            tone="bad"
            title={`${orderNumber} ${DONE[step.kind]} was not taken.`}
            action={
              <button type="button" className="min-h-12" onClick={() => onPutAway(step.id)}>
                Put away
              </button>
            }
          >
            {refused}
          </Banner>
        ))}
    </>
  )
}
