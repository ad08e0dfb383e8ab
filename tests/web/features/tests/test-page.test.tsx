import { cleanup, screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { ADDRESS, answerSheet, buildDetail, openTestsPage, USER } from './open-tests-page.tsx'

const PAGE = `/sites/${SITE_ID}/tests/${buildDetail().id}`

function answer(detail: Partial<TestDetail> = {}): void {
  answerSheet()
  apiStandIn.use(http.get(`${ADDRESS}/tests/:id`, () => HttpResponse.json(buildDetail(detail))))
}

beforeEach(() => keepCsrfToken(null))

describe('the sheet of a saved test', () => {
  it('shows the raw sheet, the frozen limit with its reading, and the unrounded value', async () => {
    answer()
    openTestsPage(PAGE)
    expect((await screen.findByRole('heading', { level: 1 })).textContent).toBe('T-0142')
    expect(screen.getByText('106.73 pcf').tagName).toBe('DD')
    const judged = screen.getByRole('heading', { name: 'Judged by' }).closest('section')
    expect(judged?.textContent).toContain('At least 95 % of maximum dry unit weight92.8126 %"95" is compared exactly, with the unrounded value.')
    expect(screen.getByText('Cells B2 to C2').tagName).toBe('SPAN')
  })

  it('draws the chain with the one that counts, and says that a later test took its place', async () => {
    const first = buildDetail().chain
    answer({ current: false, chain: [...first, { id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d21', number: 'T-0142-R1', outcome: 'pass', headline: 'Meets spec', rc: 96.9, sampledAt: '2026-12-01T21:00:00.000Z', voided: false }] })
    openTestsPage(PAGE, 'qc-lead')
    expect((await screen.findByText('T-0142-R1 counts now.')).tagName).toBe('B')
    const chain = within(screen.getByRole('heading', { name: 'Chain' }).closest('section') ?? document.body).getAllByRole('listitem')
    expect(chain.map((entry) => entry.textContent)).toEqual([expect.stringMatching(/^T-0142Too loose/), expect.stringMatching(/^T-0142-R1Meets spec.*counts$/)])
    expect(chain[0]?.getAttribute('aria-current')).toBe('true')
    expect(screen.queryByRole('link', { name: 'Record a retest' })).toBeNull()
  })

  it('offers a retest of a failure to the technician, and no void', async () => {
    answer()
    openTestsPage(PAGE)
    expect((await screen.findByRole('link', { name: 'Record a retest' })).getAttribute('href')).toBe(`/sites/${SITE_ID}/tests/new?follows=${buildDetail().id}&kind=retest`)
    expect(screen.queryByRole('button', { name: 'Void with reason' })).toBeNull()
  })

  it('offers a re-run of a reading in doubt, not of one that is only flagged for its place', async () => {
    answer({ outcome: 'pass', headline: 'Meets spec', flags: [{ code: 'off-stake', message: 'A required test that is not at a drawn stake.' }] })
    openTestsPage(PAGE)
    await screen.findByText('A required test that is not at a drawn stake.')
    expect(screen.queryByRole('link', { name: 'Run it again' })).toBeNull()
    cleanup()
    answer({ outcome: 'suspect', headline: "Result can't be right, run it again" })
    openTestsPage(PAGE)
    expect((await screen.findByRole('link', { name: 'Run it again' })).getAttribute('href')).toMatch(/kind=rerun$/)
  })

  it('shows every verdict of a test that was judged again, the one in force first', async () => {
    const { verdict } = buildDetail()
    const kept = { curve: { id: 'k', code: 'RB-3' }, verdict, marks: [{ kind: 'fail', cells: [5] }], judgedAt: '2026-12-01T20:30:00.000Z', judgedBy: USER, reason: null }
    const again = { ...kept, version: 2, current: true, curve: { id: 'l', code: 'RB-4' }, verdict: { ...verdict, outcome: 'pass', headline: 'Meets spec', rc: 96.1 }, marks: [], reason: 'New curve of the pit' }
    answer()
    apiStandIn.use(http.get(`${ADDRESS}/tests/:id/verdicts`, () => HttpResponse.json({ verdicts: [{ ...kept, version: 1, current: false }, again] })))
    openTestsPage(PAGE)
    const heading = await screen.findByRole('heading', { name: 'Verdicts' })
    const [first, second] = within(heading.closest('section') ?? document.body).getAllByRole('listitem')
    expect(first?.textContent).toMatch(/Meets spec.*By RB-4: 96\.1.*Judged again: New curve of the pit.*in force/)
    expect(second?.textContent).toMatch(/Too loose.*By RB-3: 92\.8.*marked for rework.*As recorded.*no\. 1/)
  })

  it('voids only with a reason, says what follows, and gives the focus back', async () => {
    answer()
    const reasons: unknown[] = []
    apiStandIn.use(
      http.post(`${ADDRESS}/tests/:id/void`, async ({ request, params }) => {
        reasons.push(await request.json())
        return HttpResponse.json({ id: params.id, number: 'T-0142', revision: 9, currentId: null })
      }),
    )
    openTestsPage(PAGE, 'qc-lead')
    await userEvent.click(await screen.findByRole('button', { name: 'Void with reason' }))
    const dialog = screen.getByRole('dialog', { name: 'Void T-0142?' })
    expect(dialog.textContent).toMatch(/stays on record.*stays among the exceptions/)
    await userEvent.click(within(dialog).getByRole('button', { name: 'Void with reason' }))
    expect(within(dialog).getByRole('alert').textContent).toBe('Say why, in a few words')
    expect(reasons).toEqual([])
    await userEvent.type(within(dialog).getByLabelText('Reason'), 'Sheet of another site')
    apiStandIn.use(http.get(`${ADDRESS}/tests/:id`, () => HttpResponse.json(buildDetail({ voided: true, void: { at: '2026-12-01T22:00:00.000Z', by: { id: USER.id, name: 'Rosa Okafor' }, reason: 'Sheet of another site' } }))))
    await userEvent.click(within(dialog).getByRole('button', { name: 'Void with reason' }))
    expect((await screen.findByText('Void since Dec 1, 14:00, by Rosa Okafor.')).parentElement?.textContent).toContain('Sheet of another site')
    expect(reasons).toEqual([{ reason: 'Sheet of another site' }])
    expect(screen.queryByRole('dialog')).toBeNull()
    expect(screen.queryByRole('button', { name: 'Void with reason' })).toBeNull()
  })

  it('keeps the reason when the server refuses the void', async () => {
    answer()
    apiStandIn.use(http.post(`${ADDRESS}/tests/:id/void`, () => HttpResponse.json({ code: 'conflict', message: 'T-0142 is void already. Nothing was changed.' }, { status: 409 })))
    openTestsPage(PAGE, 'qc-lead')
    await userEvent.click(await screen.findByRole('button', { name: 'Void with reason' }))
    const dialog = screen.getByRole('dialog')
    await userEvent.type(within(dialog).getByLabelText('Reason'), 'Copied twice')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Void with reason' }))
    expect((await within(dialog).findByRole('alert')).textContent).toContain('is void already')
    expect(within(dialog).getByLabelText<HTMLTextAreaElement>('Reason').value).toBe('Copied twice')
  })

  it('says that a test of another site is not here', async () => {
    answerSheet()
    apiStandIn.use(http.get(`${ADDRESS}/tests/:id`, () => HttpResponse.json({ code: 'not_found', message: 'x' }, { status: 404 })))
    openTestsPage(PAGE)
    expect((await screen.findByText('This test is not here')).tagName).toBe('B')
  })
})
