import { QueryClientProvider } from '@tanstack/react-query'
import { render, screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { delay, http, HttpResponse } from 'msw'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Board } from '#shared/schemas/ground.ts'
import type { Role } from '#shared/policies/role.ts'
import { buildCellColumns, buildSiteView, buildTotals, SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { RequireRole, SiteLayout } from '#web/app/site-layout.tsx'
import { siteNav } from '#web/app/site-nav.ts'
import { PATTERNS } from '#web/app/paths.ts'
import { createQueryClient } from '#web/lib/query-client.ts'
import { useSite } from '#web/lib/site-context.tsx'

const ADDRESS = `/api/sites/${SITE_ID}`
const USER = { id: '4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', name: 'Rosa Okafor', email: 'rosa@alder.example' }

function Page() {
  const { label, zoneOfCell, units, cells } = useSite()
  return (
    <h1>
      {label(6)}, {zoneOfCell(6)?.name}, {cells.length} cells, {units.thickness(203_200)}
    </h1>
  )
}

function board(openOrders: number): Board {
  return {
    revision: 7,
    at: '2026-12-01T22:32:07.000Z',
    totals: buildTotals({ openOrders }),
    lifts: [],
    ready: [],
    notYet: [],
    zones: [],
    doubtful: [],
    exceptions: [],
    verification: { tests: 0, failing: 0 },
  }
}

function answer(role: Role = 'qc-lead', openOrders = 0): void {
  apiStandIn.use(
    http.get('/api/me', () => HttpResponse.json({ user: USER, csrfToken: 'token' })),
    http.get(ADDRESS, () => HttpResponse.json(buildSiteView({ role }))),
    http.get(`${ADDRESS}/cells`, () => HttpResponse.json(buildCellColumns())),
    http.get(`${ADDRESS}/board`, () => HttpResponse.json(board(openOrders))),
  )
}

function openPage() {
  const router = createMemoryRouter(
    [
      {
        path: '/sites/:siteId',
        element: <SiteLayout />,
        children: [
          { path: 'ground', element: <Page /> },
          {
            path: 'lab',
            element: (
              <RequireRole verb="registers.see">
                <p>The laboratory</p>
              </RequireRole>
            ),
          },
        ],
      },
    ],
    { initialEntries: [`/sites/${SITE_ID}/ground`] },
  )
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  )
  return router
}

beforeEach(() => answer())

describe('the site’s layout', () => {
  it('gives the page the site, its cells and its units, and says in the head which site it is', async () => {
    openPage()
    expect((await screen.findByRole('heading', { level: 1 })).textContent).toBe('C2, Building pad, 12 cells, 8\u2009in')
    const head = screen.getByRole('banner')
    expect(within(head).getByText('Alder Flats yard').textContent).toBe('Alder Flats yard')
    expect(within(head).getByText(/14\.6/).textContent).toBe('Phase 2 fill · 14.6\u2009ac')
    expect(within(head).getByRole('button', { name: /Rosa Okafor QC lead/ }).textContent).toContain('QC lead')
    expect(within(head).getByText('Catching up').textContent).toBe('Catching up')
  })

  it('stands as a sheet on its way until the site was read', async () => {
    apiStandIn.use(http.get(ADDRESS, async () => delay('infinite')))
    openPage()
    expect((await screen.findByRole('status')).getAttribute('aria-label')).toBe('The site is on its way')
  })

  it('says that the page is not here to somebody who is not a member', async () => {
    apiStandIn.use(
      http.get(ADDRESS, () => HttpResponse.json({ code: 'not_found', message: 'Not found.' }, { status: 404 })),
      http.get(`${ADDRESS}/cells`, () => HttpResponse.json({ code: 'not_found', message: 'Not found.' }, { status: 404 })),
    )
    openPage()
    expect((await screen.findByRole('heading', { level: 1 })).textContent).toBe('This page is not here')
  })

  it('says what the server said when the site could not be read, and reads it again when asked to', async () => {
    apiStandIn.use(http.get(ADDRESS, () => HttpResponse.json({ code: 'forbidden', message: 'Your account is closed on this site.' }, { status: 403 }), { once: true }))
    openPage()
    expect((await screen.findByRole('alert')).textContent).toMatch(/Your account is closed on this site\./)
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }))
    expect((await screen.findByRole('heading', { level: 1 })).textContent).toMatch(/^C2/)
  })

  it('tells a role that may not see a sheet so, and leads back to the Ground', async () => {
    answer('operator')
    const router = openPage()
    await screen.findByRole('heading', { level: 1 })
    await router.navigate(`/sites/${SITE_ID}/lab`)
    expect((await screen.findByText('This sheet is not for your role')).textContent).toBe('This sheet is not for your role')
    expect(screen.queryByText('The laboratory')).toBeNull()
    expect(screen.getByRole('link', { name: 'To the Ground' }).getAttribute('href')).toBe(`/sites/${SITE_ID}/ground`)
  })
})

describe('the sheets in the head', () => {
  const all = [PATTERNS.ground, PATTERNS.frequency, PATTERNS.tests, PATTERNS.rework, PATTERNS.lab]
  const labels = (role: Role, patterns: readonly string[] = all) => siteNav(SITE_ID, role, 2, patterns).map(({ label }) => label)

  it('are all there for the office', () => {
    for (const role of ['qc-lead', 'technician', 'superintendent', 'owner-rep'] as const) {
      expect(labels(role)).toEqual(['Ground', 'Frequency', 'Results', 'Rework', 'Lab'])
    }
  })

  it('are the Ground and the rework for an operator', () => {
    expect(labels('operator')).toEqual(['Ground', 'Rework'])
  })

  it('leave out what is not there yet', () => {
    expect(labels('qc-lead', [PATTERNS.ground])).toEqual(['Ground'])
  })

  it('count the open orders on the rework', () => {
    expect(siteNav(SITE_ID, 'operator', 2, all)[1]).toEqual({ label: 'Rework', to: `/sites/${SITE_ID}/rework`, count: 2, countOf: 'open orders' })
    expect(siteNav(SITE_ID, 'operator', 1, all)[1]?.countOf).toBe('open order')
  })
})
