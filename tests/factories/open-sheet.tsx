import { QueryClientProvider } from '@tanstack/react-query'
import { render } from '@testing-library/react'
import { http, HttpResponse } from 'msw'
import type { ComponentType } from 'react'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import type { Board } from '#shared/schemas/ground.ts'
import type { Site } from '#shared/schemas/site.ts'
import { buildCellColumns, buildSiteView, buildTotals, SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { createQueryClient } from '#web/lib/query-client.ts'
import { SiteProvider } from '#web/lib/site-context.tsx'

export const SHEET_USER = { id: '4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', name: 'Dale Brandt', email: 'dale@alder.example' }
export const SHEET_ADDRESS = `/api/sites/${SITE_ID}`

export function buildBoard(overrides: Partial<Board> = {}): Board {
  return {
    revision: 7,
    at: '2026-12-01T22:32:07.000Z',
    totals: buildTotals(),
    lifts: [],
    ready: [],
    notYet: [],
    zones: [],
    doubtful: [],
    exceptions: [],
    verification: { tests: 0, failing: 0 },
    ...overrides,
  }
}

/** Opens a page of the invented site; other addresses show themselves. `answers`: by the path after the site's address, JSON or what makes the response. */
export function openSheet(Page: ComponentType, { site = {}, pattern, address, answers }: { site?: Partial<Site>; pattern: string; address: string; answers: Readonly<Record<string, unknown>> }) {
  const view = buildSiteView(site)
  apiStandIn.use(
    http.get('/api/me', () => HttpResponse.json({ user: SHEET_USER, csrfToken: 'token' })),
    http.get(SHEET_ADDRESS, () => HttpResponse.json(view)),
    ...Object.entries({ '/board': buildBoard(), ...answers }).map(([path, body]) => http.get(`${SHEET_ADDRESS}${path}`, () => (typeof body === 'function' ? (body as () => Response)() : HttpResponse.json(body as object)))),
  )
  const element = (
    <SiteProvider site={view} columns={buildCellColumns()}>
      <Page />
    </SiteProvider>
  )
  const router = createMemoryRouter([{ path: pattern, element }, { path: '*', element: <p>Elsewhere</p> }], { initialEntries: [address] })
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  )
  return router
}
