import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { openSheet, SHEET_ADDRESS } from '#tests/factories/open-sheet.tsx'
import { buildOrder, CAUSE_ID, ORDER_ID } from '#tests/factories/order-view.ts'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { ReworkOrderPage } from '#web/features/rework/order-page.tsx'
import { ReworkPage } from '#web/features/rework/rework-page.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'

const openRegister = (answer: unknown, role: Role = 'qc-lead') =>
  openSheet(ReworkPage, { site: { role }, pattern: '/sites/:siteId/rework', address: `/sites/${SITE_ID}/rework`, answers: { '/rework': answer } })
const register = (orders: readonly Order[], role: Role = 'qc-lead') => openRegister({ orders }, role)
const sheet = (order: Order, role: Role = 'qc-lead') =>
  openSheet(ReworkOrderPage, { site: { role }, pattern: '/sites/:siteId/rework/:orderId', address: `/sites/${SITE_ID}/rework/${order.id}`, answers: { [`/rework/${order.id}`]: order, '/members': { members: [] } } })

beforeEach(() => keepCsrfToken('token'))

describe('the register of orders', () => {
  it('lists open orders with what to do, and folds the closed ones away', async () => {
    register([buildOrder(), buildOrder({ id: 'closed', number: 'R-009', state: 'closed', closedAt: '2026-11-28T21:12:00.000Z' })])
    const table = await screen.findByRole('table', { name: 'Open orders' })
    await screen.findByText('Issued 12:00, not started')
    const cells = within(within(table).getAllByRole('row')[1] as HTMLElement).getAllByRole('cell')
    expect(cells.map((cell) => cell.textContent)).toEqual(['Too dry. Add water.', 'Building pad, lift 3, A1 to B2', 'Volume247\u2009cy', 'add 5,680\u2009gal', 'Issued 12:00, not started', 'nobody named', 'Retests passed0 of 1'])
    expect(screen.getByText(/^1 open order, 4 cells, 247/).textContent).toContain('247')
    expect(screen.getByText('Closed and withdrawn, 1 order').closest('details')?.open).toBe(false)
    expect(screen.getByRole('link', { name: 'Issue an order from the Ground' }).getAttribute('href')).toBe(`/sites/${SITE_ID}/ground`)
  })

  it('says what it is for while it is empty, and offers nothing the role may not do', async () => {
    register([], 'owner-rep')
    expect((await screen.findByText('No ground was ever in rework here')).textContent).toBe('No ground was ever in rework here')
    expect(screen.queryByRole('link', { name: /Issue/ })).toBeNull()
  })

  it('says what the server said when it could not be read', async () => {
    openRegister(() => HttpResponse.json({ code: 'forbidden', message: 'Not for you.' }, { status: 403 }))
    expect((await screen.findByRole('alert')).textContent).toMatch(/Not for you\./)
  })
})

describe('an order for the office', () => {
  it('links its cause, lists its steps, and offers the lead every act', async () => {
    sheet(buildOrder())
    expect((await screen.findByRole('heading', { level: 1 })).textContent).toBe('R-014. Too dry. Add water.')
    expect(screen.getByRole('link', { name: 'T-0142' }).getAttribute('href')).toBe(`/sites/${SITE_ID}/tests/${CAUSE_ID}`)
    expect(screen.getByRole('list', { name: 'Steps of R-014' }).textContent).toContain('IssuedDec 1, 12:00, Theo Lindqvist')
    expect(within(screen.getByRole('region', { name: 'What you can do' })).getAllByRole('button').map((button) => button.textContent)).toEqual([
      'Start',
      'Ready for retest',
      'Assign',
      'Edit cells',
      'I need the lead here',
      'Withdraw with reason',
    ])
  })

  it('is read-only for those who neither work nor assign', async () => {
    sheet(buildOrder(), 'owner-rep')
    await screen.findByRole('heading', { level: 1 })
    expect(screen.queryByRole('button')).toBeNull()
  })

  it('leads from each drawn point to the retest of its cause', async () => {
    sheet(buildOrder({ state: 'ready', reportedAt: '2026-12-01T21:00:00.000Z', retestPoints: [{ cell: 5, easting: 1_281_475.25, northing: 231_874.5 }] }), 'technician')
    const link = await screen.findByRole('link', { name: 'Record the retest at cell B2' })
    expect(link.getAttribute('href')).toBe(`/sites/${SITE_ID}/tests/new?follows=${CAUSE_ID}&kind=retest&e=1281475.25&n=231874.50&lift=3`)
  })

  it('shows why cells may not leave, and keeps what was typed', async () => {
    const words = 'A1 cannot leave yet: no passing test sampled after T-0142 lies in it or between it and the failure. Nothing was changed.'
    const sent: unknown[] = []
    apiStandIn.use(
      http.patch(`${SHEET_ADDRESS}/rework/${ORDER_ID}`, async ({ request }) => {
        sent.push(await request.json())
        return HttpResponse.json({ code: 'conflict', message: words }, { status: 409 })
      }),
    )
    sheet(buildOrder())
    await userEvent.click(await screen.findByRole('button', { name: 'Edit cells' }))
    const field = screen.getByLabelText('Cells')
    await userEvent.clear(field)
    await userEvent.type(field, 'B1:B2')
    await userEvent.click(screen.getByRole('button', { name: 'Save the cells' }))
    expect((await screen.findByRole('alert')).textContent).toBe('Say why, in a few words')
    await userEvent.type(screen.getByLabelText('Reason'), 'A1 was passed by T-0150')
    await userEvent.click(screen.getByRole('button', { name: 'Save the cells' }))
    expect((await screen.findByText(words)).textContent).toBe(words)
    expect(sent).toEqual([{ cells: [1, 5], reason: 'A1 was passed by T-0150' }])
    expect((screen.getByLabelText('Cells') as HTMLInputElement).value).toBe('B1:B2')
  })

  it('says that cells outside the sheet are none of it, before anything is sent', async () => {
    sheet(buildOrder())
    await userEvent.click(await screen.findByRole('button', { name: 'Edit cells' }))
    await userEvent.clear(screen.getByLabelText('Cells'))
    await userEvent.type(screen.getByLabelText('Cells'), 'Z9')
    await waitFor(() => expect(screen.getByRole('alert').textContent).toMatch(/Z9 is outside the sheet/))
  })
})
