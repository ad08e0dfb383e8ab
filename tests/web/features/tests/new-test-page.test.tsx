import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { ADDRESS, answerSheet, buildCurve, enter, enterS1, openTestsPage, reloadTestsPage, saidAt, SHEET, STAKE } from './open-tests-page.tsx'

// a whole sheet is typed in, key by key
vi.setConfig({ testTimeout: 30_000 })

const AT_STAKE = `${SHEET}?stake=N1`

beforeEach(() => {
  sessionStorage.clear()
  localStorage.clear()
  keepCsrfToken(null)
})

const save = (): Promise<void> => userEvent.click(screen.getAllByRole('button', { name: 'Save result' })[0] ?? document.body)

describe('recording a test', () => {
  it('works out hole volume and dry unit weight of S-1 while typing, with the volume not rounded', async () => {
    answerSheet()
    openTestsPage(AT_STAKE)
    await enterS1()
    // S-1: 6.47 lb / 99 pcf = 0.065354 ft³; the page prints 112.29 pcf from 0.065, unrounded it is 111.69
    expect(screen.getByLabelText('Hole volume').textContent).toBe('0.0654')
    expect(screen.getByText('Dry unit wt').nextElementSibling?.textContent).toBe('111.7\u2009pcf')
    expect(screen.getByText('Compaction').nextElementSibling?.textContent).toBe('97.1\u2009%')
  })

  it('says live that it is too dry, by how much, what saving does and how much water it takes', async () => {
    answerSheet({ preview: { marks: [{ kind: 'fail', cells: [5, 6], volumeCm3: 94_390_000 }] } })
    openTestsPage(AT_STAKE)
    await enterS1()
    expect(screen.getByRole('heading', { name: 'Too dry, dense enough' }).textContent).toBe('Too dry, dense enough')
    expect(screen.getByText('2.9 % below optimum, limit 2 %.').tagName).toBe('B')
    expect((await screen.findAllByText('Cells B2 to C2 go to rework when this is saved.')).length).toBe(2)
    // V·γd·(wt − w)/100 with 94.39 m³, 1789.1 kg/m³ and 2.89 points is 4,880 kg, at 8.345 lb a gallon (domain section 7)
    expect(screen.getByText(/^To bring 2 cells/).textContent).toMatch(/^To bring 2 cells \(123\u2009cy\) to optimum, add about 1,289\u2009gal\.$/)
    expect(screen.getByRole('img', { name: /^Too dry, dense enough: 11\.1/ }).tagName).toBe('svg')
  })

  it('says at the field that dry is heavier than wet', async () => {
    answerSheet()
    openTestsPage(AT_STAKE)
    await userEvent.click(await screen.findByRole('radio', { name: 'Oven' }))
    await enter('Wet soil and tin', '412.6')
    await enter('Dry soil and tin', '431.0')
    await enter('Tin', '78.4')
    const field = screen.getByLabelText('Dry soil and tin')
    expect(field.getAttribute('aria-invalid')).toBe('true')
    expect(saidAt('Dry soil and tin')).toBe('Dry is heavier than wet (412.6\u2009g). Check which is which.')
    expect(screen.getByRole('heading', { name: 'No verdict yet' }).textContent).toBe('No verdict yet')
  })

  it('takes what is no number for none, says so, saves nothing and keeps the text', async () => {
    const sent = answerSheet()
    openTestsPage(AT_STAKE)
    await enter('Apparatus and sand before', 'NaN')
    expect(saidAt('Apparatus and sand before')).toBe('Write it as a plain number, such as 12.5.')
    await save()
    expect(saidAt('Moist soil from hole')).toBe('Enter the moist soil from the hole.')
    expect(screen.getByText(/fields need a look/).textContent).toMatch(/Everything typed is kept/)
    expect(screen.getByLabelText<HTMLInputElement>('Apparatus and sand before').value).toBe('NaN')
    expect(sent).toEqual([])
  })

  it('flags a small hole in amber and lets it be saved', async () => {
    answerSheet()
    openTestsPage(AT_STAKE)
    await enterS1()
    await enter('Largest particle, if seen', '1')
    // D1556 table: 2125 cm³ for 1 in particles; the hole is 1,851 cm³
    expect(saidAt('Hole volume')).toMatch(/smaller than D1556 advises.*You may save it, flagged\.$/)
  })

  it('refuses an oversize share from 5 % on at its field while the curve does not know its stones', async () => {
    answerSheet()
    openTestsPage(AT_STAKE)
    await enterS1()
    await enter('Retained on No. 4', '5')
    expect(screen.getByLabelText('Retained on No. 4').getAttribute('aria-invalid')).toBe('true')
    expect(saidAt('Retained on No. 4')).toMatch(/the curve does not know the specific gravity of its stones/)
  })

  it('sends what was typed, in the units it was typed in, and opens the saved sheet', async () => {
    const sent = answerSheet()
    const router = openTestsPage(AT_STAKE)
    await enterS1()
    await enter('Depth below surface', '6')
    await save()
    expect((await screen.findByText('T-0219 saved.')).parentElement?.textContent).toBe('T-0219 saved. 2 cells went to rework.')
    expect(router.state.location.pathname).toMatch(/\/tests\/6d5c1c1e/)
    expect(sent[0]).toMatchObject({
      purpose: 'required',
      stakeId: STAKE.id,
      at: { easting: STAKE.easting, northing: STAKE.northing },
      lift: 10,
      depthUm: 152_400,
      curveId: buildCurve().id,
      sheet: { method: 'sand-cone', massUnit: 'lb', apparatusBefore: 10.2, densityUnit: 'pcf', sandDensity: 99, moisture: { method: 'stated', percent: 11.11 } },
    })
    expect(sessionStorage.length).toBe(0)
  })

  it('keeps everything typed over a reload, and starts afresh when asked to', async () => {
    answerSheet()
    openTestsPage(AT_STAKE)
    await enter('Apparatus and sand before', '7612')
    reloadTestsPage(AT_STAKE)
    expect((await screen.findByLabelText<HTMLInputElement>('Apparatus and sand before')).value).toBe('7612')
    await userEvent.click(screen.getByRole('button', { name: 'Start afresh' }))
    expect(screen.getByLabelText<HTMLInputElement>('Apparatus and sand before').value).toBe('')
    expect(sessionStorage.length).toBe(0)
  })

  it('keeps a draft of one person from the next', async () => {
    answerSheet()
    openTestsPage(AT_STAKE)
    await enter('Apparatus and sand before', '7612')
    apiStandIn.use(http.get('/api/me', () => HttpResponse.json({ user: { id: 'b0d8a1f0-0000-4000-8000-000000000001', name: 'Ana Lund', email: 'ana@alder.example' }, csrfToken: 'token' })))
    reloadTestsPage(AT_STAKE)
    expect((await screen.findByLabelText<HTMLInputElement>('Apparatus and sand before')).value).toBe('')
  })

  it('asks which lift is meant where the elevation says another, and sends the answer', async () => {
    const sent = answerSheet()
    apiStandIn.use(
      http.post(`${ADDRESS}/tests`, () => HttpResponse.json({ code: 'lift_differs', message: 'By its elevation the test lies in lift 9, not in lift 10.', details: { lift: 9 } }, { status: 409 }), { once: true }),
    )
    openTestsPage(AT_STAKE)
    await enterS1()
    await enter('Depth below surface', '6')
    await save()
    const question = await screen.findByRole('alertdialog', { name: 'This elevation lies in lift 9, not 10' })
    await userEvent.click(within(question).getByRole('button', { name: 'Use lift 9' }))
    await waitFor(() => expect(sent.map(({ lift, liftConfirmed, stakeId }) => ({ lift, liftConfirmed, stakeId }))).toEqual([{ lift: 9, liftConfirmed: false, stakeId: null }]))
  })

  it('confirms the lift that was chosen when the person keeps it', async () => {
    const sent = answerSheet()
    apiStandIn.use(http.post(`${ADDRESS}/tests`, () => HttpResponse.json({ code: 'lift_differs', message: 'x', details: { lift: null } }, { status: 409 }), { once: true }))
    openTestsPage(AT_STAKE)
    await enterS1()
    await enter('Depth below surface', '6')
    await save()
    const question = await screen.findByRole('alertdialog', { name: 'This elevation lies above the planned fill, not in lift 10' })
    await userEvent.click(within(question).getByRole('button', { name: 'Keep lift 10, flagged' }))
    await waitFor(() => expect(sent.map(({ lift, liftConfirmed }) => ({ lift, liftConfirmed }))).toEqual([{ lift: 10, liftConfirmed: true }]))
  })

  it('puts what the server refuses at its field until that is typed in again', async () => {
    answerSheet()
    const issue = { path: 'body.sheet.moistSoil', message: 'The scale was out of order.' }
    apiStandIn.use(http.post(`${ADDRESS}/tests`, () => HttpResponse.json({ code: 'invalid', message: 'The scale was out of order. Nothing was saved.', details: { issues: [issue] } }, { status: 400 })))
    openTestsPage(AT_STAKE)
    await enterS1()
    await enter('Depth below surface', '6')
    await save()
    await screen.findByText('The scale was out of order.')
    expect(saidAt('Moist soil from hole')).toBe('The scale was out of order.')
    await enter('Moist soil from hole', '8.12')
    expect(screen.queryByText('The scale was out of order.')).toBeNull()
  })

  it('says that the server does not answer and that everything is kept', async () => {
    answerSheet()
    apiStandIn.use(http.post(`${ADDRESS}/tests`, () => HttpResponse.error()), http.post(`${ADDRESS}/tests/preview`, () => HttpResponse.error()))
    openTestsPage(AT_STAKE)
    await enterS1()
    await enter('Depth below surface', '6')
    await save()
    expect((await screen.findByText('Not saved.')).parentElement?.textContent).toMatch(/does not answer.*is kept/)
    expect(screen.getByLabelText<HTMLInputElement>('Moist soil from hole').value).toBe('8.11')
  })
})

