import { QueryClientProvider } from '@tanstack/react-query'
import { cleanup, render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import type { Role } from '#shared/policies/role.ts'
import type { Calibration } from '#shared/schemas/calibration.ts'
import type { CreateTest, RecordTestAnswer, TestDetail, TestPreview, TestSummary } from '#shared/schemas/field-test.ts'
import type { Column } from '#shared/schemas/ground.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import { convertDensity } from '#shared/units/density.ts'
import { buildCellColumns, buildSiteView, SITE_ID, ZONE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { NewTestPage } from '#web/features/tests/new-test-page.tsx'
import { ResultsPage } from '#web/features/tests/results-page.tsx'
import { TestPage } from '#web/features/tests/test-page.tsx'
import { createQueryClient } from '#web/lib/query-client.ts'
import { SiteProvider } from '#web/lib/site-context.tsx'

export const ADDRESS = `/api/sites/${SITE_ID}`
export const SHEET = `/sites/${SITE_ID}/tests/new`
export const USER = { id: '4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', name: 'Milan Petrak', email: 'milan@alder.example' }
export const CURVE_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d10'
export const STAKE: Stake = {
  id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d11',
  label: 'N1',
  lotId: 'lot-1',
  lotName: 'Pad L10, Dec 1',
  zoneId: ZONE_ID,
  lift: 10,
  cell: 5,
  easting: 1_281_475,
  northing: 231_875,
  drawnAt: '2026-12-01T16:00:00.000Z',
  drawnBy: 'Rosa Okafor',
}
const pcf = (value: number): number => convertDensity(value, 'pcf', 'kg/m3')

/** An approved curve of 115.0 pcf at 14.0 %. */
export function buildCurve(overrides: Partial<Curve> = {}): Curve {
  return {
    id: CURVE_ID,
    code: 'RB-3',
    materialId: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d12',
    materialName: 'Ridge borrow',
    method: 'D698',
    procedure: 'A',
    points: [],
    entry: null,
    apparatus: null,
    flags: [],
    withdrawReason: null,
    gs: 2.7,
    gsMeasured: true,
    coarse: null,
    reported: null,
    sampledAt: '2026-11-01T16:00:00.000Z',
    status: 'approved',
    fit: { spline: null, quadratic: null, cubic: null, refusal: null, warnings: [], drawn: [[10, pcf(110)], [14, pcf(115)], [18, pcf(110)]] },
    pair: { maxDryDensity: pcf(115), optimumMoisture: 14 },
    pairFrom: 'reported',
    approvedBy: 'Rosa Okafor',
    approvedAt: '2026-11-02T16:00:00.000Z',
    recordedBy: 'Milan Petrak',
    testsJudged: 3,
    superseded: null,
    ...overrides,
  }
}

const column = (cell: number): Column => ({ revision: 7, cell, zoneId: ZONE_ID, ready: false, nextLift: null, blockedBy: null, rows: [] })

export function buildSummary(overrides: Partial<TestSummary> = {}): TestSummary {
  return {
    id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d20',
    number: 'T-0142',
    seq: 142,
    purpose: 'required',
    method: 'plain',
    zoneId: ZONE_ID,
    lift: 10,
    cell: 5,
    lotId: 'lot-1',
    easting: 1_281_475,
    northing: 231_875,
    sampledAt: '2026-12-01T20:00:00.000Z',
    recordedBy: { id: USER.id, name: USER.name },
    curveId: CURVE_ID,
    curveCode: 'RB-3',
    outcome: 'fail',
    treatedAsFail: false,
    near: false,
    headline: 'Too loose, moisture in range',
    rc: 92.8126,
    moisture: 13.2,
    moistureDeviation: -0.8,
    dryDensity: pcf(106.73),
    current: true,
    superseded: false,
    voided: false,
    flagged: false,
    ...overrides,
  }
}

export function buildDetail(overrides: Partial<TestDetail> = {}): TestDetail {
  const summary = buildSummary()
  return {
    ...summary,
    follows: null,
    chain: [{ id: summary.id, number: summary.number, outcome: 'fail', headline: summary.headline, rc: summary.rc, sampledAt: summary.sampledAt, voided: false }],
    stakeLabel: null,
    surfaceUm: null,
    depthUm: 152_400,
    recordedAt: '2026-12-01T20:30:00.000Z',
    oversizePercent: null,
    wetDensity: pcf(120.8),
    sheet: { method: 'plain', densityUnit: 'pcf', densityIs: 'dry', density: 106.73, moisture: { method: 'stated', percent: 13.2 } },
    remarks: '',
    verdict: {
      outcome: 'fail',
      treatedAsFail: false,
      near: false,
      reasons: [{ code: 'too-loose', message: '92.8 % compaction, limit 95 %.', value: 92.8126, limit: '95' }],
      suspicions: [],
      advice: [],
      rc: 92.8126,
      moistureDeviation: -0.8,
      saturation: 61.2,
      airVoids: 14,
      maxDryDensityUsed: pcf(115),
      optimumUsed: 14,
      gsUsed: 2.7,
      oversizeCorrected: false,
      headline: summary.headline,
      against: {
        criteria: [{ kind: 'rc-min', text: '95' }],
        rounding: { method: 'absolute' },
        repeatability: { rc: 0.5, moisture: 0.3 },
        waterDensity: 1000,
        curve: { maxDryDensity: pcf(115), optimumMoisture: 14, gs: 2.7, gsMeasured: true },
      },
    },
    flags: [],
    marks: [{ kind: 'fail', cells: [5, 6] }],
    speaksFor: [],
    orderId: null,
    gauge: null,
    void: null,
    ...overrides,
  }
}

/** What the API was asked to save, and what it answers while a sheet is filled in. */
export function answerSheet({ preview, curves = [buildCurve()], calibrations = [] }: { preview?: Partial<TestPreview>; curves?: readonly Curve[]; calibrations?: readonly Calibration[] } = {}): CreateTest[] {
  const sent: CreateTest[] = []
  const saved: RecordTestAnswer = { id: buildSummary().id, number: 'T-0219', outcome: 'fail', headline: 'Too dry, dense enough', revision: 8, marked: 2, orderId: null, orderNumber: null }
  apiStandIn.use(
    http.get('/api/me', () => HttpResponse.json({ user: USER, csrfToken: 'token' })),
    http.get(ADDRESS, () => HttpResponse.json(buildSiteView())),
    http.get(`${ADDRESS}/calibrations`, () => HttpResponse.json({ calibrations })),
    http.get(`${ADDRESS}/gauges`, () => HttpResponse.json({ gauges: [] })),
    http.get(`${ADDRESS}/stakes`, () => HttpResponse.json({ stakes: [STAKE] })),
    http.get(`${ADDRESS}/curves`, () => HttpResponse.json({ curves })),
    http.get(`${ADDRESS}/curves/:id`, () => HttpResponse.json(buildCurve())),
    http.get(`${ADDRESS}/lots`, () => HttpResponse.json({ lots: [] })),
    http.get(`${ADDRESS}/columns/:cell`, ({ params }) => HttpResponse.json(column(Number(params.cell)))),
    http.post(`${ADDRESS}/tests/preview`, () => HttpResponse.json({ zoneId: ZONE_ID, cell: 5, lotName: 'Pad L10, Dec 1', marks: [], meets: [], gauge: null, ...preview })),
    http.post(`${ADDRESS}/tests`, async ({ request }) => {
      sent.push((await request.json()) as CreateTest)
      return HttpResponse.json(saved, { status: 201 })
    }),
    http.get(`${ADDRESS}/tests/:id`, () => HttpResponse.json(buildDetail())),
    http.get(`${ADDRESS}/tests/:id/verdicts`, () => HttpResponse.json({ verdicts: [] })),
    http.get(`${ADDRESS}/events`, () => HttpResponse.json({ events: [], next: null })),
  )
  return sent
}

const BAND = { kind: 'moisture-band', lowText: '-2', highText: '2' } as const

/** A page of the results at an address, for a role of the invented site; its zone asks for 95 % and ±2 points. */
export function openTestsPage(address: string, role: Role = 'technician') {
  const view = buildSiteView({ role })
  const site = { ...view, zones: view.zones.map((zone) => ({ ...zone, specification: { ...zone.specification, criteria: [...zone.specification.criteria, BAND] } })) }
  const columns = buildCellColumns()
  const router = createMemoryRouter(
    [
      { path: '/sites/:siteId/tests', element: <ResultsPage /> },
      { path: '/sites/:siteId/tests/new', element: <NewTestPage /> },
      { path: '/sites/:siteId/tests/:testId', element: <TestPage /> },
    ],
    { initialEntries: [address] },
  )
  render(
    <QueryClientProvider client={createQueryClient()}>
      <SiteProvider site={site} columns={columns}>
        <RouterProvider router={router} />
      </SiteProvider>
    </QueryClientProvider>,
  )
  return router
}

/** The same address opened anew, as after a reload. */
export function reloadTestsPage(address: string, role: Role = 'technician') {
  cleanup()
  return openTestsPage(address, role)
}

/** Types into a field and leaves it. */
export async function enter(label: string, text: string): Promise<void> {
  const field = await screen.findByLabelText<HTMLInputElement>(label)
  await userEvent.clear(field)
  await userEvent.click(field)
  await userEvent.paste(text)
  await userEvent.tab()
}

/** What is said beneath a field: its error, its flag or its hint. */
export function saidAt(label: string): string | null {
  const ids = screen.getByLabelText(label).getAttribute('aria-describedby')?.split(' ') ?? []
  return document.getElementById(ids.at(-1) ?? '')?.textContent ?? null
}

/** The sand cone sheet S-1 of the check values, in pounds and pcf, moisture as stated. */
export async function enterS1(): Promise<void> {
  await userEvent.selectOptions(await screen.findByLabelText('Masses at the hole in'), 'lb')
  await userEvent.selectOptions(screen.getByLabelText('Density of sand in'), 'pcf')
  await userEvent.click(screen.getByRole('radio', { name: 'Stated' }))
  await enter('Apparatus and sand before', '10.20')
  await enter('Apparatus and sand after', '3.20')
  await enter('Sand in cone and plate', '0.53')
  await enter('Bulk density of sand', '99')
  await enter('Moist soil from hole', '8.11')
  await enter('Moisture of dry mass', '11.11')
}
