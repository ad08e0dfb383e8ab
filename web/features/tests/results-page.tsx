import { useQuery } from '@tanstack/react-query'
import { useEffect, useState, type ReactNode } from 'react'
import { Link, useSearchParams } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { testQueries } from '#web/data/test/queries.ts'
import { viewQueries } from '#web/data/view/queries.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { ExportDialog } from './exchange/export-dialog.tsx'
import { countOf } from './outcome-words.ts'
import { ColumnDialog } from './register/column-dialog.tsx'
import { isNarrowed, queryOf } from './register/register-address.ts'
import { RegisterFilters } from './register/register-filters.tsx'
import { RegisterList } from './register/register-list.tsx'
import { RegisterPager } from './register/register-pager.tsx'
import { RegisterTable } from './register/register-table.tsx'
import { useRegister, type RegisterControls } from './register/use-register.ts'
import { ViewMenu } from './register/view-menu.tsx'

/** The views a person has here; an address that says nothing becomes that of the one the register opens with. */
function useViews({ open }: RegisterControls) {
  const { site } = useSite()
  const { data: views = [], isPending } = useQuery(viewQueries.list(site.id))
  const [search] = useSearchParams()
  const first = search.size === 0 ? views.find((view) => view.isDefault) : undefined
  useEffect(() => {
    if (first !== undefined) open(first, true)
  }, [first, open])
  return { views, settled: search.size > 0 || (!isPending && first === undefined) }
}

/** The register of field tests: filtered, sorted and paged by the server. */
export function ResultsPage() {
  usePageTitle('Results')
  const { site, lookup, can } = useSite()
  const controls = useRegister()
  const { address, sortBy, show, turnTo, clear } = controls
  const { views, settled } = useViews(controls)
  const { data, error, refetch, isPlaceholderData } = useQuery({ ...testQueries.register(site.id, queryOf(address, lookup)), enabled: settled })
  const [choosing, setChoosing] = useState(false)
  const [exporting, setExporting] = useState(false)
  const narrowed = isNarrowed(address)
  const record = (can('test.record-qc') || can('test.record-qa')) && (
    <Link to={paths.newTest(site.id)} className={buttonClasses('primary', 'regular', 'pointer-coarse:min-h-12')}>
      Record a test
    </Link>
  )
  return (
    <div className="flex min-h-0 flex-1 flex-col overflow-y-auto bg-raised px-4 pt-5 pb-4 sm:px-[26px] md:overflow-hidden">
      <div className="mb-3 flex flex-wrap items-center gap-x-[14px] gap-y-2">
        <h1 className="m-0 text-question font-extrabold">Results</h1>
        {data !== undefined && <span className="text-ink-2 max-sm:hidden">{countOf(data.total, 'test')}{narrowed ? ' of this choice' : ''}</span>}
        <ViewMenu views={views} controls={controls} />
        <Button onClick={() => setChoosing(true)} className="max-md:hidden pointer-coarse:min-h-12">
          Columns
        </Button>
        <span className="ml-auto flex flex-wrap gap-[10px]">
          <Button onClick={() => setExporting(true)} disabled={data === undefined || data.total === 0} className="pointer-coarse:min-h-12">
            Export
          </Button>
          {record !== false && (
            <Link to={paths.importTests(site.id)} className={buttonClasses('plain', 'regular', 'pointer-coarse:min-h-12')}>
              Import
            </Link>
          )}
          {record}
        </span>
      </div>
      <RegisterFilters controls={controls} page={data} />
      <div className="mt-[14px] flex flex-col md:min-h-0 md:flex-1" aria-busy={isPlaceholderData}>
        {error !== null && (
          <Banner tone="bad" title="The register could not be read." action={<button type="button" onClick={() => void refetch()}>Try again</button>} className="mb-3">
            {error.message}
          </Banner>
        )}
        {data === undefined && error === null && <Skeleton label="The register is on its way" lines={[96, 92, 94, 90, 95, 91]} />}
        {data?.total === 0 && <Nothing narrowed={narrowed} record={record} onClear={clear} />}
        {data !== undefined && data.total > 0 && (
          <>
            <RegisterTable tests={data.tests} columns={address.columns} sort={address.sort} onSort={sortBy} className="max-md:hidden" />
            <RegisterList tests={data.tests} />
            <RegisterPager page={address.page} total={data.total} onPage={turnTo} />
          </>
        )}
      </div>
      {exporting && <ExportDialog query={queryOf(address, lookup)} total={data?.total} onClose={() => setExporting(false)} />}
      {choosing && <ColumnDialog columns={address.columns} onChange={show} onClose={() => setChoosing(false)} />}
    </div>
  )
}

function Nothing({ narrowed, record, onClear }: { narrowed: boolean; record: ReactNode; onClear: () => void }) {
  if (narrowed) {
    return (
      <EmptyState title="No test fits this choice" action={<Button onClick={onClear}>Clear filters</Button>}>
        Take one filter away, choose more results, or search for less.
      </EmptyState>
    )
  }
  return (
    <EmptyState title="No tests yet" action={record === false ? undefined : record}>
      The first field test of this site will stand here, with its verdict and everything it was judged by.
    </EmptyState>
  )
}
