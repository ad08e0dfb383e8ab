import { configure, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import type { Gauge, GaugeDetail } from '#shared/schemas/gauge.ts'
import { MATERIAL } from '#tests/factories/curve-view.ts'
import { buildGauge, buildGaugeDetail, countedGauge, GAUGE_ID, judgedViews } from '#tests/factories/gauge-view.ts'
import { openSheet, SHEET_ADDRESS } from '#tests/factories/open-sheet.tsx'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { GaugesPage } from '#web/features/lab/gauges/gauges-page.tsx'
import { layOutDrift } from '#web/features/lab/gauges/drift-chart-layout.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'

// whole dialogs are typed in, key by key
vi.setConfig({ testTimeout: 60_000 })
configure({ asyncUtilTimeout: 10_000 })

const COUNTS = judgedViews([
  { id: 'a', day: '2026-11-24', density: 2_004 },
  { id: 'b', day: '2026-11-25', density: 2_040 },
  { id: 'c', day: '2026-11-25', density: 2_002 },
  { id: 'd', day: '2026-11-27', density: 2_400, voided: true },
  { id: 'e', day: '2026-11-27', density: 2_001, moisture: 606 },
])

function open(role: Role = 'technician', gauges: readonly Gauge[] = [buildGauge()], detail: Partial<GaugeDetail> = { counts: COUNTS }) {
  const answers = { '/gauges': { gauges }, [`/gauges/${GAUGE_ID}`]: buildGaugeDetail(detail), '/materials': { materials: [MATERIAL] } }
  return openSheet(GaugesPage, { site: { role }, pattern: '/sites/:siteId/lab/gauges', address: `/sites/${SITE_ID}/lab/gauges`, answers })
}

function takePosts(path: string, answer: () => Response = () => HttpResponse.json(countedGauge(), { status: 201 })): unknown[] {
  const sent: unknown[] = []
  apiStandIn.use(
    http.post(`${SHEET_ADDRESS}${path}`, async ({ request }) => {
      sent.push(await request.json())
      return answer()
    }),
  )
  return sent
}

const field = (dialog: HTMLElement, label: string) => within(dialog).getByRole('textbox', { name: label })
const act = async (name: string) => {
  await userEvent.click(await screen.findByRole('button', { name: 'More' }))
  await userEvent.click(await screen.findByRole('menuitem', { name }))
}

beforeEach(() => keepCsrfToken('token'))

describe('the register of gauges', () => {
  it('says how each stands today, and shows the log of the first with its drift', async () => {
    open()
    const row = within(await screen.findByRole('table', { name: 'Gauges' })).getAllByRole('row')[1]
    expect(row?.textContent).toMatch(/^G-41Surface gauge.*Not counted.*Nov 20, 2026due Nov 20, 2027Enter count$/)
    expect(screen.getByText('1 gauge, 1 not counted today').tagName).toBe('P')
    const log = await screen.findByRole('table', { name: 'Standard counts of gauge G-41' })
    const lines = within(log).getAllByRole('row').slice(1).map((line) => line.textContent)
    expect(lines.map((line) => /(Good, counted again|Out, counted again|Out of limits|Void|Good)/.exec(line ?? '')?.[0])).toEqual(['Good', 'Void', 'Good', 'Out, counted again', 'Good'])
    expect(lines[3]).toContain('2,040 +2.00\u2009%')
    expect(screen.getByRole('img', { name: 'Drift of density, 5 counts, 1 out of ±1\u2009%' }).tagName).toBe('svg')
    expect(screen.getByRole('complementary', { name: 'Caution: Nuclear gauge' }).textContent).toMatch(/licence.*radiation safety officer/)
  })

  it('says what a register is for while it is empty, and is read-only for those who do not record', async () => {
    open('owner-rep', [])
    expect((await screen.findByText('No gauge yet')).tagName).toBe('B')
    expect(screen.queryByRole('button', { name: 'New gauge' })).toBeNull()
  })

  it('hides every act from the owner', async () => {
    open('owner-rep')
    await screen.findByRole('table', { name: 'Standard counts of gauge G-41' })
    for (const name of ['Enter count', 'Enter today’s count', 'More', 'New gauge', /^Void/]) expect(screen.queryByRole('button', { name })).toBeNull()
  })

  it('says that it could not be read, and reads it again', async () => {
    let broken = true
    const register = () => (broken ? HttpResponse.json({ code: 'internal', message: 'It broke.', requestId: 'r' }, { status: 500 }) : HttpResponse.json({ gauges: [buildGauge()] }))
    openSheet(GaugesPage, { site: { role: 'technician' }, pattern: '/sites/:siteId/lab/gauges', address: `/sites/${SITE_ID}/lab/gauges`, answers: { '/gauges': register, [`/gauges/${GAUGE_ID}`]: buildGaugeDetail() } })
    const alert = await screen.findByRole('alert')
    expect(alert.textContent).toContain('It broke.')
    broken = false
    await userEvent.click(within(alert).getByRole('button', { name: 'Try again' }))
    expect((await screen.findByRole('table', { name: 'Gauges' })).tagName).toBe('TABLE')
  })
})

describe('a standard count', () => {
  it('is judged while it is typed, and sent as it was typed', async () => {
    const sent = takePosts(`/gauges/${GAUGE_ID}/counts`)
    open()
    await userEvent.click(await screen.findByRole('button', { name: 'Enter today’s count' }))
    const dialog = await screen.findByRole('dialog', { name: 'Standard count, gauge G-41' })
    await userEvent.type(field(dialog, 'Density count'), '2,030')
    await userEvent.type(field(dialog, 'Moisture count'), '612')
    const judgement = await within(dialog).findByRole('status', { name: 'Judgement' })
    // 30 of 2,000 is 1.5 %, 12 of 600 exactly 2 %
    await waitFor(() => expect(judgement.textContent).toMatch(/Density, within ±1\u2009%\+1\.50\u2009%Out.*Moisture, within ±2\u2009%\+2\.00\u2009%Good.*count again/))
    expect(judgement.textContent).toContain('the calibration, until four days are good: density 2,000.0, moisture 600.0')
    await userEvent.clear(field(dialog, 'Density count'))
    await userEvent.type(field(dialog, 'Density count'), '2020')
    expect(judgement.textContent).toMatch(/\+1\.00\u2009%Good/)
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save the count' }))
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull())
    expect(sent).toMatchObject([{ density: 2_020, moisture: 612, stability: null, remarks: '' }])
  })

  it('says what is missing at its field, and what the server would not take, and keeps what was typed', async () => {
    const sent = takePosts(`/gauges/${GAUGE_ID}/counts`, () => HttpResponse.json({ code: 'invalid', message: 'The time given lies in the future.', requestId: 'r' }, { status: 400 }))
    open()
    await userEvent.click(await screen.findByRole('button', { name: 'Enter count' }))
    const dialog = await screen.findByRole('dialog')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save the count' }))
    expect(within(dialog).getAllByRole('alert').map((alert) => alert.textContent)).toEqual(['Give a number', 'Give a number'])
    expect(sent).toEqual([])
    await userEvent.type(field(dialog, 'Density count'), '2001')
    await userEvent.type(field(dialog, 'Moisture count'), '601')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save the count' }))
    expect((await within(dialog).findByText('The time given lies in the future.')).tagName).toBe('B')
    expect(field(dialog, 'Density count')).toHaveProperty('value', '2001')
  })

  it('takes five more for a stability check and says whether they are stable', async () => {
    open()
    await userEvent.click(await screen.findByRole('button', { name: 'Enter count' }))
    const dialog = await screen.findByRole('dialog')
    await userEvent.click(within(dialog).getByRole('checkbox', { name: /stability check/ }))
    for (const index of [1, 2, 3, 4, 5]) {
      await userEvent.type(field(dialog, `Density ${index}`), String(2_000 + index * 6))
      await userEvent.type(field(dialog, `Moisture ${index}`), '600')
    }
    // 24 of 2,018 is 1.19 %, which is not below 1 %
    expect(within(dialog).getByText(/Density ranges over 1\.19/).textContent).toMatch(/^Not stable/)
  })

  it('is voided with a reason', async () => {
    const sent = takePosts(`/gauges/${GAUGE_ID}/counts/e/void`)
    open()
    await userEvent.click(await screen.findByRole('button', { name: /^Void the count of Nov 27/ }))
    const dialog = await screen.findByRole('dialog', { name: /^Void the count of Nov 27/ })
    await userEvent.click(within(dialog).getByRole('button', { name: 'Void the count' }))
    expect(within(dialog).getByRole('alert').textContent).toBe('Say why, in a few words')
    await userEvent.type(field(dialog, 'Reason'), 'Block on steel')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Void the count' }))
    await waitFor(() => expect(sent).toEqual([{ reason: 'Block on steel' }]))
  })
})

