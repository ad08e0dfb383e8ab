import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { QueryClientProvider } from '@tanstack/react-query'
import { http, HttpResponse } from 'msw'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import { beforeEach, describe, expect, it } from 'vitest'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { SignInPage } from '#web/features/session/sign-in-page.tsx'
import { nextPage } from '#web/features/session/sign-in-words.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { createQueryClient } from '#web/lib/query-client.ts'

const USER = { id: '4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', name: 'Rosa Okafor', email: 'rosa@alder.example' }
let signedIn = false

function openPage(address = '/sign-in') {
  const router = createMemoryRouter(
    [
      { path: '/sign-in', element: <SignInPage /> },
      { path: '/', element: <p>My sites</p> },
      { path: '/sites/:siteId/ground', element: <p>The Ground</p> },
    ],
    { initialEntries: [address] },
  )
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  )
}

function answerSession(answer: () => Response): void {
  apiStandIn.use(http.post('/api/session', answer))
}

async function fillAndSend(): Promise<void> {
  await userEvent.type(await screen.findByLabelText('E-mail'), USER.email)
  await userEvent.type(screen.getByLabelText('Password'), 'correct horse')
  await userEvent.click(screen.getByRole('button', { name: 'Sign in' }))
}

beforeEach(() => {
  signedIn = false
  keepCsrfToken(null)
  apiStandIn.use(http.get('/api/me', () => HttpResponse.json({ user: signedIn ? USER : null, csrfToken: 'token' })))
})

describe('the sign-in page', () => {
  it('signs in and goes on to the page that was asked for', async () => {
    answerSession(() => {
      signedIn = true
      return HttpResponse.json({ user: USER })
    })
    openPage('/sign-in?next=%2Fsites%2Fs1%2Fground')
    await fillAndSend()
    expect((await screen.findByText('The Ground')).textContent).toBe('The Ground')
  })

  it('says beside each field what is missing and asks the server nothing', async () => {
    openPage()
    await userEvent.click(await screen.findByRole('button', { name: 'Sign in' }))
    expect((await screen.findAllByRole('alert')).map((alert) => alert.textContent)).toEqual(['Type your e-mail address.', 'Type your password.'])
    expect(document.activeElement).toBe(screen.getByLabelText('E-mail'))
  })

  it('says in plain words that the two do not belong together, and keeps what was typed', async () => {
    answerSession(() => HttpResponse.json({ code: 'not_signed_in', message: 'x' }, { status: 401 }))
    openPage()
    await fillAndSend()
    expect((await screen.findByRole('alert')).textContent).toMatch(/do not belong together/)
    expect(screen.getByLabelText<HTMLInputElement>('E-mail').value).toBe(USER.email)
  })

  it('says that too many tries were made and that nothing is locked', async () => {
    answerSession(() => HttpResponse.json({ code: 'too_many_requests', message: 'x' }, { status: 429 }))
    openPage()
    await fillAndSend()
    expect((await screen.findByRole('alert')).textContent).toMatch(/Too many tries.*Wait a few minutes.*not locked/)
  })

  it('says that the server does not answer and that what was typed is kept', async () => {
    answerSession(() => HttpResponse.error())
    openPage()
    await fillAndSend()
    expect((await screen.findByRole('alert')).textContent).toMatch(/server does not answer.*still here/)
  })

  it('sends somebody who is signed in straight on', async () => {
    signedIn = true
    openPage()
    expect((await screen.findByText('My sites')).textContent).toBe('My sites')
  })
})

describe('where to go on to', () => {
  it.each([
    ['/sites/s1/ground?lift=3', '/sites/s1/ground?lift=3'],
    ['//elsewhere.example', '/'],
    ['/\\elsewhere.example', '/'],
    ['https://elsewhere.example', '/'],
    [null, '/'],
  ])('takes %s to %s', (wish, page) => {
    expect(nextPage(wish)).toBe(page)
  })
})
