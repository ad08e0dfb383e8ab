import { screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { describe, expect, it } from 'vitest'
import type { Lot } from '#shared/schemas/lot.ts'
import { buildBoard, buildNotYet, buildRelease, buildSheet, CELL_LIFT_CM3 } from '#tests/factories/ground-view.ts'
import { buildTotals, ZONE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { GroundPanel } from '#web/features/ground/panel/ground-panel.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { answerGround, GROUND_API, renderGround } from './render-ground.tsx'

function Shown() {
  const { shown } = useGroundView()
  return <output aria-label="shown">{shown.join(' ')}</output>
}

const panel = (
  <>
    <GroundPanel surface={buildSheet()} />
    <Shown />
  </>
)

const lot: Lot = {
  id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d31',
  seq: 4,
  name: 'Pad L2, Dec 1',
  zoneId: ZONE_ID,
  lift: 2,
  materialId: 'm',
  materialName: 'North cut',
  workDay: '2026-12-01',
  specificationVersion: 1,
  cells: [0, 1],
  volumeCm3: 2 * CELL_LIFT_CM3,
  spokenCm3: 0,
  areaMm2: 0,
  fCm3: 0,
  required: 3,
  taken: 1,
  passing: 1,
  owed: 2,
  reruns: 0,
  staked: 0,
  standing: 'owes',
  releasedAt: null,
  blocks: [],
}
const stake = { id: 'stake-1', label: 'N1', lotId: lot.id, lotName: lot.name, zoneId: ZONE_ID, lift: 2, cell: 1, easting: 1_281_475.25, northing: 231_925, drawnAt: '2026-12-01T20:00:00.000Z', drawnBy: 'Ines Marsh' }

describe('the superintendent’s panel', () => {
  it('says how much may receive the next lift, in cells and loads, and why the rest may not', async () => {
    answerGround('superintendent')
    renderGround(panel, { role: 'superintendent' })
    expect((await screen.findByText('123 cy', { exact: false, selector: 'span.text-figure' })).textContent).toBe('123\u00a0cy')
    // 123.457 cy by loads of 20 cy loose, half of it left
    expect((await screen.findByText('2 cells, about 12 loads')).tagName).toBe('SPAN')
    const rows = within(screen.getByRole('list', { name: 'Not yet' })).getAllByRole('listitem')
    expect(rows.map((row) => row.querySelector('b')?.textContent)).toEqual([
      'Waiting for 2 tests',
      'Rework R-014, too dry',
      'Result can’t be right, run it again',
      'Tests met, waiting for release',
      'Foundation waits for inspection',
    ])
  })

  it('draws a group out on the sheet and lets it go', async () => {
    answerGround('superintendent')
    renderGround(panel)
    const button = await screen.findByRole('button', { name: /^Show the 2 cells of Building pad, lift 2/ })
    await userEvent.click(button)
    expect(screen.getByLabelText('shown').textContent).toBe('4 5')
    await userEvent.click(button)
    expect(screen.getByLabelText('shown').textContent).toBe('')
  })

  it('asks for a release, and says so once it is asked for', async () => {
    answerGround('superintendent')
    renderGround(panel)
    expect((await screen.findByRole('button', { name: 'Ask for release' })).textContent).toBe('Ask for release')
  })

  it('names the release that is asked for already', async () => {
    answerGround('superintendent', { releases: [buildRelease()] })
    renderGround(panel)
    expect((await screen.findByText('Release asked for, A-012')).textContent).toBe('Release asked for, A-012')
    expect(screen.queryByRole('button', { name: 'Ask for release' })).toBeNull()
  })

  it('says on a new site what to do first', async () => {
    answerGround('superintendent', { board: buildBoard({ totals: buildTotals(), ready: [], notYet: [buildNotYet({ reason: 'awaiting-inspection', lift: 0, cells: [0, 1, 2] })] }) })
    renderGround(panel)
    expect((await screen.findByText(/^No fill placed yet/)).textContent).toBe('No fill placed yet. Foundation waits for inspection in 3 cells. The QC lead records its inspection first.')
  })

  it('says that the board cannot be read, and reads it again', async () => {
    answerGround('superintendent')
    let answers = 0
    apiStandIn.use(
      http.get(`${GROUND_API}/board`, () => {
        answers += 1
        return answers === 1 ? HttpResponse.json({ code: 'forbidden', message: 'You may not do that here.' }, { status: 403 }) : HttpResponse.json(buildBoard())
      }),
    )
    renderGround(panel)
    await userEvent.click(await screen.findByRole('button', { name: 'Try again' }))
    expect((await screen.findByRole('heading', { name: 'May receive the next lift' })).tagName).toBe('H2')
  })
})

describe('the QC lead’s panel', () => {
  it('says how many tests are owed, where to go, which lots are short and what to run again', async () => {
    answerGround('qc-lead', { stakes: [stake], lots: [lot] })
    renderGround(panel, { role: 'qc-lead' })
    expect((await screen.findByText('2 tests', { exact: false, selector: 'span.text-figure' })).textContent).toBe('2\u00a0tests')
    const places = within(await screen.findByRole('list', { name: 'Stakes to go to' }))
    expect(places.getByText('Cell B1, Pad lift 2').textContent).toBe('Cell B1, Pad lift 2')
    expect(places.getByRole('link', { name: 'Record the test at N1' }).getAttribute('href')).toMatch(/tests\/new\?stake=stake-1$/)
    const short = within(await screen.findByRole('list', { name: 'Lots short of tests' }))
    expect(short.getByText(/^owes 2 of 3/).textContent).toMatch(/^owes 2 of 3; 123\u2009cy not spoken for/)
    expect(screen.getByRole('link', { name: 'Run it again' }).getAttribute('href')).toMatch(/follows=test-218&kind=rerun$/)
    expect(screen.getByRole('button', { name: 'Release' }).textContent).toBe('Release')
    expect(screen.getByRole('button', { name: 'Record inspection' }).textContent).toBe('Record inspection')
  })

  it('draws stakes for a lot that has too few', async () => {
    answerGround('technician', { lots: [lot] })
    let asked: unknown
    apiStandIn.use(
      http.post(`${GROUND_API}/stakes/draw`, async ({ request }) => {
        asked = await request.json()
        return HttpResponse.json({ id: 'd', revision: 8, stakes: [stake] }, { status: 201 })
      }),
    )
    renderGround(panel, { role: 'technician' })
    await userEvent.click(await screen.findByRole('button', { name: 'Draw stakes for Pad L2, Dec 1' }))
    expect(await screen.findByRole('button', { name: 'Draw stakes for Pad L2, Dec 1' })).toHaveProperty('disabled', false)
    expect(asked).toMatchObject({ lotId: lot.id })
  })

  it('gives a technician no release and the lead what was asked for', async () => {
    answerGround('technician')
    renderGround(panel, { role: 'technician' })
    await screen.findByText('Tests met, waiting for release')
    expect(screen.queryByRole('button', { name: 'Release' })).toBeNull()
  })
})

describe('the owner’s panel', () => {
  it('says the share filled, what waits for acceptance, exceptions and verification', async () => {
    answerGround('owner-rep', { releases: [buildRelease({ status: 'awaiting-acceptance', hold: true, issuedBy: { id: 'u1', name: 'Ines Marsh' }, issuedAt: '2026-12-01T20:00:00.000Z' })] })
    renderGround(panel, { role: 'owner-rep' })
    // 4.1299e8 of 1e9, rounded down
    expect((await screen.findByText('41.2 %', { exact: false, selector: 'span.text-figure' })).textContent).toBe('41.2\u00a0%')
    expect((await screen.findByText('A-012 Building pad, lift 2')).textContent).toBe('A-012 Building pad, lift 2')
    expect(screen.getByText('4 cells covered too early').textContent).toBe('4 cells covered too early')
    expect(screen.getByText(/^1 test of 5 fails/).textContent).toBe('1 test of 5 fails. Cells there are on hold.')
    expect(screen.getByRole('link', { name: 'Record verification test' }).getAttribute('href')).toMatch(/tests\/new$/)
  })

  it('accepts at a hold point', async () => {
    answerGround('owner-rep', { releases: [buildRelease({ status: 'awaiting-acceptance', hold: true })] })
    let accepted = 0
    apiStandIn.use(
      http.post(`${GROUND_API}/releases/release-1/accept`, () => {
        accepted += 1
        return HttpResponse.json({ id: 'release-1', number: 'A-012', revision: 8, cells: 1, volume: 1 })
      }),
    )
    renderGround(panel, { role: 'owner-rep' })
    await userEvent.click(await screen.findByRole('button', { name: 'Review A-012' }))
    await userEvent.click(await screen.findByRole('button', { name: 'Accept' }))
    expect((await screen.findByRole('heading', { name: 'Filled to grade' })).tagName).toBe('H2')
    expect(accepted).toBe(1)
  })

  it('declines only with a reason', async () => {
    answerGround('owner-rep', { releases: [buildRelease({ status: 'awaiting-acceptance', hold: true })] })
    renderGround(panel, { role: 'owner-rep' })
    await userEvent.click(await screen.findByRole('button', { name: 'Review A-012' }))
    await userEvent.click(await screen.findByRole('button', { name: 'Decline, with reason' }))
    expect(screen.getByRole('button', { name: 'Decline' })).toHaveProperty('disabled', true)
    await userEvent.type(screen.getByLabelText('Why it is declined'), 'Soft spot at A3')
    expect(screen.getByRole('button', { name: 'Decline' })).toHaveProperty('disabled', false)
  })
})

describe('the operator’s panel', () => {
  it('says what to do where, how much water, and where to keep off; it asks for no register', async () => {
    answerGround('operator')
    renderGround(panel, { role: 'operator' })
    expect((await screen.findByText('Too dry. Add water.')).textContent).toBe('Too dry. Add water.')
    expect(screen.getByText('Add 5,680 gal').textContent).toBe('Add 5,680\u2009gal')
    expect(screen.getByRole('link', { name: 'Open R-014' }).getAttribute('href')).toMatch(/rework\/order-1$/)
    const off = within(screen.getByRole('list', { name: 'Keep off' })).getAllByRole('listitem')
    expect(off.map((row) => row.querySelector('span.text-small')?.textContent)).toEqual(['A1:B1', 'A3', 'B3', 'C3'])
  })
})
