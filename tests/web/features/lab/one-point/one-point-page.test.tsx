import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import { checkCurve } from '#shared/domain/check-curve.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { onePointResultSchema, type OnePointCheck } from '#shared/schemas/one-point.ts'
import { convertDensity } from '#shared/units/density.ts'
import { buildCurve, CURVE_ID, MATERIAL } from '#tests/factories/curve-view.ts'
import { openSheet, SHEET_ADDRESS, SHEET_USER } from '#tests/factories/open-sheet.tsx'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { OnePointPage } from '#web/features/lab/one-point/one-point-page.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'

const kg = (pcf: number) => convertDensity(pcf, 'pcf', 'kg/m3')
const family = (id: string, code: string, points: readonly (readonly [number, number])[]): Curve =>
  buildCurve({ id, code, status: 'approved', points: points.map(([moisture, pcf]) => ({ moisture, dryDensity: kg(pcf) })) })
/** RB-3 of 120.0 pcf at 12.0 % between a denser and a lighter curve */
const IN_USE = buildCurve({ status: 'approved' })
const FAMILY: Curve[] = (
  [
    [1, 'RB-1', [[6.5, 119], [8, 124.4], [10, 128], [11.5, 125.5], [13, 120.5]]],
    [2, 'RB-2', [[9.5, 105.5], [12, 110], [14.5, 112], [16.5, 110.5], [18.5, 106.5]]],
  ] as const
).map(([n, code, points]) => {
  const curve = family(`6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c20${n}0`, code, points)
  return { ...curve, pair: curve.fit.spline }
})
const CURVES = [...FAMILY, IN_USE]

/** A saved check as the API answers it. */
function buildCheck(pcf: number, moisture: number, overrides: Partial<OnePointCheck> = {}): OnePointCheck {
  const point = { moisture, dryDensity: kg(pcf) }
  const { members, fit, off } = checkCurve(IN_USE, CURVES, { point, compacted: IN_USE, waterDensity: 1000 })
  return {
    id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c3001',
    number: 'O-001',
    curveId: CURVE_ID,
    method: 'D698',
    procedure: 'A',
    testId: null,
    sheet: { kind: 'density', densityUnit: 'pcf', wetDensity: pcf * (1 + moisture / 100), moisture: { method: 'stated', percent: moisture } },
    sampledAt: '2026-12-01T20:00:00.000Z',
    remarks: '',
    materialId: MATERIAL.id,
    materialName: MATERIAL.name,
    wetDensity: point.dryDensity * (1 + moisture / 100),
    ...point,
    result: onePointResultSchema.parse({ family: members, inUse: IN_USE, fit, off }),
    test: null,
    recordedBy: SHEET_USER,
    recordedAt: '2026-12-01T20:05:00.000Z',
    void: null,
    ...overrides,
  }
}

function open(search = '', checks: readonly OnePointCheck[] = [], role: Role = 'technician', curves: readonly Curve[] = CURVES) {
  return openSheet(OnePointPage, { site: { role }, pattern: '/sites/:siteId/lab/one-point', address: `/sites/${SITE_ID}/lab/one-point${search}`, answers: { '/curves': { curves }, '/one-point-checks': { checks }, '/tests': { tests: [], total: 0 } } })
}

async function enter(pcf: string, percent: string) {
  await userEvent.click(screen.getByRole('radio', { name: 'Wet density' }))
  await userEvent.click(screen.getByRole('radio', { name: 'Stated' }))
  for (const [label, text] of [['Wet density', pcf], ['Moisture of dry mass', percent]] as const) {
    const field = screen.getByRole<HTMLInputElement>('textbox', { name: label })
    await userEvent.clear(field)
    await userEvent.click(field)
    await userEvent.paste(text)
  }
}

beforeEach(() => keepCsrfToken('token'))

