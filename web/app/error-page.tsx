import { isRouteErrorResponse, Link, useRouteError } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Wordmark } from '#web/components/ui/wordmark.tsx'
import { isApiError } from '#web/lib/api-error.ts'
import { usePageTitle } from '#web/lib/page-title.ts'

type Words = { title: string; kept: string; reference?: string | undefined }

const NOT_HERE: Words = {
  title: 'This page is not here',
  kept: 'The address may be mistyped, or it belongs to a site you are not a member of. Nothing was changed.',
}

function wordsOf(error: unknown): Words {
  if (isRouteErrorResponse(error) && error.status === 404) return NOT_HERE
  if (isApiError(error)) {
    if (error.status === 404) return NOT_HERE
    return { title: error.message, kept: 'What was saved before is kept. What you typed on this page and did not save is not.', reference: error.requestId }
  }
  return {
    title: 'This page has stopped',
    kept: 'What was saved before is kept. What you typed on this page and did not save is not. Loading it again usually helps.',
  }
}

function SheetOfWords({ title, kept, reference, reload }: Words & { reload: boolean }) {
  usePageTitle(title)
  return (
    <main className="flex min-h-dvh flex-col bg-sheet">
      <div className="flex h-14 items-center border-b-2 border-ink bg-raised px-5">
        <Link to={paths.home()} className="flex no-underline" aria-label="Hardpan, to the start">
          <Wordmark />
        </Link>
      </div>
      <div role="alert" className="mx-[26px] mt-14 max-w-[34rem] sm:mx-20">
        <h1 className="m-0 text-verdict font-extrabold">{title}</h1>
        <p className="mt-3 mb-6 text-[16px] text-ink-2">{kept}</p>
        <div className="flex flex-wrap gap-2">
          {reload && (
            <Button kind="primary" onClick={() => window.location.reload()}>
              Load it again
            </Button>
          )}
          <Link to={paths.home()} className={buttonClasses(reload ? 'plain' : 'primary')}>
            To my sites
          </Link>
        </div>
        {reference !== undefined && <p className="num mt-8 text-small text-ink-2">Request {reference}</p>}
      </div>
    </main>
  )
}

/** Stands where a page stopped: what happened, what was kept, what to do. */
export function ErrorPage() {
  const words = wordsOf(useRouteError())
  return <SheetOfWords {...words} reload={words !== NOT_HERE} />
}

export function NotFoundPage() {
  return <SheetOfWords {...NOT_HERE} reload={false} />
}
