import { configure, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import { buildRegisterPage } from '#tests/factories/register-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { uploads } from '#web/data/attachment/uploads.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { ADDRESS, answerSheet, buildDetail, enter, enterS1, openTestsPage, SHEET } from './open-tests-page.tsx'

// a whole sheet is typed in, key by key
vi.setConfig({ testTimeout: 60_000 })

// the first page of a file is drawn slowly where much else runs
configure({ asyncUtilTimeout: 5_000 })

beforeEach(() => {
  sessionStorage.clear()
  localStorage.clear()
  keepCsrfToken(null)
})
afterEach(() => uploads.clear())

const choosePhoto = async (): Promise<void> => userEvent.upload(await screen.findByLabelText('Add photo', { selector: 'input' }), new File(['x'], 'hole.jpg', { type: 'image/jpeg' }))

describe('photos chosen before a test is saved', () => {
  it('go out only once it is saved; one that fails is tried again on the saved sheet', async () => {
    answerSheet()
    const events: string[] = []
    apiStandIn.use(
      http.post(`${ADDRESS}/tests`, async ({ request }) => {
        const { id } = (await request.json()) as CreateTest
        events.push('test')
        apiStandIn.use(http.get(`${ADDRESS}/tests/:id`, () => HttpResponse.json(buildDetail({ id }))))
        return HttpResponse.json({ id, number: 'T-0219', outcome: 'pass', headline: 'Meets spec', revision: 8, marked: 0, orderId: null, orderNumber: null }, { status: 201 })
      }),
      http.post(`${ADDRESS}/attachments`, () => {
        events.push('photo')
        return HttpResponse.error()
      }),
    )
    openTestsPage(`${SHEET}?stake=N1`)
    await choosePhoto()
    await enterS1()
    await enter('Depth below surface', '6')
    expect(events).toEqual([])
    await userEvent.click(screen.getAllByRole('button', { name: 'Save result' })[0] ?? document.body)
    await screen.findByText('T-0219 saved.')
    const row = within(await screen.findByRole('listitem', { name: 'hole.jpg' }))
    await userEvent.click(await row.findByRole('button', { name: 'Try again' }))
    await waitFor(() => expect(events).toEqual(['test', 'photo', 'photo']))
  })

  it('are forgotten when the sheet is given up', async () => {
    answerSheet()
    apiStandIn.use(http.get(`${ADDRESS}/tests`, () => HttpResponse.json(buildRegisterPage([]))), http.get(`${ADDRESS}/views`, () => HttpResponse.json({ views: [] })))
    openTestsPage(SHEET)
    await choosePhoto()
    expect(uploads.list()).toHaveLength(1)
    await userEvent.click(screen.getAllByRole('button', { name: 'Cancel' })[0] ?? document.body)
    expect(uploads.list()).toEqual([])
  })
})
