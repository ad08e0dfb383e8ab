import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import { buildBoard, openSheet, SHEET_ADDRESS } from '#tests/factories/open-sheet.tsx'
import { buildLot, F_CM3, LOT_ID } from '#tests/factories/lot-view.ts'
import { SITE_ID, ZONE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { FrequencyPage } from '#web/features/frequency/frequency-page.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'

const STAKE = { id: 'stake-1', label: 'N1', lotId: LOT_ID, lotName: 'Pad L10, Dec 1', zoneId: ZONE_ID, lift: 10, cell: 5, easting: 1_281_475.3, northing: 231_874.5, drawnAt: '2026-12-01T20:00:00.000Z', drawnBy: 'June Tavares' }
const DOUBTFUL = { testId: 'test-218', number: 'T-0218', cell: 6, lift: 9, headline: 'Above the zero-air-voids line' }
const RELEASED = buildLot({ id: 'lot-9', seq: 9, name: 'Pad L9, Nov 30', standing: 'released', releasedAt: '2026-11-30T23:00:00.000Z', owed: 0, reruns: 0, required: 4, taken: 4, passing: 4 })

function open(answers: Readonly<Record<string, unknown>> = {}, role: Role = 'technician', search = '') {
  return openSheet(FrequencyPage, {
    site: { role },
    pattern: '/sites/:siteId/frequency',
    address: `/sites/${SITE_ID}/frequency${search}`,
    answers: {
      '/lots': { lots: [RELEASED, buildLot()] },
      '/frequency/series': { days: [{ day: '2026-11-30', placedCm3: 4 * F_CM3, spokenCm3: 4 * F_CM3 }, { day: '2026-12-01', placedCm3: 8 * F_CM3, spokenCm3: 5 * F_CM3 }] },
      '/stakes': { stakes: [STAKE] },
      '/rework': { orders: [] },
      '/board': buildBoard({ doubtful: [DOUBTFUL] }),
      ...answers,
    },
  })
}

beforeEach(() => keepCsrfToken('token'))

describe('the Frequency sheet', () => {
  it('draws placed against spoken for and says of what', async () => {
    open()
    expect((await screen.findByRole('img', { name: /placed and .* spoken for/ })).getAttribute('aria-label')).toBe('4,000\u2009cy placed and 2,500\u2009cy spoken for by Dec 1')
    expect(screen.getByRole('heading', { level: 1 }).textContent).toBe('Volume placed and volume spoken for all zones, compacted cy, one test speaks for 500\u2009cy')
  })

  it('leads to the stakes and to the doubtful results', async () => {
    open()
    expect((await screen.findByRole('link', { name: 'Record the test at N1' })).getAttribute('href')).toBe(`/sites/${SITE_ID}/tests/new?stake=stake-1`)
    expect(screen.getByRole('link', { name: 'Record the re-run of T-0218' }).getAttribute('href')).toBe(`/sites/${SITE_ID}/tests/new?follows=test-218&kind=rerun`)
    expect(screen.getByText('Run T-0218 again, cell C2').textContent).toContain('C2')
  })

  it('lists the lots newest first, each with its blocks, its counts and where it stands', async () => {
    open()
    const rows = within(await screen.findByRole('table', { name: 'Register of lots' })).getAllByRole('row').slice(1)
    expect(rows.map((row) => within(row).getByRole('rowheader').textContent)).toEqual(['Pad L10, Dec 1', 'Pad L9, Nov 30'])
    expect(within(rows[0] as HTMLElement).getByRole('img').getAttribute('aria-label')).toBe('Pad L10, Dec 1: 1 meets spec, 1 suspect, 2 owed')
    expect(within(rows[0] as HTMLElement).getByText('Owes 1, run 1 again').className).toContain('text-bad')
    expect(within(rows[1] as HTMLElement).getByText('Released Nov 30').className).toContain('text-good')
  })

  it('keeps to a zone and a standing, in its address, and counts what it shows', async () => {
    const router = open()
    await screen.findByText('2 of 2 lots')
    await userEvent.selectOptions(screen.getByLabelText('Standing'), 'short')
    expect((await screen.findByText('1 of 2 lots')).textContent).toBe('1 of 2 lots')
    expect(router.state.location.search).toBe('?standing=short')
    expect(screen.queryByRole('button', { name: 'Pad L9, Nov 30' })).toBeNull()
  })

  it('sums to totals that are those of the lots', async () => {
    open()
    const table = await screen.findByRole('table', { name: 'Totals by zone and material' })
    const sums = within(table).getByRole('row', { name: /All of these/ })
    expect(within(sums).getAllByRole('cell').map((cell) => cell.textContent)).toEqual(['', '2', '4,000', '1,000', '8', '6', '5', '2'])
  })

  it('draws stakes for a lot that owes, for those who may', async () => {
    const sent: unknown[] = []
    apiStandIn.use(
      http.post(`${SHEET_ADDRESS}/stakes/draw`, async ({ request }) => {
        sent.push(await request.json())
        return HttpResponse.json({ id: 'x', revision: 8, stakes: [STAKE] }, { status: 201 })
      }),
    )
    open()
    await userEvent.click(await screen.findByRole('button', { name: 'Draw stakes for Pad L10, Dec 1' }))
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]).toMatchObject({ lotId: LOT_ID })
  })

  it('offers the owner’s representative neither a draw nor a record', async () => {
    open({}, 'owner-rep')
    await screen.findByText('2 of 2 lots')
    expect(screen.queryByRole('button', { name: /Draw stakes/ })).toBeNull()
    expect(screen.queryByRole('link', { name: /^Record/ })).toBeNull()
  })

  it('opens a lot with its cells and its stakes', async () => {
    open({ '/tests': { tests: [], total: 0 } })
    await userEvent.click(await screen.findByRole('button', { name: 'Pad L10, Dec 1' }))
    const dialog = await screen.findByRole('dialog', { name: 'Pad L10, Dec 1' })
    expect(within(dialog).getByText(/^Cells/).textContent).toBe('Cells A1 to D1. Specification version 1, as it stood when the lot began.')
    expect(within(dialog).getByRole('list', { name: 'Stakes of this lot' }).textContent).toContain('Cell B2')
    expect((await within(dialog).findByText('No test was taken in this lot yet.')).textContent).toContain('No test')
  })

  it('says what to do first while nothing is placed', async () => {
    open({ '/lots': { lots: [] }, '/frequency/series': { days: [] }, '/stakes': { stakes: [] }, '/board': buildBoard() })
    expect((await screen.findByText('Nothing is placed yet')).textContent).toBe('Nothing is placed yet')
    expect(screen.getByText('No test is owed, and no result wants a re-run.').textContent).toContain('No test is owed')
  })

  it('shows five hundred lots a hundred at a time', async () => {
    open({ '/lots': { lots: Array.from({ length: 500 }, (_, index) => buildLot({ id: `lot-${index}`, seq: index, name: `Pad L1, lot ${index}` })) } })
    const table = await screen.findByRole('table', { name: 'Register of lots' })
    expect(within(table).getAllByRole('rowheader')).toHaveLength(100)
    expect(screen.getByText('500 of 500 lots').textContent).toContain('500')
    expect(screen.getByRole('button', { name: 'Show 100 more of 500 lots' }).textContent).toContain('100 more')
  })
})
