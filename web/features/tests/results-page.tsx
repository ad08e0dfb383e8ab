import { useQuery } from '@tanstack/react-query'
import { useCallback, type ReactNode } from 'react'
import { Link, useSearchParams } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { testQueries } from '#web/data/test/queries.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { countOf } from './outcome-words.ts'
import { filterOf, isNarrowed, PAGE_SIZE, readRegister, type RegisterAddress } from './register/register-filter.ts'
import { RegisterFilters } from './register/register-filters.tsx'
import { RegisterList, RegisterTable } from './register/register-table.tsx'

/** The register of field tests, newest first. */
export function ResultsPage() {
  usePageTitle('Results')
  const { site, lookup, can } = useSite()
  const [search, setSearch] = useSearchParams()
  const address = readRegister(search)
  const { data, error, refetch, isPlaceholderData } = useQuery(testQueries.list(site.id, filterOf(address, lookup)))
  const change = useCallback(
    (part: Partial<Omit<RegisterAddress, 'page'>> & { readonly page?: number }) => {
      setSearch(
        (before) => {
          const next = new URLSearchParams(before)
          next.delete('page')
          for (const [name, value] of Object.entries(part)) {
            const text = value === true ? '1' : value === false || value === 1 ? '' : String(value)
            if (text === '') next.delete(name)
            else next.set(name, text)
          }
          return next
        },
        { replace: part.page === undefined },
      )
    },
    [setSearch],
  )
  const mayRecord = can('test.record-qc') || can('test.record-qa')
  const record = mayRecord && (
    <Link to={paths.newTest(site.id)} className={buttonClasses('primary', 'regular', 'pointer-coarse:min-h-12')}>
      Record a test
    </Link>
  )
  return (
    <div className="min-h-0 flex-1 overflow-y-auto bg-raised px-4 pt-5 pb-8 sm:px-[26px]">
      <div className="mb-4 flex flex-wrap items-center gap-x-[14px] gap-y-2">
        <h1 className="m-0 text-question font-extrabold">Results</h1>
        {data !== undefined && <span className="text-ink-2">{countOf(data.total, 'test')}{isNarrowed(address) ? ' of this choice' : ''}</span>}
        <span className="ml-auto">{record}</span>
      </div>
      <RegisterFilters address={address} onChange={change} />
      <div className="mt-[18px]" aria-busy={isPlaceholderData}>
        {error !== null && (
          <Banner tone="bad" title="The register could not be read." action={<button type="button" onClick={() => void refetch()}>Try again</button>} className="mb-3">
            {error.message}
          </Banner>
        )}
        {data === undefined && error === null && <Skeleton label="The register is on its way" lines={[96, 92, 94, 90, 95, 91]} />}
        {data?.total === 0 && <Nothing narrowed={isNarrowed(address)} record={record} onClear={() => setSearch({})} />}
        {data !== undefined && data.total > 0 && (
          <>
            <RegisterTable tests={data.tests} />
            <RegisterList tests={data.tests} />
            <Pager page={address.page} total={data.total} onPage={(page) => change({ page })} />
          </>
        )}
      </div>
    </div>
  )
}

function Nothing({ narrowed, record, onClear }: { narrowed: boolean; record: ReactNode; onClear: () => void }) {
  if (narrowed) {
    return (
      <EmptyState title="No test fits this choice" action={<Button onClick={onClear}>Show all tests</Button>}>
        Widen the zone, lift or result, or search for less.
      </EmptyState>
    )
  }
  return (
    <EmptyState title="No tests yet" action={record === false ? undefined : record}>
      The first field test of this site will stand here, with its verdict and everything it was judged by.
    </EmptyState>
  )
}

function Pager({ page, total, onPage }: { page: number; total: number; onPage: (page: number) => void }) {
  const pages = Math.max(1, Math.ceil(total / PAGE_SIZE))
  if (pages === 1 && page === 1) return null
  const from = (page - 1) * PAGE_SIZE + 1
  return (
    <nav aria-label="Pages of the register" className="mt-4 flex flex-wrap items-center gap-3">
      <Button disabled={page <= 1} onClick={() => onPage(Math.min(page - 1, pages))} className="pointer-coarse:min-h-12">
        Newer
      </Button>
      <Button disabled={page >= pages} onClick={() => onPage(page + 1)} className="pointer-coarse:min-h-12">
        Older
      </Button>
      <span className="text-ink-2">{from > total ? `There are ${pages} pages.` : `${from.toLocaleString('en-US')} to ${Math.min(page * PAGE_SIZE, total).toLocaleString('en-US')} of ${total.toLocaleString('en-US')}`}</span>
    </nav>
  )
}
