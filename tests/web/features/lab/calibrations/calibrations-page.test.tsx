import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import type { Calibration, CreateCalibration } from '#shared/schemas/calibration.ts'
import { buildCalibration } from '#tests/factories/calibration-view.ts'
import { openSheet, SHEET_ADDRESS } from '#tests/factories/open-sheet.tsx'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { CalibrationsPage } from '#web/features/lab/calibrations/calibrations-page.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'

// whole dialogs are typed in, key by key
vi.setConfig({ testTimeout: 30_000 })

const SAND = buildCalibration()
const OLD = buildCalibration({ id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d43', apparatus: 'Sand, batch 3', performedAt: '2026-05-13T16:00:00.000Z', validUntil: '2026-10-16T16:00:00.000Z' })
const CONE = buildCalibration({
  id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d42',
  apparatus: 'Cone 2',
  sheet: { kind: 'cone', massUnit: 'kg', trials: [{ before: 8.45, after: 6.77 }] },
  value: 1680,
  void: { at: '2026-11-30T16:00:00.000Z', by: 'Rosa Okafor', reason: 'Dented rim' },
})

function open(role: Role = 'technician', calibrations: readonly Calibration[] = [CONE, SAND, OLD]) {
  return openSheet(CalibrationsPage, { site: { role }, pattern: '/sites/:siteId/lab/calibrations', address: `/sites/${SITE_ID}/lab/calibrations`, answers: { '/calibrations': { calibrations } } })
}

function takePosts(path: string, answer: () => Response = () => HttpResponse.json(SAND, { status: 201 })): unknown[] {
  const sent: unknown[] = []
  apiStandIn.use(
    http.post(`${SHEET_ADDRESS}${path}`, async ({ request }) => {
      sent.push(await request.json())
      return answer()
    }),
  )
  return sent
}

const field = (label: string) => within(screen.getByRole('dialog')).getByLabelText(label)
const enter = async (label: string, text: string): Promise<void> => {
  await userEvent.clear(field(label))
  await userEvent.type(field(label), text)
}
const factOf = (label: string) => within(screen.getByRole('dialog')).getByText(label).nextElementSibling?.textContent

beforeEach(() => keepCsrfToken('token'))

describe('the register of calibrations', () => {
  it('lists them by kind with what they come to and how they stand', async () => {
    open()
    const rows = within(await screen.findByRole('table', { name: 'Calibrations' })).getAllByRole('row').map((row) => row.textContent)
    expect(rows.slice(1).map((text) => /^(SandASTM|Cone and plate|Sand, batch \d|Cone \d)/.exec(text)?.[0])).toEqual(['SandASTM', 'Sand, batch 4', 'Sand, batch 3', 'Cone and plate', 'Cone 2'])
    expect(rows[2]).toMatch(/1\.4180\u2009g\/cm³ \(88\.52\u2009pcf\).*In useVoid$/)
    expect(rows[3]).toMatch(/Out of date since Oct 16, 2026Void$/)
    expect(rows[5]).toMatch(/1,680\.0\u2009g.*Void since Nov 30, 2026Dented rim$/)
    expect(screen.getByText('3 calibrations, 1 in use').tagName).toBe('P')
  })

  it('shows every measurement as it was entered', async () => {
    open('owner-rep')
    await userEvent.click(await screen.findByRole('button', { name: 'Cone 2' }))
    const dialog = screen.getByRole('dialog', { name: 'Cone 2' })
    expect(within(dialog).getByText('Apparatus before 1').nextElementSibling?.textContent).toBe('8.45\u2009kg')
    expect(within(dialog).getByText('Apparatus after 1').nextElementSibling?.textContent).toBe('6.77\u2009kg')
    expect(dialog.textContent).toContain('Void by Rosa Okafor, Nov 30, 2026: Dented rim.')
    expect(within(dialog).queryByRole('button', { name: 'Void with reason' })).toBeNull()
  })

  it('says what it is for while it is empty; who only reads may not add', async () => {
    open('owner-rep', [])
    expect((await screen.findByText('No calibration yet')).tagName).toBe('B')
    expect(screen.queryByRole('button', { name: 'New calibration' })).toBeNull()
  })

  it('says what went wrong, and reads again', async () => {
    let broken = true
    openSheet(CalibrationsPage, {
      pattern: '/sites/:siteId/lab/calibrations',
      address: `/sites/${SITE_ID}/lab/calibrations`,
      answers: { '/calibrations': () => (broken ? HttpResponse.json({ code: 'forbidden', message: 'Your role does not see this.' }, { status: 403 }) : HttpResponse.json({ calibrations: [SAND] })) },
    })
    await screen.findByText('Your role does not see this.')
    broken = false
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }))
    expect((await screen.findByRole('button', { name: 'Sand, batch 4' })).tagName).toBe('BUTTON')
  })
})

