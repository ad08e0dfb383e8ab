import { Link } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { useMe } from '#web/data/session/use-me.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CheckStep } from './check-step.tsx'
import { ColumnsStep } from './columns-step.tsx'
import { SourceStep } from './source-step.tsx'
import { useImport } from './use-import.ts'

const STEPS = ['File', 'Columns', 'Rows'] as const

/** Results of a file or a pasted block: what its columns are, what each row comes to, and nothing stored before all are settled. */
export function ImportPage() {
  usePageTitle('Import results')
  const { site, can } = useSite()
  const me = useMe()
  if (!can('test.record-qc') && !can('test.record-qa')) {
    return (
      <div className="p-[26px]">
        <EmptyState title="Your role does not record tests" action={<Link to={paths.tests(site.id)} className={buttonClasses('plain')}>To the results</Link>}>
          Quality control imports the contractor’s tests, the owner’s representative the verification tests.
        </EmptyState>
      </div>
    )
  }
  return me === null ? <Skeleton label="The page is on its way" lines={[40, 60]} /> : <Import userId={me.id} />
}

function Import({ userId }: { userId: string }) {
  const { site } = useSite()
  const importing = useImport(userId)
  const { open } = importing
  const step = open === null ? 0 : open.checking ? 2 : 1
  return (
    <div className="min-h-0 flex-1 overflow-y-auto bg-raised px-4 pt-5 sm:px-[26px]">
      <div className="mb-4 flex flex-wrap items-center gap-x-[14px] gap-y-2">
        <h1 className="m-0 text-question font-extrabold">Import results</h1>
        <ol aria-label="Steps" className="m-0 flex list-none gap-3 p-0 text-ink-2">
          {STEPS.map((name, index) => (
            <li key={name} aria-current={index === step ? 'step' : undefined} className={index === step ? 'font-semibold text-ink underline decoration-2 underline-offset-4' : undefined}>
              {index + 1} {name}
            </li>
          ))}
        </ol>
        <Link to={paths.tests(site.id)} className={buttonClasses('plain', 'regular', 'ml-auto pointer-coarse:min-h-12')}>
          To the results
        </Link>
      </div>
      {step === 0 && <SourceStep importing={importing} />}
      {open !== null && step === 1 && <ColumnsStep importing={importing} open={open} />}
      {open !== null && step === 2 && <CheckStep key={open.table.sha256} importing={importing} open={open} />}
    </div>
  )
}