describe('what else a gauge needs', () => {
  it('is taken out of service with a reason, and offers the way back while it is out', async () => {
    const sent = takePosts(`/gauges/${GAUGE_ID}/take-out`)
    open()
    await act('Take out of service')
    const dialog = await screen.findByRole('dialog', { name: 'Take gauge G-41 out of service?' })
    await userEvent.type(field(dialog, 'Why'), 'Dropped from the tailgate')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Take it out' }))
    await waitFor(() => expect(sent).toMatchObject([{ reason: 'Dropped from the tailgate' }]))
  })

  it('works out the mean correction of the pairs while they are typed', async () => {
    const sent = takePosts(`/gauges/${GAUGE_ID}/corrections`)
    open()
    await act('New moisture correction')
    const dialog = await screen.findByRole('dialog', { name: 'Moisture correction, gauge G-41' })
    await within(dialog).findByRole('option', { name: MATERIAL.name })
    await userEvent.selectOptions(within(dialog).getByRole('combobox', { name: 'Material' }), MATERIAL.name)
    for (const [label, text] of [['Oven 1', '12'], ['Gauge 1', '10'], ['Oven 2', '10'], ['Gauge 2', '10']] as const) await userEvent.type(field(dialog, label), text)
    // +18.18 for the first pair, 0 for the second
    expect(within(dialog).getByRole('status', { name: 'Correction' }).textContent).toBe('K 9.09, mean of 2 pairs, from 0.00 to 18.18.')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save the correction' }))
    await waitFor(() => expect(sent).toMatchObject([{ materialId: MATERIAL.id, pairs: [{ oven: 12, gauge: 10 }, { oven: 10, gauge: 10 }] }]))
  })

  it('is registered with the counts of its calibration', async () => {
    const sent = takePosts('/gauges')
    open('qc-lead', [])
    await userEvent.click(await screen.findByRole('button', { name: 'New gauge' }))
    const dialog = await screen.findByRole('dialog', { name: 'New gauge' })
    await userEvent.type(field(dialog, 'Serial number or name'), 'G-58')
    const day = within(dialog).getByLabelText('Calibrated on')
    await userEvent.type(day, '2026-11-01')
    await userEvent.type(field(dialog, 'Density count then'), '2411')
    await userEvent.type(field(dialog, 'Moisture count then'), '588')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save the gauge' }))
    await waitFor(() => expect(sent).toMatchObject([{ serial: 'G-58', leakTestedOn: null, calibration: { calibratedOn: '2026-11-01', dueOn: null, density: 2_411, moisture: 588 } }]))
  })
})

describe('the drift chart', () => {
  const frame = { left: 0, right: 300, top: 0, bottom: 100 }

  it('draws a line through the counts that stand, and tells the others apart by kind', () => {
    const { points, path } = layOutDrift(COUNTS, 'density', 1, frame)
    expect(points.map((point) => [point.id, point.kind])).toEqual([['a', 'good'], ['b', 'bad'], ['c', 'good'], ['d', 'void'], ['e', 'good']])
    expect(path.split('L')).toHaveLength(3)
    expect(layOutDrift(COUNTS, 'moisture', 2, frame).points.every((point) => point.kind !== 'bad')).toBe(true)
  })

  it('keeps a slip at the edge, with its value, so that the others can be read', () => {
    const { points, limits } = layOutDrift(COUNTS, 'density', 1, frame)
    const void20 = points.find((point) => point.id === 'd')
    expect([void20?.y, void20?.beyond]).toEqual([0, 20])
    expect((limits[1]?.y ?? 0) - (limits[0]?.y ?? 0)).toBeGreaterThan(30)
  })
})