describe('one-point checks', () => {
  it('list what each found, and say how far the curve in use is off', async () => {
    open('', [buildCheck(121.5, 9.6, { id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c3002', number: 'O-002', test: { id: 'test-1', number: 'T-0142' } }), buildCheck(117.8, 10)])
    const register = within(await screen.findByRole('table', { name: 'One-point checks' }))
    expect(register.getAllByRole('row').slice(1).map((row) => row.textContent)).toEqual([expect.stringMatching(/^O-002RB-3 is off/), expect.stringMatching(/^O-001RB-3 fits/)])
    const sheet = screen.getByRole('region', { name: 'Check O-002' })
    expect(sheet.textContent).toMatch(/Between RB-1 and RB-3: 12\d\.\d.pcf at 1\d\.\d.%\./)
    expect(sheet.textContent).toMatch(/RB-3, the curve in use, is \d\.\d.pcf too low, its optimum \d\.\d.% too wet: beyond 2\.0.pcf or 1\.5.%\. Run a full curve of this soil\./)
    expect(within(sheet).getByRole('link', { name: 'T-0142' }).getAttribute('href')).toBe(`/sites/${SITE_ID}/tests/test-1`)
    await userEvent.click(register.getByRole('button', { name: 'O-001' }))
    expect(screen.getByRole('region', { name: 'Check O-001' }).textContent).toContain('RB-3, the curve in use, is the right one.')
  })

  it('work the point out while it is typed', async () => {
    open(`?new=1&curve=${CURVE_ID}`)
    await screen.findByRole('heading', { name: /Curve in use/ })
    await enter('129.58', '10')
    // 129.58 / 1.10 = 117.8 pcf, a point of RB-3
    expect(await screen.findByText(/^On RB-3: 120\.0.pcf at 12\.0.%\.$/)).toBeDefined()
    expect(screen.getByRole('img', { name: /The family of curves with the point at 10\.0.% and 117\.8.pcf/ })).toBeDefined()
  })

  it('say what to mould where the point may not be used, and what to run where the family ends', async () => {
    open(`?new=1&curve=${CURVE_ID}`)
    await screen.findByRole('heading', { name: /Curve in use/ })
    await enter('121.824', '8')
    expect((await screen.findByText(/too dry to tell the curves apart/)).textContent).toContain('9.6 to 12.0 %')
    await enter('142.5', '8.8')
    expect((await screen.findByText(/Denser than RB-1/)).textContent).toContain('not extrapolated')
  })

  it('save what was read, and lead back to the sheet they came from', async () => {
    const back = `/sites/${SITE_ID}/tests/new?stake=N1`
    open(`?new=1&curve=${CURVE_ID}&back=${encodeURIComponent(back)}`)
    await screen.findByRole('heading', { name: /Curve in use/ })
    const sent: unknown[] = []
    const saved = buildCheck(117.8, 10)
    apiStandIn.use(
      http.post(`${SHEET_ADDRESS}/one-point-checks`, async ({ request }) => {
        sent.push(await request.json())
        return HttpResponse.json(saved, { status: 201 })
      }),
      http.get(`${SHEET_ADDRESS}/one-point-checks`, () => HttpResponse.json({ checks: sent.length === 0 ? [] : [saved] })),
    )
    await userEvent.click(screen.getByRole('button', { name: 'Save the check' }))
    expect(screen.getAllByRole('alert').map((alert) => alert.textContent)).toContain('Enter the mass of mould and soil.')
    expect(sent).toEqual([])
    await enter('129.58', '10')
    await userEvent.click(screen.getByRole('button', { name: 'Save the check' }))
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]).toMatchObject({ curveId: CURVE_ID, method: 'D698', procedure: 'A', testId: null, sheet: { kind: 'density', densityUnit: 'pcf', wetDensity: 129.58, moisture: { method: 'stated', percent: 10 } } })
    await screen.findByRole('region', { name: 'Check O-001' })
    expect(screen.getByRole('link', { name: 'Back to the test' }).getAttribute('href')).toBe(back)
  })

  it('do not compare a point of another letter, and keep what was typed', async () => {
    open(`?new=1&curve=${CURVE_ID}`)
    await screen.findByRole('heading', { name: /Curve in use/ })
    await enter('129.58', '10')
    await userEvent.selectOptions(screen.getByLabelText('Letter'), 'C')
    expect(screen.getByText('The family is by D698 A: compact the point so').textContent).not.toBe('')
    await userEvent.click(screen.getByRole('button', { name: 'Save the check' }))
    expect(screen.getByRole<HTMLInputElement>('textbox', { name: 'Wet density' }).value).toBe('129.58')
  })

  it('are voided with a reason', async () => {
    const check = buildCheck(117.8, 10)
    open('', [check])
    const sent: unknown[] = []
    apiStandIn.use(
      http.post(`${SHEET_ADDRESS}/one-point-checks/${check.id}/void`, async ({ request }) => {
        sent.push(await request.json())
        return HttpResponse.json({ ...check, void: { at: '2026-12-01T22:00:00.000Z', by: SHEET_USER.name, reason: 'Wrong mould' } })
      }),
    )
    await userEvent.click(await screen.findByRole('button', { name: 'Void with reason' }))
    const dialog = within(await screen.findByRole('dialog'))
    await userEvent.click(dialog.getByRole('button', { name: 'Void with reason' }))
    expect((await dialog.findByRole('alert')).textContent).toBe('Say why, in a few words')
    await userEvent.type(dialog.getByLabelText('Reason'), 'Wrong mould')
    await userEvent.click(dialog.getByRole('button', { name: 'Void with reason' }))
    await waitFor(() => expect(sent).toEqual([{ reason: 'Wrong mould' }]))
  })

  it('are read by others, who record none', async () => {
    open('', [buildCheck(117.8, 10)], 'owner-rep')
    await screen.findByRole('region', { name: 'Check O-001' })
    for (const name of ['New check', 'Void with reason']) expect(screen.queryByRole('button', { name })).toBeNull()
  })

  it('say what is needed first', async () => {
    open('', [], 'technician', [buildCurve()])
    expect((await screen.findByText(/better three of one material/)).textContent).toContain('approved curve')
  })
})
