import { createBrowserRouter, Navigate, Outlet, type RouteObject } from 'react-router-dom'
import { ErrorPage, NotFoundPage } from '#web/app/error-page.tsx'
import { PageSkeleton } from '#web/app/page-skeleton.tsx'
import { PAGES, type Page } from '#web/app/pages.ts'
import { PATTERNS } from '#web/app/paths.ts'
import { RequireUser } from '#web/app/require-user.tsx'
import { useRealtime } from '#web/app/use-realtime.ts'
import { usePageTitle } from '#web/lib/page-title.ts'

function Titled({ title }: { title: string }) {
  usePageTitle(title)
  return null
}

function Root() {
  useRealtime()
  return <Outlet />
}

function routeOf({ path, title, verb, load }: Page): RouteObject {
  return {
    path,
    lazy: async () => {
      const Content = await load()
      const page = (
        <>
          <Titled title={title} />
          <Content />
        </>
      )
      if (verb === undefined) return { element: page }
      const { RequireRole } = await import('#web/app/site-layout.tsx')
      return { element: <RequireRole verb={verb}>{page}</RequireRole> }
    },
  }
}

const pagesOpenTo = (open: Page['open']): RouteObject[] => PAGES.filter((page) => page.open === open).map(routeOf)

const HOME: RouteObject = {
  errorElement: <ErrorPage />,
  lazy: async () => {
    const { HomeLayout } = await import('#web/app/home-layout.tsx')
    return {
      element: (
        <RequireUser>
          <HomeLayout />
        </RequireUser>
      ),
    }
  },
  children: pagesOpenTo('signed-in'),
}

const SITE: RouteObject = {
  path: PATTERNS.site,
  errorElement: <ErrorPage />,
  lazy: async () => {
    const { SiteLayout } = await import('#web/app/site-layout.tsx')
    return {
      element: (
        <RequireUser>
          <SiteLayout />
        </RequireUser>
      ),
    }
  },
  children: [{ index: true, element: <Navigate replace to="ground" /> }, ...pagesOpenTo('site')],
}

/** Every address, for the browser's router and for tests. */
export const ROUTES: RouteObject[] = [
  {
    element: <Root />,
    errorElement: <ErrorPage />,
    hydrateFallbackElement: <PageSkeleton />,
    children: [{ errorElement: <ErrorPage />, children: pagesOpenTo('anyone') }, HOME, SITE, { path: '*', element: <NotFoundPage /> }],
  },
]

export function createRouter() {
  return createBrowserRouter(ROUTES)
}
