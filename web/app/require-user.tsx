import { useQuery } from '@tanstack/react-query'
import type { ReactNode } from 'react'
import { Navigate, useLocation } from 'react-router-dom'
import { PageSkeleton } from '#web/app/page-skeleton.tsx'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { sessionQueries } from '#web/features/session/queries.ts'

/** Shows a page only to somebody signed in; anybody else signs in first and comes back to it. */
export function RequireUser({ children }: { children: ReactNode }) {
  const { data, error, refetch } = useQuery(sessionQueries.me())
  const { pathname, search } = useLocation()
  if (data !== undefined) return data.user === null ? <Navigate replace to={paths.signIn(pathname + search)} /> : children
  if (error === null) return <PageSkeleton />
  return (
    <Banner tone="bad" title="The server does not answer." action={<button type="button" onClick={() => void refetch()}>Try again</button>}>
      Nothing is lost. This page opens as soon as it does.
    </Banner>
  )
}
