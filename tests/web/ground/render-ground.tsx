import { QueryClientProvider } from '@tanstack/react-query'
import { render } from '@testing-library/react'
import { http, HttpResponse } from 'msw'
import type { ReactNode } from 'react'
import { createMemoryRouter, RouterProvider, useLocation } from 'react-router-dom'
import type { Role } from '#shared/policies/role.ts'
import type { Board } from '#shared/schemas/ground.ts'
import type { Lot, Stake } from '#shared/schemas/lot.ts'
import type { Release } from '#shared/schemas/release.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { buildBoard, buildMaterial, buildOrder, buildPlacement, buildTestSummary, buildTwoZoneCells, buildTwoZoneSite } from '#tests/factories/ground-view.ts'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { GroundViewProvider } from '#web/features/ground/plan/ground-view.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { createQueryClient } from '#web/lib/query-client.ts'
import { SiteProvider } from '#web/lib/site-context.tsx'

export const GROUND_API = `/api/sites/${SITE_ID}`

interface Answers {
  readonly board?: Board
  readonly stakes?: readonly Stake[]
  readonly lots?: readonly Lot[]
  readonly releases?: readonly Release[]
  readonly orders?: readonly Order[]
}

/** What the API answers about the site; registers that a role may not see are not answered, so that asking fails. */
export function answerGround(role: Role, { board = buildBoard(), stakes = [], lots = [], releases = [], orders = [buildOrder()] }: Answers = {}): void {
  keepCsrfToken('token')
  const open = [
    http.get(GROUND_API, () => HttpResponse.json(buildTwoZoneSite({ role }))),
    http.get(`${GROUND_API}/board`, () => HttpResponse.json(board)),
    http.get(`${GROUND_API}/stakes`, () => HttpResponse.json({ stakes })),
    http.get(`${GROUND_API}/rework`, () => HttpResponse.json({ orders })),
  ]
  const registers = [
    http.get(`${GROUND_API}/lots`, () => HttpResponse.json({ lots })),
    http.get(`${GROUND_API}/releases`, () => HttpResponse.json({ releases })),
    http.get(`${GROUND_API}/placements`, () => HttpResponse.json({ placements: [buildPlacement()] })),
    http.get(`${GROUND_API}/materials`, () => HttpResponse.json({ materials: [buildMaterial()] })),
    http.get(`${GROUND_API}/tests`, () => HttpResponse.json({ tests: [buildTestSummary()], total: 1 })),
    http.get(`${GROUND_API}/curves`, () => HttpResponse.json({ curves: [] })),
  ]
  apiStandIn.use(...open, ...(role === 'operator' ? [] : registers))
}

function Address() {
  const { search } = useLocation()
  return <output aria-label="address">{search}</output>
}

/** A part of the Ground page as a role sees it. */
export function renderGround(part: ReactNode, { role = 'superintendent', search = '', bare = false }: { role?: Role; search?: string; bare?: boolean } = {}): void {
  const content = bare ? part : <GroundViewProvider>{part}</GroundViewProvider>
  const router = createMemoryRouter(
    [
      {
        path: '/sites/:siteId/ground',
        element: (
          <SiteProvider site={buildTwoZoneSite({ role })} columns={buildTwoZoneCells()}>
            {content}
            <Address />
          </SiteProvider>
        ),
      },
      { path: '*', element: <p>Elsewhere</p> },
    ],
    { initialEntries: [`/sites/${SITE_ID}/ground${search}`] },
  )
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  )
}
