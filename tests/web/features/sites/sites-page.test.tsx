import { QueryClientProvider } from '@tanstack/react-query'
import { render, screen } from '@testing-library/react'
import { http, HttpResponse } from 'msw'
import { MemoryRouter } from 'react-router-dom'
import { beforeEach, describe, expect, it } from 'vitest'
import type { SiteListItem } from '#shared/schemas/site.ts'
import { buildCellColumns, buildSiteListItem, buildTotals, SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { SitesPage } from '#web/features/sites/sites-page.tsx'
import { createQueryClient } from '#web/lib/query-client.ts'

function openPage(sites: readonly SiteListItem[]) {
  apiStandIn.use(http.get('/api/sites', () => HttpResponse.json({ sites })))
  render(
    <QueryClientProvider client={createQueryClient()}>
      <MemoryRouter>
        <SitesPage />
      </MemoryRouter>
    </QueryClientProvider>,
  )
}

beforeEach(() => apiStandIn.use(http.get('/api/sites/:siteId/cells', () => HttpResponse.json(buildCellColumns()))))

describe('my sites', () => {
  it('says of each site what is short, in rework and ready, and leads to its Ground', async () => {
    const totals = buildTotals({ testsOwed: 2, testsRequired: 219, cellsInRework: 13, openOrders: 2, readyCm3: 3410 * 764_554.857984, readyCells: 92 })
    openPage([buildSiteListItem({ totals })])
    const row = await screen.findByRole('listitem')
    expect(screen.getByRole('link', { name: 'Alder Flats yard' }).getAttribute('href')).toBe(`/sites/${SITE_ID}/ground`)
    const facts = [...row.querySelectorAll('dd')].map((fact) => [...fact.children].map((part) => part.textContent))
    expect(facts).toEqual([
      ['2', 'of 219 required'],
      ['13 cells', '2 open orders'],
      ['3,410\u2009cy', '92 cells'],
    ])
    expect(row.textContent).toContain('You are here as QC lead')
  })

  it('says what to do to somebody who belongs to no site', async () => {
    openPage([])
    expect((await screen.findByText('No site yet')).parentElement?.textContent).toMatch(/QC lead of a site adds people/)
  })

  it('says that the sites are on their way, and what went wrong when they do not come', async () => {
    apiStandIn.use(http.get('/api/sites', () => HttpResponse.json({ code: 'forbidden', message: 'Sign in again.' }, { status: 403 })))
    render(
      <QueryClientProvider client={createQueryClient()}>
        <MemoryRouter>
          <SitesPage />
        </MemoryRouter>
      </QueryClientProvider>,
    )
    expect(screen.getByRole('status').getAttribute('aria-label')).toBe('Your sites are on their way')
    expect((await screen.findByRole('alert')).textContent).toMatch(/Sign in again\..*Nothing is lost/)
  })
})
