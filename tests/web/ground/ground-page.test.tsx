import { fireEvent, screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { describe, expect, it, vi } from 'vitest'
import { GROUND_FLAGS } from '#shared/domain/ground-state.ts'
import type { GroundCut } from '#shared/ground-codec.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Column } from '#shared/schemas/ground.ts'
import { buildSheet } from '#tests/factories/ground-view.ts'
import { ZONE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { GroundPage } from '#web/features/ground/ground-page.tsx'
import type { GroundView } from '#web/lib/ground-store.ts'
import { answerGround, GROUND_API, renderGround } from './render-ground.tsx'

const sheet = buildSheet({ 0: { lift: 2, state: 'meets-spec', flags: ['near'] }, 1: { lift: 2, state: 'rework' } })

vi.mock('#web/lib/use-ground.ts', () => ({
  useGround: (_siteId: string, cut: GroundCut = { kind: 'surface' }): GroundView => ({
    sheet: { ...sheet, cut },
    revision: 7,
    changedCells: [],
    from: null,
    totals: null,
    totalsRevision: 0,
    status: 'live',
    asOf: 0,
    offlineSince: null,
    error: null,
  }),
}))

const COLUMN: Column = {
  revision: 7,
  cell: 0,
  zoneId: ZONE_ID,
  ready: false,
  nextLift: 3,
  blockedBy: { lift: 2, state: 'meets-spec', reason: 'Tests met, waiting for release (lift 2)' },
  rows: [2, 1, 0].map((lift) => ({
    lift,
    bottomUm: 0,
    topUm: lift * 203_200,
    state: lift === 2 ? ('meets-spec' as const) : ('released' as const),
    flags: lift === 2 ? GROUND_FLAGS.near : 0,
    volumeCm3: 1,
    spokenCm3: 1,
    lotId: null,
    lotName: null,
    lotRequired: 1,
    lotOwed: 0,
    materialName: null,
    placedAt: null,
    test: lift === 0 ? null : { id: `test-${lift}`, number: `T-000${lift}`, rc: 95.1, moisture: 12, moistureDeviation: -1.9, dryDensity: 1_850, outcome: 'pass' as const, near: lift === 2, curveId: 'curve-1', headline: 'Meets spec', purpose: 'required' as const },
    orderId: null,
    why: '',
  })),
}

function openPage(role: Role, search: string): void {
  answerGround(role)
  apiStandIn.use(http.get(`${GROUND_API}/columns/:cell`, () => HttpResponse.json(COLUMN)))
  renderGround(<GroundPage />, { role, search: `?list=1${search}`, bare: true })
}

const address = (): string | null => screen.getByLabelText('address').textContent

describe('the Ground as a list', () => {
  it('says the states the map shows, and opens a cell', async () => {
    openPage('superintendent', '')
    const table = await screen.findByRole('table', { name: 'Cells, working surface' })
    const first = within(table).getAllByRole('row')[1]
    expect(first?.textContent).toMatch(/^A1Building pad2Meets spec, near a limit/)
    await userEvent.click(within(table).getByRole('button', { name: 'A1' }))
    expect(address()).toBe('?list=1&cell=A1')
    expect((await screen.findByRole('heading', { name: /^Cell A1/ })).textContent).toBe('Cell A1 Building pad, 50 × 50 ft')
  })

  it('is narrowed by a word and says when nothing is left', async () => {
    openPage('superintendent', '')
    await userEvent.type(await screen.findByLabelText('Find'), 'rework')
    expect(within(screen.getByRole('table')).getAllByRole('row')).toHaveLength(4)
    await userEvent.type(screen.getByLabelText('Find'), 'nowhere')
    expect(screen.getByText('No cell is like that').textContent).toBe('No cell is like that')
  })
})

describe('the lift rail', () => {
  it('cuts the sheet at the middle of a lift and goes into the address', async () => {
    openPage('superintendent', '')
    await userEvent.click(await screen.findByRole('radio', { name: /^Lift 1, up to 0\.67\sft: 67 % released, 33 % rework/ }))
    expect(address()).toBe('?list=1&cut=101600')
    expect(screen.getByText('Showing').nextElementSibling?.textContent).toBe('Lift 1 cut at 0.33\u2009ft')
  })

  it('steps by [ and ], and L goes to the map and back', async () => {
    openPage('superintendent', '')
    await screen.findByRole('radio', { name: /^Lift 1/ })
    fireEvent.keyDown(document.body, { key: '[' })
    expect(address()).toBe('?list=1&cut=304800')
    fireEvent.keyDown(document.body, { key: ']' })
    expect(address()).toBe('?list=1')
  })

  it('shows its keys at ?', async () => {
    openPage('superintendent', '')
    await screen.findByRole('radio', { name: /^Lift 1/ })
    fireEvent.keyDown(document.body, { key: '?' })
    expect((await screen.findByRole('dialog', { name: 'Keys of the Ground' })).textContent).toMatch(/Arrow keys/)
  })
})

describe('the selected cell', () => {
  it('says why it stands so, shows its log with links to results, and what the role may do', async () => {
    openPage('qc-lead', '&cell=A1')
    expect((await screen.findByText('Tests met, waiting for release (lift 2).')).tagName).toBe('P')
    const log = within(screen.getByRole('list', { name: 'Lifts of cell A1' }))
    expect(log.getByRole('link', { name: /^95.1\s%, open T-0002/ }).getAttribute('href')).toMatch(/tests\/test-2$/)
    expect(log.getByRole('img', { name: 'Meets spec, near a limit' }).getAttribute('data-state')).toBe('meets-spec')
    const section = screen.getByRole('region', { name: /^Cell A1/ })
    expect(within(section).getAllByRole('button').map((button) => button.textContent)).toEqual(['Close', 'Place fill', 'Release', 'Issue rework order'])
    expect(within(section).getByRole('link', { name: 'Record test' }).getAttribute('href')).toMatch(/tests\/new\?cell=A1&lift=2$/)
  })

  it('gives an operator the log without results to open and nothing to record', async () => {
    openPage('operator', '&cell=A1')
    await screen.findByText('Tests met, waiting for release (lift 2).')
    const section = screen.getByRole('region', { name: /^Cell A1/ })
    expect(within(section).queryAllByRole('link')).toEqual([])
    expect(within(section).getAllByRole('button').map((button) => button.textContent)).toEqual(['Close'])
  })

  it('leaves by Escape', async () => {
    openPage('superintendent', '&cell=A1')
    await screen.findByRole('heading', { name: /^Cell A1/ })
    fireEvent.keyDown(document.body, { key: 'Escape' })
    expect(address()).toBe('?list=1')
  })
})
