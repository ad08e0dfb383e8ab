import { fireEvent, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { SavedView } from '#shared/schemas/saved-view.ts'
import type { RegisterPage, RegisterTest } from '#shared/schemas/test-register.ts'
import { buildRegisterPage, buildRegisterTest } from '#tests/factories/register-view.ts'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { ADDRESS, answerSheet, openTestsPage, USER } from './open-tests-page.tsx'

const PAGE = `/sites/${SITE_ID}/tests`
const SECOND = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d30'
let asked: URLSearchParams[] = []

function answer(tests: readonly RegisterTest[], page: Partial<RegisterPage> = {}, views: readonly SavedView[] = []): void {
  answerSheet()
  apiStandIn.use(
    http.get(`${ADDRESS}/tests`, ({ request }) => {
      asked.push(new URL(request.url).searchParams)
      return HttpResponse.json(buildRegisterPage(tests, page))
    }),
    http.get(`${ADDRESS}/tests/recorders`, () => HttpResponse.json({ people: [{ id: USER.id, name: USER.name }] })),
    http.get(`${ADDRESS}/attachments`, () => HttpResponse.json({ attachments: [] })),
    http.get(`${ADDRESS}/materials`, () => HttpResponse.json({ materials: [] })),
    http.get(`${ADDRESS}/views`, () => HttpResponse.json({ views })),
  )
}

const last = (): Record<string, string> => Object.fromEntries(asked.at(-1) ?? [])
const heads = (): (string | null)[] => within(screen.getByRole('table', { name: 'Field tests' })).getAllByRole('columnheader').map((head) => head.textContent)
const searchOf = (router: ReturnType<typeof openTestsPage>) => Object.fromEntries(new URLSearchParams(router.state.location.search))

beforeEach(() => {
  asked = []
})

describe('the register of tests', () => {
  it('lists each test with its figures, limit and result, and its row opens the sheet', async () => {
    const flags = [{ code: 'short-of-layer', message: 'The depth stops short of the layer.' }, { code: 'gauge-not-named', message: 'No gauge is named.' }]
    answer([buildRegisterTest(), buildRegisterTest({ id: SECOND, number: 'T-0141', outcome: 'pass', near: true, headline: 'Meets spec, near a limit', voided: true, flagged: true, flags })])
    const router = openTestsPage(PAGE)
    const table = await screen.findByRole('table', { name: 'Field tests' })
    expect(heads()).toEqual(['Test', 'Sampled', 'Zone', 'Lift', 'Cell', 'Method', 'Dry, pcf', 'w, %', 'Δw, %', 'Curve', 'RC, %', 'Limit, %', 'Result', 'Flags', 'By'])
    const rows = [...table.querySelectorAll('tbody tr')]
    expect([...(rows[0]?.children ?? [])].map((cell) => cell.textContent)).toEqual(['T-0142', 'Dec 1, 12:00', 'Pad', '10', 'B2', 'Density and moisture', '106.7', '13.2', '−0.8', 'RB-3', '92.8', '95', 'Too loose', '–', 'Milan Petrak'])
    expect(rows[1]?.textContent).toContain('Meets spec, nearvoid')
    expect(rows[1]?.textContent).toContain('The depth stops short of the layer.+1')
    await userEvent.click(rows[0] ?? table)
    await waitFor(() => expect(router.state.location.pathname).toBe(`${PAGE}/${buildRegisterTest().id}`))
  })

  it('is walked by arrow keys, and Enter opens the sheet', async () => {
    answer([buildRegisterTest({ number: 'T-0150' }), buildRegisterTest({ id: SECOND, number: 'T-0141' })])
    const router = openTestsPage(PAGE)
    const table = await screen.findByRole('table', { name: 'Field tests' })
    within(table).getByText('T-0150').focus()
    await userEvent.keyboard('{ArrowUp}{ArrowDown}')
    expect(document.activeElement?.textContent).toBe('T-0141')
    await userEvent.keyboard('{Enter}')
    await waitFor(() => expect(router.state.location.pathname).toBe(`${PAGE}/${SECOND}`))
  })

  it('asks the server by what the address says, and leaves out what cannot be read', async () => {
    answer([buildRegisterTest()])
    openTestsPage(`${PAGE}?outcome=fail,suspect&lift=10&near=true&method=spade&sort=rc&direction=asc&columns=number,rc&page=2`)
    await screen.findByRole('table', { name: 'Field tests' })
    expect(last()).toEqual({ outcome: 'fail,suspect', lift: '10', near: 'true', sort: 'rc', direction: 'asc', offset: '50', limit: '50' })
    expect(heads()).toEqual(['Test', 'RC, %'])
  })

  it('pages 50 at a time', async () => {
    answer([buildRegisterTest()], { total: 120 })
    const router = openTestsPage(PAGE)
    await userEvent.click(await screen.findByText('Next page'))
    await waitFor(() => expect(last().offset).toBe('50'))
    expect(searchOf(router)).toEqual({ page: '2', view: 'all' })
    expect(screen.getByText('51 to 100 of 120').tagName).toBe('SPAN')
  })

  it('says what comes first on an empty site, to somebody who may record', async () => {
    answer([])
    openTestsPage(PAGE)
    expect((await screen.findByText('No tests yet')).tagName).toBe('B')
    expect(screen.getAllByRole('link', { name: 'Record a test' })[0]?.getAttribute('href')).toBe(`${PAGE}/new`)
  })

  it('hides recording from a superintendent', async () => {
    answer([buildRegisterTest()])
    openTestsPage(PAGE, 'superintendent')
    await screen.findByText('1 test')
    expect(screen.queryByRole('link', { name: 'Record a test' })).toBeNull()
  })

  it('says that nothing fits a choice, and clears the filters but not the order', async () => {
    answer([])
    const router = openTestsPage(`${PAGE}?outcome=suspect&sort=rc&direction=asc`)
    await screen.findByText('No test fits this choice')
    await userEvent.click(screen.getAllByRole('button', { name: 'Clear filters' }).at(-1) ?? document.body)
    expect(searchOf(router)).toEqual({ sort: 'rc', direction: 'asc', view: 'all' })
  })

  it('says what the server said when the register cannot be read', async () => {
    answer([])
    apiStandIn.use(http.get(`${ADDRESS}/tests`, () => HttpResponse.json({ code: 'forbidden', message: 'Your role on this site does not allow that.' }, { status: 403 })))
    openTestsPage(PAGE)
    expect((await screen.findByRole('alert')).textContent).toContain('Your role on this site does not allow that.')
  })
})

describe('sorting', () => {
  it('is by the head of a column, which says how it stands, and turns when pressed again', async () => {
    answer([buildRegisterTest()])
    const router = openTestsPage(PAGE)
    const table = await screen.findByRole('table', { name: 'Field tests' })
    const head = (name: string) => within(table).getByRole('columnheader', { name })
    expect(head('Sampled').getAttribute('aria-sort')).toBe('descending')
    const button = within(head('RC, %')).getByRole('button')
    button.focus()
    await userEvent.keyboard('{Enter}')
    await waitFor(() => expect(last()).toMatchObject({ sort: 'rc', direction: 'asc' }))
    expect(head('RC, %').getAttribute('aria-sort')).toBe('ascending')
    expect(head('Sampled').getAttribute('aria-sort')).toBeNull()
    await userEvent.keyboard('{Enter}')
    await waitFor(() => expect(last()).toMatchObject({ sort: 'rc', direction: 'desc' }))
    expect(searchOf(router)).toMatchObject({ sort: 'rc', direction: 'desc' })
  })
})

describe('filtering', () => {
  it('takes several results together, and counts each', async () => {
    answer([buildRegisterTest()], { counts: { pass: 201, fail: 12, suspect: 3 } })
    openTestsPage(PAGE)
    const fail = await screen.findByRole('button', { name: 'Fail 12' })
    await userEvent.click(fail)
    await userEvent.click(screen.getByRole('button', { name: 'Suspect 3' }))
    await waitFor(() => expect(last().outcome).toBe('fail,suspect'))
    expect(fail.getAttribute('aria-pressed')).toBe('true')
    await userEvent.click(fail)
    await waitFor(() => expect(last().outcome).toBe('suspect'))
  })

  it('searches by number, and by cell where the text names one of the site', async () => {
    answer([buildRegisterTest()])
    openTestsPage(PAGE)
    const search = await screen.findByLabelText('Number, cell, curve or name')
    await userEvent.type(search, 'T-0142')
    await waitFor(() => expect(last().search).toBe('T-0142'))
    await userEvent.clear(search)
    await userEvent.type(search, 'b2')
    await waitFor(() => expect(last()).toMatchObject({ cell: '5' }))
    expect(last().search).toBeUndefined()
  })

  it('asks for more in a dialog, whose button says how many tests that leaves', async () => {
    answer([buildRegisterTest()])
    const router = openTestsPage(PAGE)
    await userEvent.click(await screen.findByText('More filters'))
    fireEvent.change(await screen.findByLabelText('Method'), { target: { value: 'sand-cone' } })
    fireEvent.change(screen.getByLabelText('Flagged'), { target: { value: 'true' } })
    await userEvent.click(screen.getByLabelText('Verification'))
    await waitFor(() => expect(last()).toMatchObject({ method: 'sand-cone', flagged: 'true', purpose: 'verification' }))
    await userEvent.click(screen.getByText('Show 1 test'))
    expect(searchOf(router)).toMatchObject({ method: 'sand-cone', flagged: 'true', purpose: 'verification' })
  })

  it('says every choice beneath, and takes each away by itself', async () => {
    answer([buildRegisterTest()])
    openTestsPage(`${PAGE}?method=sand-cone&technicianId=${USER.id}&retest=false`)
    expect((await screen.findByText('By Milan Petrak')).tagName).toBe('BUTTON')
    expect(screen.getByText('No retests').tagName).toBe('BUTTON')
    await userEvent.click(screen.getByText('Sand cone'))
    await waitFor(() => expect(last()).toEqual({ technicianId: USER.id, retest: 'false', sort: 'sampled', direction: 'desc', offset: '0', limit: '50' }))
  })

  it('never asks for a last day before the first', async () => {
    answer([buildRegisterTest()])
    openTestsPage(`${PAGE}?from=2026-11-10&to=2026-11-20`)
    await userEvent.click(await screen.findByText('More filters (2)'))
    fireEvent.change(await screen.findByLabelText('Sampled from'), { target: { value: '2026-11-25' } })
    await waitFor(() => expect(last()).toMatchObject({ from: '2026-11-25' }))
    expect(last().to).toBeUndefined()
  })
})
