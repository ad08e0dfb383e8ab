import { createBrowserRouter, Outlet, type RouteObject } from 'react-router-dom'
import { ErrorPage, NotFoundPage } from '#web/app/error-page.tsx'
import { PageSkeleton } from '#web/app/page-skeleton.tsx'
import { PAGES, type Page } from '#web/app/pages.ts'
import { RequireUser } from '#web/app/require-user.tsx'
import { usePageTitle } from '#web/lib/page-title.ts'

function Titled({ title }: { title: string }) {
  usePageTitle(title)
  return null
}

function routeOf({ path, title, open, load }: Page): RouteObject {
  return {
    path,
    errorElement: <ErrorPage />,
    lazy: async () => {
      const Content = await load()
      const page = (
        <>
          <Titled title={title} />
          <Content />
        </>
      )
      return { element: open === 'anyone' ? page : <RequireUser>{page}</RequireUser> }
    },
  }
}

export function createRouter() {
  return createBrowserRouter([
    {
      element: <Outlet />,
      errorElement: <ErrorPage />,
      hydrateFallbackElement: <PageSkeleton />,
      children: [...PAGES.map(routeOf), { path: '*', element: <NotFoundPage /> }],
    },
  ])
}