describe('recording a calibration', () => {
  it('works out S-2 while it is typed: 8.45 kg of jar and sand, 2.04 kg empty, in 3,816.1086 cm³ (ja.scribd.com 241276469)', async () => {
    open()
    const sent = takePosts('/calibrations')
    await userEvent.click(await screen.findByRole('button', { name: 'New calibration' }))
    await userEvent.selectOptions(field('Masses in'), 'kg')
    await enter('Apparatus, cylinder or batch', 'Sand, batch 5')
    await enter('Volume of the container', '3816.1086')
    await enter('Container, empty', '2.04')
    await enter('Container and sand 1', '8.45')
    expect(factOf('Bulk density')).toBe('1.6797\u2009g/cm³ (104.86\u2009pcf)')
    expect(screen.getByText('Three trials or more are usual.').tagName).toBe('P')
    await enter('Container and sand 2', '8.47')
    await enter('Container and sand 3', '8.43')
    expect(screen.queryByText('Three trials or more are usual.')).toBeNull()
    await enter('In use until, if set', '2027-03-01')
    await userEvent.click(screen.getByRole('button', { name: 'Save the calibration' }))
    await waitFor(() => expect(sent).toHaveLength(1))
    const input = sent[0] as CreateCalibration
    expect(input).toMatchObject({ apparatus: 'Sand, batch 5', sheet: { kind: 'sand-density', massUnit: 'kg', volumeUnit: 'cm3', containerVolume: 3816.1086, container: 2.04, filled: [8.45, 8.47, 8.43] } })
    // the end of that day on the site's clock, Los Angeles
    expect(input.validUntil).toBe('2027-03-02T07:59:00.000Z')
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull())
  })

  it('names the measurement that cannot be, sends nothing and keeps what was typed', async () => {
    open()
    const sent = takePosts('/calibrations')
    await userEvent.click(await screen.findByRole('button', { name: 'New calibration' }))
    await userEvent.click(screen.getByRole('radio', { name: 'Cone and plate' }))
    await enter('Apparatus before 1', '6000')
    await enter('Apparatus after 1', '7000')
    await userEvent.click(screen.getByRole('button', { name: 'Save the calibration' }))
    expect(field('Apparatus after 1').getAttribute('aria-invalid')).toBe('true')
    expect(screen.getByText('After is as heavy as before. Check which is which.').tagName).toBe('P')
    expect(screen.getByText('Give a name').tagName).toBe('P')
    expect(within(screen.getByRole('dialog')).getByDisplayValue('7000')).toBe(field('Apparatus after 1'))
    expect(sent).toEqual([])
  })

  it('voids one with a reason', async () => {
    open()
    const sent = takePosts(`/calibrations/${SAND.id}/void`, () => HttpResponse.json(SAND))
    await userEvent.click(await screen.findByRole('button', { name: 'Sand, batch 4' }))
    await userEvent.click(screen.getByRole('button', { name: 'Void with reason' }))
    await userEvent.type(await screen.findByLabelText('Reason'), 'The bag got wet')
    await userEvent.click(screen.getByRole('button', { name: 'Void with reason' }))
    await waitFor(() => expect(sent).toEqual([{ reason: 'The bag got wet' }]))
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull())
  })
})
