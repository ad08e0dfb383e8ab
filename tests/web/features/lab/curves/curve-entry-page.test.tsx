import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Curve, Material } from '#shared/schemas/lab.ts'
import { buildCurve, CURVE_ID, MATERIAL } from '#tests/factories/curve-view.ts'
import { openSheet, SHEET_ADDRESS } from '#tests/factories/open-sheet.tsx'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { CurveEntryPage } from '#web/features/lab/curves/curve-entry-page.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'

function open({ curve, materials = [MATERIAL] }: { curve?: Curve; materials?: readonly Material[] } = {}) {
  const answers = { '/materials': { materials }, ...(curve === undefined ? {} : { [`/curves/${curve.id}`]: curve }) }
  const [pattern, address] = curve === undefined ? ['/sites/:siteId/lab/curves/new', `/sites/${SITE_ID}/lab/curves/new`] : ['/sites/:siteId/lab/curves/:curveId/correct', `/sites/${SITE_ID}/lab/curves/${curve.id}/correct`]
  return openSheet(CurveEntryPage, { pattern, address, answers })
}

function take(method: 'post' | 'put', path: string, answer: () => Response): unknown[] {
  const sent: unknown[] = []
  apiStandIn.use(
    http[method](`${SHEET_ADDRESS}${path}`, async ({ request }) => {
      sent.push(await request.json())
      return answer()
    }),
  )
  return sent
}

const field = (label: string | RegExp) => screen.getByLabelText<HTMLInputElement>(label)
const typeInto = async (label: string, text: string) => {
  await userEvent.clear(field(label))
  await userEvent.type(field(label), text)
}
const pasteAt = async (label: string, text: string) => {
  await userEvent.click(field(label))
  await userEvent.paste(text)
}
const ready = () => screen.findByRole('form', { name: 'New reference curve' })
const EVEN = '8\t112.8\n10\t117.8\n12\t120\n14\t117.8\n16\t112.8'

beforeEach(() => {
  window.sessionStorage.clear()
  keepCsrfToken('token')
})