describe('what the sheet offers', () => {
  const purposes = (): (string | null)[] => within(screen.getByRole('radiogroup', { name: 'Purpose' })).getAllByRole('radio').map((radio) => radio.parentElement?.textContent ?? null)

  it('is no verification for a technician', async () => {
    answerSheet()
    openTestsPage(SHEET)
    await screen.findByLabelText('Cell')
    expect(purposes()).toEqual(['Required', 'Judgement', 'Referee'])
  })

  it('is verification and referee alone for the owner’s representative', async () => {
    answerSheet()
    openTestsPage(SHEET, 'owner-rep')
    await screen.findByLabelText('Cell')
    expect(purposes()).toEqual(['Verification', 'Referee'])
  })

  it('is nothing to a superintendent, who is told who records', async () => {
    answerSheet()
    openTestsPage(SHEET, 'superintendent')
    expect((await screen.findByText('Your role does not record tests')).tagName).toBe('B')
  })

  it('keeps the readings shut until the purpose is chosen', async () => {
    answerSheet()
    openTestsPage(SHEET)
    expect((await screen.findByLabelText('Apparatus and sand before')).matches(':disabled')).toBe(true)
    await userEvent.click(screen.getByRole('radio', { name: 'Judgement' }))
    expect(screen.getByLabelText('Apparatus and sand before').matches(':disabled')).toBe(false)
  })

  it('says that a cell is not on the site, or a place outside it', async () => {
    answerSheet()
    openTestsPage(SHEET)
    await enter('Cell', 'Z9')
    expect(saidAt('Cell')).toBe('Cell Z9 is not on this site.')
    await userEvent.click(screen.getByRole('radio', { name: 'Coordinates' }))
    await enter('Easting', '1')
    await enter('Northing', '1')
    expect(saidAt('Easting')).toBe('That place is not on this site. Check easting and northing.')
  })

  it('warns before a nuclear gauge, a carbide tester and a microwave are used', async () => {
    answerSheet()
    openTestsPage(AT_STAKE)
    await userEvent.click(await screen.findByRole('radio', { name: 'Microwave' }))
    expect(screen.getByRole('complementary', { name: 'Caution: Microwave drying' }).textContent).toMatch(/Never an oven that food goes into/)
    await userEvent.click(screen.getByRole('radio', { name: 'Carbide' }))
    expect(screen.getByRole('complementary', { name: 'Caution: Carbide tester' }).textContent).toMatch(/safety plan/)
    await userEvent.click(screen.getByRole('radio', { name: 'Nuclear gauge' }))
    expect(screen.getByRole('complementary', { name: 'Caution: Nuclear gauge' }).textContent).toMatch(/licensed/)
  })

  it('remembers the units a person measured in, for the next test', async () => {
    answerSheet()
    openTestsPage(AT_STAKE)
    await enterS1()
    await enter('Depth below surface', '6')
    await save()
    await screen.findByText('T-0219 saved.')
    reloadTestsPage(AT_STAKE)
    expect((await screen.findByLabelText<HTMLSelectElement>('Masses at the hole in')).value).toBe('lb')
    expect(screen.getByRole<HTMLInputElement>('radio', { name: 'Stated' }).checked).toBe(true)
  })
})
