import { useQuery } from '@tanstack/react-query'
import { Banner } from '#web/components/ui/banner.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { siteQueries } from '#web/data/site/queries.ts'
import { isApiError } from '#web/lib/api-error.ts'
import { SiteRow } from './site-row.tsx'

function Sites() {
  const { data: sites, error, refetch } = useQuery(siteQueries.list())
  if (sites !== undefined && sites.length > 0) {
    return (
      <ul className="m-0 list-none p-0">
        {sites.map((site) => (
          <SiteRow key={site.id} site={site} />
        ))}
      </ul>
    )
  }
  if (sites !== undefined) {
    return (
      <div className="pt-6">
        <EmptyState title="No site yet">The QC lead of a site adds people to it. Ask there, and give the e-mail address that you sign in with.</EmptyState>
      </div>
    )
  }
  if (error === null) {
    return (
      <div className="pt-6">
        <Skeleton label="Your sites are on their way" lines={[46, 62, 38, 46, 62, 38]} />
      </div>
    )
  }
  const retry = (
    <button type="button" onClick={() => void refetch()}>
      Try again
    </button>
  )
  return (
    <Banner tone="bad" title={isApiError(error) ? error.message : 'Your sites could not be read.'} action={retry} className="mt-6">
      Nothing is lost.
    </Banner>
  )
}

/** The sites one belongs to, each as it stands now. */
export function SitesPage() {
  return (
    <div className="flex-1 overflow-y-auto bg-sheet px-4 pt-7 pb-10 sm:px-[26px]">
      <div className="mx-auto max-w-[1180px]">
        <h1 className="m-0 border-b-2 border-ink pb-2 text-[22px] font-extrabold">My sites</h1>
        <Sites />
      </div>
    </div>
  )
}
