import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import type { Curve, Material } from '#shared/schemas/lab.ts'
import { buildCurve, CURVE_ID, MATERIAL, SHARP } from '#tests/factories/curve-view.ts'
import { openSheet, SHEET_ADDRESS } from '#tests/factories/open-sheet.tsx'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { CurvesPage } from '#web/features/lab/curves/curves-page.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'

function open(role: Role = 'qc-lead', curves: readonly Curve[] = [buildCurve()], materials: readonly Material[] = [MATERIAL]) {
  return openSheet(CurvesPage, { site: { role }, pattern: '/sites/:siteId/lab', address: `/sites/${SITE_ID}/lab`, answers: { '/curves': { curves }, '/materials': { materials }, '/attachments': { attachments: [] } } })
}

function takePosts(path: string, answer: () => Response): unknown[] {
  const sent: unknown[] = []
  apiStandIn.use(
    http.post(`${SHEET_ADDRESS}${path}`, async ({ request }) => {
      sent.push(await request.json())
      return answer()
    }),
  )
  return sent
}

beforeEach(() => {
  window.sessionStorage.clear()
  keepCsrfToken('token')
})

describe('the Lab sheet', { timeout: 30_000 }, () => {
  it('lists curves and materials, and shows the first curve with its fits', async () => {
    open()
    const curves = await screen.findByRole('table', { name: 'Reference curves' })
    expect(within(curves).getByText('Waits for approval').textContent).toBe('Waits for approval')
    expect(screen.getByRole('table', { name: 'Borrow materials' }).textContent).toContain('× 0.720')
    const plot = screen.getByRole('img', { name: /Compaction curve RB-3/ })
    expect(plot.getAttribute('aria-label')).toBe('Compaction curve RB-3, 5 points, 120.0\u2009pcf at 12.0\u2009%')
    const fits = within(screen.getByRole('table', { name: 'Fits compared' })).getAllByRole('row').slice(1)
    expect(fits[0]?.textContent).toBe('Smooth curve, this pair120.012.080')
  })

  it('shows the specimens as they were weighed, and what each comes to', async () => {
    const specimens = [[6020, 161.84, 149.84, 31.24], [6128, 174, 158.31, 30.96]].map(([mouldAndSoil = 0, wetAndTin = 0, dryAndTin = 0, tin = 0]) => ({ mouldAndSoil, moisture: { massUnit: 'g' as const, tins: [{ wetAndTin, dryAndTin, tin }] } }))
    open('qc-lead', [buildCurve({ entry: { kind: 'masses', massUnit: 'g', mould: 4242, volumeUnit: 'ft3', mouldVolume: 0.0333, specimens }, apparatus: { edition: '2007', mould: '4-in', layers: 3, blows: 25, oversizePercent: 2 } })])
    const table = await screen.findByRole('table', { name: 'Specimens as entered', hidden: true })
    // (6020 − 4242) g in 0.0333 ft³ at 100·12.00/118.60 % (arithmetic)
    expect(within(table).getAllByRole('row', { hidden: true })[1]?.textContent).toBe('1161.84149.8431.24602010.1106.9')
    expect(screen.getByText(/Entered as mould masses of 2 specimens/).textContent).toContain('4 in mould, 3 layers, 25 blows a layer, 2 % retained on the No. 4')
  })

  it('is read-only for those who neither record nor approve', async () => {
    open('owner-rep')
    await screen.findByRole('table', { name: 'Reference curves' })
    for (const name of ['New material', 'Approve', 'Withdraw']) expect(screen.queryByRole('button', { name })).toBeNull()
    for (const name of ['New curve', 'Correct']) expect(screen.queryByRole('link', { name })).toBeNull()
  })

  it('lets a technician record, and leaves the approval to the lead', async () => {
    open('technician')
    expect((await screen.findByRole('link', { name: 'New curve' })).getAttribute('href')).toBe(`/sites/${SITE_ID}/lab/curves/new`)
    expect(screen.queryByRole('button', { name: 'Approve' })).toBeNull()
  })

  it('says what to record first', async () => {
    open('technician', [], [])
    expect((await screen.findByText('No material yet')).textContent).toBe('No material yet')
    expect(screen.queryByRole('link', { name: 'New curve' })).toBeNull()
  })

  it('approves the pair the lead chooses, knowingly where the fits differ', async () => {
    const sent = takePosts(`/curves/${CURVE_ID}/approve`, () => HttpResponse.json(buildCurve({ status: 'approved', pairFrom: 'quadratic' })))
    open('qc-lead', [buildCurve({ points: SHARP })])
    await userEvent.click(await screen.findByRole('button', { name: 'Approve' }))
    const dialog = await screen.findByRole('dialog', { name: 'Approve RB-3' })
    await userEvent.click(within(dialog).getByRole('radio', { name: /Quadratic/ }))
    await userEvent.click(within(dialog).getByRole('button', { name: 'Approve this pair' }))
    expect(within(dialog).getByRole('alert').textContent).toBe('Confirm that you know it.')
    expect(sent).toEqual([])
    await userEvent.click(within(dialog).getByRole('checkbox'))
    await userEvent.click(within(dialog).getByRole('button', { name: 'Approve this pair' }))
    await waitFor(() => expect(sent).toEqual([{ use: 'quadratic' }]))
  })

  it('records a material, and names each field that is missing', async () => {
    const sent = takePosts('/materials', () => HttpResponse.json({ ...MATERIAL, name: 'Pit run' }, { status: 201 }))
    open('technician')
    await userEvent.click(await screen.findByRole('button', { name: 'New material' }))
    await userEvent.click(screen.getByRole('button', { name: 'Save the material' }))
    expect(screen.getAllByRole('alert').map((alert) => alert.textContent)).toEqual(['Give a name', 'Give a number', 'Give a number'])
    await userEvent.type(screen.getByLabelText('Name'), 'Pit run')
    await userEvent.type(screen.getByLabelText('Swell, bank to loose'), '12')
    await userEvent.type(screen.getByLabelText('Shrink, bank to compacted'), '8')
    await userEvent.click(screen.getByRole('button', { name: 'Save the material' }))
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]).toMatchObject({ name: 'Pit run', swellPercent: 12, shrinkPercent: 8 })
  })
})