describe('the sheet of a new curve', { timeout: 40_000 }, () => {
  it('shows the fit while points come in: too few, then a pair, then a point that cannot be', async () => {
    open()
    await ready()
    expect(screen.getByRole('status').textContent).toContain('Enter the specific gravity of the solids')
    await typeInto('Specific gravity, Gs', '2.70')
    await pasteAt('Point 1, moisture, percent', '8\t112.8\n10\t117.8\n12\t120\n')
    expect(screen.getByRole('status').textContent).toBe('No maximum yetA curve needs at least 4 points; there are 3.')
    await pasteAt('Point 4, moisture, percent', '14\t117.8\n16\t112.8')
    expect(screen.getByRole('status').textContent).toBe('120.0\u2009pcf at 12.0\u2009%Smooth curve through 5 specimens, 80 % saturated there.')
    expect(screen.getByRole('img', { name: '5 points, 120.0\u2009pcf at 12.0\u2009%' }).textContent).toContain('zero air voids, Gs 2.7')
    await typeInto('Point 5, dry unit weight, pcf', '130')
    expect(screen.getByRole('status').textContent).toContain('Point 5 lies above the zero-air-voids line')
  })

  it('begins with the gravity of its material, and holds the apparatus to the method', async () => {
    open({ materials: [{ ...MATERIAL, gs: 2.68, gsMeasured: true }] })
    await ready()
    expect(field('Specific gravity, Gs').value).toBe('2.68')
    expect(field('Gs is').value).toBe('measured')
    await typeInto('Layers', '5')
    expect(field('Layers').getAttribute('aria-describedby')).not.toBeNull()
    expect(screen.getByText('D698 compacts 3 layers.').textContent).not.toBe('')
    await typeInto('Blows a layer', '25')
    expect(screen.getByText(/make 166 % of the energy of D698/).textContent).not.toBe('')
    await typeInto('Retained on No. 4', '22')
    expect(screen.queryByText(/takes at most/)).toBeNull()
    await userEvent.selectOptions(field('Issue of the method'), '2000')
    expect(screen.getByText(/D698-00 method A takes at most 20 %/).textContent).toContain('Method B may')
  })

  it('takes a sheet of masses and tins in one paste, heads and units read, a bad row set aside', async () => {
    open({ materials: [{ ...MATERIAL, gs: 2.7, gsMeasured: true }] })
    await ready()
    await userEvent.click(screen.getByRole('button', { name: 'Paste or read a file' }))
    const dialog = await screen.findByRole('dialog', { name: 'Paste or read a file' })
    await userEvent.click(within(dialog).getByLabelText('Block'))
    await userEvent.paste(
      'No.;Mould + soil, kg;Wet soil + can, g;Dry soil + can, g;Can, g\n1;6,020;161,84;149,84;31,24\n2;6,128;174,00;158,31;30,96\n3;6,196;156,73;140,80;31,08\n4;6,199;172,18;151,94;30,88\n5;6,151;100,00;143,71;31,41',
    )
    expect(within(dialog).getByRole<HTMLInputElement>('radio', { name: 'Mould masses' }).checked).toBe(true)
    expect(within(dialog).getByRole<HTMLInputElement>('radio', { name: 'One tin' }).checked).toBe(true)
    expect(within(dialog).getByLabelText<HTMLSelectElement>('Mould masses in').value).toBe('kg')
    expect(within(dialog).getAllByText('ready')).toHaveLength(4)
    expect(within(dialog).getByText(/Dry is heavier than wet/).textContent).not.toBe('')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Take over 4 specimens, set 1 aside' }))
    expect(field('Point 4, mould and soil, kg').value).toBe('6.199')
    await typeInto('Mould, empty', '4.242')
    await typeInto('Mould volume', '0.0333')
    const fourth = within(screen.getByRole('region', { name: 'Specimens' })).getAllByRole('row')[4]
    // 6.199 − 4.242 kg in 0.0333 ft³ at 100·20.24/121.06 % (arithmetic)
    expect([...(fourth?.querySelectorAll('td.bg-film') ?? [])].map((cell) => cell.textContent)).toEqual(['16.7', '111.0'])
  })

  it('moves with Enter and the arrows, and keeps what was typed on the device', async () => {
    open()
    await ready()
    await userEvent.click(field('Point 1, moisture, percent'))
    await userEvent.keyboard('8.5{Enter}9.5{ArrowUp}')
    expect(document.activeElement).toBe(field('Point 1, moisture, percent'))
    expect(field('Point 2, moisture, percent').value).toBe('9.5')
    const [key] = Object.keys(window.sessionStorage)
    expect(key).toContain('hardpan.draft.curve.')
    expect(window.sessionStorage.getItem(key ?? '')).toContain('9.5')
  })

  it('keeps what was typed where the server refuses it, and says why', async () => {
    const message = 'This site already has a curve called RB-3. Nothing was saved; give this one another name.'
    const sent = take('post', '/curves', () => HttpResponse.json({ code: 'conflict', message }, { status: 409 }))
    open()
    await ready()
    await userEvent.click(screen.getAllByRole('button', { name: 'Save the curve' })[0] as HTMLElement)
    expect(screen.getByText(/need a look/).textContent).toContain('Everything typed is kept')
    expect(sent).toEqual([])
    await typeInto('Code', 'RB-3')
    await typeInto('Specific gravity, Gs', '2.70')
    await pasteAt('Point 1, moisture, percent', EVEN)
    await userEvent.click(screen.getAllByRole('button', { name: 'Save the curve' })[0] as HTMLElement)
    expect((await screen.findByText(message)).textContent).toBe(`Not saved. ${message}`)
    expect(sent[0]).toMatchObject({ code: 'RB-3', materialId: MATERIAL.id, coarse: null, reported: null, entry: { kind: 'dry', densityUnit: 'pcf' } })
    expect(field('Code').value).toBe('RB-3')
  })
})

describe('a draft being put right', { timeout: 40_000 }, () => {
  it('comes back as it was entered, is sent as a whole and leads to the curve', async () => {
    const sent = take('put', `/curves/${CURVE_ID}`, () => HttpResponse.json(buildCurve({ gs: 2.72 })))
    const router = open({ curve: buildCurve() })
    expect(await screen.findByRole('form', { name: 'Correct RB-3' })).toBe(screen.getByRole('form'))
    expect(field('Point 3, dry unit weight, pcf').value).toBe('120')
    await typeInto('Specific gravity, Gs', '2.72')
    await userEvent.click(screen.getAllByRole('button', { name: 'Save the curve' })[0] as HTMLElement)
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]).toMatchObject({ code: 'RB-3', gs: 2.72 })
    await waitFor(() => expect(`${router.state.location.pathname}${router.state.location.search}`).toBe(`/sites/${SITE_ID}/lab?curve=${CURVE_ID}`))
    expect(Object.keys(window.sessionStorage)).toEqual([])
  })

  it('says that an approved curve is not changed', async () => {
    open({ curve: buildCurve({ status: 'approved' }) })
    expect((await screen.findByText('RB-3 is not changed any more')).textContent).not.toBe('')
  })
})
