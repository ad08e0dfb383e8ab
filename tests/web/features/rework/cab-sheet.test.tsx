import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Order } from '#shared/schemas/rework.ts'
import { buildBoard, openSheet, SHEET_ADDRESS, SHEET_USER } from '#tests/factories/open-sheet.tsx'
import { buildOrder, ORDER_ID } from '#tests/factories/order-view.ts'
import { SITE_ID, ZONE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { ReworkPage } from '#web/features/rework/rework-page.tsx'

const WAITING = {
  reason: 'awaiting-test' as const,
  zoneId: ZONE_ID,
  lift: 2,
  cells: [2, 3],
  cm3: 1,
  owed: 1,
  stakes: [],
  orderId: null,
  orderNumber: null,
  orderState: null,
  workingSince: null,
  lotId: null,
  lotName: null,
  testNumber: null,
  testId: null,
  headline: '',
}

function open(orders: readonly Order[]) {
  const rework = { ...WAITING, reason: 'rework' as const, orderId: ORDER_ID, orderNumber: 'R-014', cells: [0, 1, 4, 5], lift: 3 }
  const ready = [{ zoneId: ZONE_ID, lift: 4, cells: [6, 7], cm3: 94_390_000, topUm: 0, thicknessUm: 203_200 }]
  return openSheet(ReworkPage, {
    site: { role: 'operator' },
    pattern: '/sites/:siteId/rework',
    address: `/sites/${SITE_ID}/rework`,
    answers: { '/rework': { orders }, '/board': buildBoard({ notYet: [WAITING, rework], ready }) },
  })
}

const stepped: unknown[] = []
function takeSteps(answer: () => Response = () => HttpResponse.json({ id: ORDER_ID, number: 'R-014', revision: 8 }, { status: 201 })): void {
  apiStandIn.use(
    http.post(`${SHEET_ADDRESS}/rework/${ORDER_ID}/steps`, async ({ request }) => {
      stepped.push(await request.json())
      return answer()
    }),
  )
}

beforeEach(() => {
  localStorage.clear()
  stepped.length = 0
  keepCsrfToken('token')
})

describe('the operator’s sheet', () => {
  it('opens on the first order: where, what, how much, and the caution', async () => {
    open([buildOrder()])
    expect((await screen.findByRole('heading', { level: 2 })).textContent).toBe('Too dry. Add water.')
    expect(screen.getByRole('heading', { level: 1 }).textContent).toBe('Rework R-014')
    expect(screen.getByText('Building pad, lift 3, cells A1 to B2').textContent).toContain('A1 to B2')
    const list = within(screen.getByRole('list', { name: 'What to do' })).getAllByRole('listitem')
    expect(list.map((item) => item.textContent)).toEqual(['Scarify full depth8\u2009in', 'Add water, mix until even5,680\u2009gal', 'Re-roll, padfoot6 passes'])
    expect(screen.getByText(/^Stay back from the open edge on the east side/).textContent).toMatch(/Stop when the tester signals\.$/)
    expect(screen.getByRole('img', { name: /Plan of R-014: cells A1 to B2/ }).textContent).toContain('B2')
  })

  it('counts what is mine, what to keep off and what is ready', async () => {
    open([buildOrder(), buildOrder({ id: 'another', number: 'R-015', assignedTo: 'Ada Crewe' })])
    expect((await screen.findByRole('tab', { name: 'My rework 1' })).textContent).toBe('My rework 1')
    await screen.findByRole('tab', { name: 'Keep off 1' })
    await userEvent.click(screen.getByRole('tab', { name: 'Keep off 1' }))
    expect(within(screen.getByRole('list', { name: 'Keep off' })).getAllByRole('listitem').map((item) => item.textContent)).toEqual(['Placed, waits for a testBuilding pad, lift 2C1 to D12 cells'])
    await userEvent.click(screen.getByRole('tab', { name: 'Ready 1' }))
    expect(screen.getByRole('list', { name: 'Ready for the next lift' }).textContent).toContain('123\u2009cy')
  })

  it('starts with one tap, by the site’s clock', async () => {
    takeSteps()
    open([buildOrder()])
    await userEvent.click(await screen.findByRole('button', { name: 'Start' }))
    await waitFor(() => expect(stepped).toHaveLength(1))
    const [step] = stepped as { kind: string; happenedAt: string }[]
    expect(step?.kind).toBe('started')
    expect(Math.abs(Date.parse(step?.happenedAt ?? '') - Date.parse('2026-12-01T22:32:07.000Z'))).toBeLessThan(60_000)
  })

  it('asks what was done before the ground is reported ready, begun with what was wanted', async () => {
    takeSteps()
    open([buildOrder({ state: 'working', workingSince: '2026-12-01T21:00:00.000Z' })])
    await userEvent.click(await screen.findByRole('button', { name: 'Ready for retest' }))
    await userEvent.click(screen.getByRole('button', { name: 'Passes: 1 passes more' }))
    await userEvent.clear(screen.getByLabelText('Water added'))
    await userEvent.type(screen.getByLabelText('Water added'), '6,000')
    await userEvent.click(screen.getByRole('button', { name: 'Report R-014 ready' }))
    await waitFor(() => expect(stepped).toHaveLength(1))
    const [step] = stepped as { kind: string; passes: number; waterLitres: number; depthUm: number }[]
    expect(step).toMatchObject({ kind: 'ready', passes: 7, depthUm: 203_200 })
    // 6,000 US gal of 231 in³
    expect(step?.waterLitres).toBeCloseTo(22_712.47, 2)
  })

  it('keeps a tap without a signal, says so, and goes on as if it were taken', async () => {
    apiStandIn.use(http.post(`${SHEET_ADDRESS}/rework/${ORDER_ID}/steps`, () => HttpResponse.error()))
    open([buildOrder()])
    await userEvent.click(await screen.findByRole('button', { name: 'Start' }))
    expect((await screen.findByText('Kept on this phone.')).closest('[role=status]')?.textContent).toMatch(/R-014 started at 14:32\. It is sent as soon as there is a signal\./)
    expect(screen.getByRole('button', { name: 'Ready for retest' }).textContent).toBe('Ready for retest')
    expect(localStorage.getItem(`hardpan.kept-steps.${SHEET_USER.id}`)).toContain('started')
    takeSteps()
    window.dispatchEvent(new Event('online'))
    await waitFor(() => expect(stepped).toHaveLength(1))
    await waitFor(() => expect(screen.queryByText('Kept on this phone.')).toBeNull())
  })

  it('shows what the server would not take until it is put away', async () => {
    takeSteps(() => HttpResponse.json({ code: 'conflict', message: 'R-014 is closed. Nothing was changed.' }, { status: 409 }))
    open([buildOrder()])
    await userEvent.click(await screen.findByRole('button', { name: 'Start' }))
    expect((await screen.findByRole('alert')).textContent).toMatch(/R-014 started was not taken\..*R-014 is closed/)
    await userEvent.click(screen.getByRole('button', { name: 'Put away' }))
    await waitFor(() => expect(screen.queryByRole('alert')).toBeNull())
  })

  it('says that there is nothing to do now', async () => {
    open([buildOrder({ state: 'ready' })])
    expect((await screen.findByText('No rework for you now.')).textContent).toBe('No rework for you now.')
  })

  it('is dark in the cab unless the person chose light', async () => {
    open([buildOrder()])
    const heading = await screen.findByRole('heading', { level: 1 })
    expect(heading.closest('[data-theme]')?.getAttribute('data-theme')).toBe('dark')
  })
})
