import { useQuery } from '@tanstack/react-query'
import { Navigate, useNavigate, useSearchParams } from 'react-router-dom'
import { Wordmark } from '#web/components/ui/wordmark.tsx'
import { SignInForm } from './sign-in-form.tsx'
import { SignInPlan } from './sign-in-plan.tsx'
import { nextPage } from './sign-in-words.ts'
import { sessionQueries } from './queries.ts'

/** The first sheet: a plan at the left, the way in at the right. */
export function SignInPage() {
  const [search] = useSearchParams()
  const navigate = useNavigate()
  const next = nextPage(search.get('next'))
  const { data } = useQuery(sessionQueries.me())
  if (data !== undefined && data.user !== null) return <Navigate replace to={next} />

  return (
    <main className="grid min-h-dvh grid-rows-[minmax(150px,26dvh)_1fr] bg-raised lg:grid-cols-[1fr_460px] lg:grid-rows-1">
      <SignInPlan />
      <div className="flex flex-col border-t-2 border-ink px-6 py-7 sm:px-12 lg:border-t-0 lg:border-l-2 lg:py-12">
        <Wordmark size="large" />
        <p className="mt-3 mb-0 max-w-[30ch] text-[16px] leading-[1.4] text-ink-2">
          Every lift, everywhere on the site, shown to meet specification before it is covered.
        </p>
        <div className="mt-8 max-w-[420px] lg:my-auto">
          <h1 className="m-0 mb-4 border-b border-ink pb-[6px] text-value font-bold">Sign in</h1>
          <SignInForm onSignedIn={() => void navigate(next, { replace: true })} />
          <p className="mt-5 mb-0 text-small text-ink-2">No account yet, or a password forgotten: ask your site’s QC lead.</p>
        </div>
        <p className="mt-8 mb-0 text-small text-ink-2">
          Hardpan records, computes and shows. The engineer of record and the specification decide.
        </p>
      </div>
    </main>
  )
}
