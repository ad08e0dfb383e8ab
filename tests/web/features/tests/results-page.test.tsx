import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import { SITE_ID } from '#tests/factories/site-view.ts'
import type { TestSummary } from '#shared/schemas/field-test.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { ADDRESS, answerSheet, buildSummary, openTestsPage } from './open-tests-page.tsx'

const PAGE = `/sites/${SITE_ID}/tests`
let asked: URLSearchParams[] = []

function answer(tests: readonly TestSummary[], total = tests.length): void {
  answerSheet()
  apiStandIn.use(
    http.get(`${ADDRESS}/tests`, ({ request }) => {
      asked.push(new URL(request.url).searchParams)
      return HttpResponse.json({ tests, total })
    }),
  )
}

const last = (): Record<string, string> => Object.fromEntries(asked.at(-1) ?? [])

beforeEach(() => {
  asked = []
})

describe('the register of tests', () => {
  it('lists each test with its figures and result, and its row opens the sheet', async () => {
    answer([buildSummary(), buildSummary({ id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d30', number: 'T-0141', outcome: 'pass', near: true, headline: 'Meets spec, near a limit', voided: true })])
    const router = openTestsPage(PAGE)
    const table = await screen.findByRole('table', { name: 'Field tests' })
    const rows = within(table).getAllByRole('row').slice(1)
    expect(within(rows[0] ?? table).getAllByRole('cell').map((cell) => cell.textContent)).toEqual([
      'B2, 10',
      'Pad',
      'Density and moisture',
      '106.7',
      '92.8',
      '13.2',
      '−0.8\u2009%',
      'Too loose',
      'Dec 1, 12:00',
      'Milan Petrak',
    ])
    expect(rows[1]?.textContent).toContain('Meets spec, nearvoid')
    await userEvent.click(rows[0] ?? table)
    await waitFor(() => expect(router.state.location.pathname).toBe(`${PAGE}/${buildSummary().id}`))
  })

  it('asks the server by zone, lift, result, force and page, 50 at a time', async () => {
    answer([buildSummary()], 120)
    const router = openTestsPage(PAGE)
    await screen.findByText('120 tests')
    await userEvent.selectOptions(screen.getByLabelText('Lift'), '10')
    await userEvent.selectOptions(screen.getByLabelText('Result'), 'fail')
    await userEvent.click(screen.getByRole('checkbox', { name: 'Only results that count' }))
    await waitFor(() => expect(last()).toEqual({ offset: '0', limit: '50', lift: '10', outcome: 'fail', current: 'true' }))
    await userEvent.click(screen.getByRole('button', { name: 'Older' }))
    await waitFor(() => expect(last().offset).toBe('50'))
    expect(router.state.location.search).toBe('?lift=10&outcome=fail&current=1&page=2')
    expect(screen.getByText('51 to 100 of 120').tagName).toBe('SPAN')
  })

  it('searches by number, and by cell where the text names one of the site', async () => {
    answer([buildSummary()])
    openTestsPage(PAGE)
    const search = await screen.findByLabelText('Number, cell, curve or name')
    await userEvent.type(search, 'T-0142')
    await waitFor(() => expect(last().search).toBe('T-0142'))
    await userEvent.clear(search)
    await userEvent.type(search, 'b2')
    await waitFor(() => expect(last()).toMatchObject({ cell: '5' }))
    expect(last().search).toBeUndefined()
  })

  it('says what comes first on an empty site, to somebody who may record', async () => {
    answer([])
    openTestsPage(PAGE)
    expect((await screen.findByText('No tests yet')).tagName).toBe('B')
    expect(screen.getAllByRole('link', { name: 'Record a test' })[0]?.getAttribute('href')).toBe(`${PAGE}/new`)
  })

  it('hides recording from a superintendent', async () => {
    answer([buildSummary()])
    openTestsPage(PAGE, 'superintendent')
    await screen.findByText('1 test')
    expect(screen.queryByRole('link', { name: 'Record a test' })).toBeNull()
  })

  it('says that nothing fits a choice and shows all again', async () => {
    answer([])
    const router = openTestsPage(`${PAGE}?outcome=suspect`)
    await userEvent.click(await screen.findByRole('button', { name: 'Show all tests' }))
    expect(router.state.location.search).toBe('')
  })

  it('says what the server said when the register cannot be read', async () => {
    answerSheet()
    apiStandIn.use(http.get(`${ADDRESS}/tests`, () => HttpResponse.json({ code: 'forbidden', message: 'Your role on this site does not allow that.' }, { status: 403 })))
    openTestsPage(PAGE)
    expect((await screen.findByRole('alert')).textContent).toContain('Your role on this site does not allow that.')
  })
})
