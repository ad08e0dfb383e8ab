import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect, type ReactNode } from 'react'
import { Outlet, useParams } from 'react-router-dom'
import type { Verb } from '#shared/policies/policy.ts'
import { NotFoundPage } from '#web/app/error-page.tsx'
import { paths } from '#web/app/paths.ts'
import { SiteShell } from '#web/app/site-shell.tsx'
import { Shell } from '#web/app/shell.tsx'
import { useShellUser } from '#web/app/use-shell-user.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { siteQueries } from '#web/data/site/queries.ts'
import { isApiError } from '#web/lib/api-error.ts'
import { SiteProvider, useSite } from '#web/lib/site-context.tsx'
import { Link } from 'react-router-dom'

function BareShell({ children }: { children: ReactNode }) {
  const { name, signOut } = useShellUser()
  return (
    <Shell nav={[]} user={{ name }} onSignOut={signOut}>
      {children}
    </Shell>
  )
}

function SiteOnItsWay() {
  return (
    <BareShell>
      <div className="flex-1 bg-sheet px-[26px] py-[22px]">
        <Skeleton label="The site is on its way" lines={[32, 64, 58, 61, 40]} />
      </div>
    </BareShell>
  )
}

function SiteNotRead({ error, retry }: { error: Error; retry: () => void }) {
  return (
    <BareShell>
      <Banner
        tone="bad"
        title={isApiError(error) ? error.message : 'The site could not be read.'}
        action={
          <button type="button" onClick={retry}>
            Try again
          </button>
        }
      >
        Nothing is lost.
      </Banner>
    </BareShell>
  )
}

const isNotThere = (error: Error | null): boolean => isApiError(error) && (error.status === 404 || error.status === 400)

/** Reads the site of the address and its cells, and gives them to the pages beneath it. */
export function SiteLayout() {
  const { siteId = '' } = useParams()
  const client = useQueryClient()
  const site = useQuery(siteQueries.detail(siteId))
  const cells = useQuery(siteQueries.cells(siteId))

  const changed = site.data !== undefined && cells.data !== undefined && site.data.cellsHash !== cells.data.hash
  useEffect(() => {
    if (changed) void client.invalidateQueries({ queryKey: siteQueries.cells(siteId).queryKey })
  }, [changed, client, siteId])

  const error = site.error ?? cells.error
  if (isNotThere(error)) return <NotFoundPage />
  if (site.data !== undefined && cells.data !== undefined) {
    return (
      <SiteProvider key={siteId} site={site.data} columns={cells.data}>
        <SiteShell>
          <Outlet />
        </SiteShell>
      </SiteProvider>
    )
  }
  if (error === null) return <SiteOnItsWay />
  return (
    <SiteNotRead
      error={error}
      retry={() => {
        void site.refetch()
        void cells.refetch()
      }}
    />
  )
}

/** Shows a page of the site only to a role that may do the act it is for. */
export function RequireRole({ verb, children }: { verb: Verb; children: ReactNode }) {
  const { site, can } = useSite()
  if (can(verb)) return children
  return (
    <div className="p-[26px]">
      <EmptyState
        title="This sheet is not for your role"
        action={
          <Link to={paths.ground(site.id)} className={buttonClasses('plain')}>
            To the Ground
          </Link>
        }
      >
        The site’s QC lead decides who sees what. Ask there if you need it.
      </EmptyState>
    </div>
  )
}
