import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import type { CreateView, SavedView } from '#shared/schemas/saved-view.ts'
import { buildRegisterPage, buildRegisterTest, buildSavedView } from '#tests/factories/register-view.ts'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { ADDRESS, answerSheet, openTestsPage } from './open-tests-page.tsx'

const PAGE = `/sites/${SITE_ID}/tests`
const SHARED = buildSavedView({ id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d72', name: 'Retests of the pad', shared: true, author: { id: 'other', name: 'Rosa Okafor' }, mayEdit: false, content: { filter: { retest: 'true' }, sort: { key: 'sampled', direction: 'desc' }, columns: ['number', 'cell'] } })

let views: SavedView[] = []
let sent: { method: string; path: string; body: unknown }[] = []

function answer(): void {
  answerSheet()
  const hear = async (request: Request): Promise<void> => {
    const text = await request.text()
    sent.push({ method: request.method, path: new URL(request.url).pathname.replace(`${ADDRESS}/views`, ''), body: text === '' ? null : JSON.parse(text) })
  }
  apiStandIn.use(
    http.get(`${ADDRESS}/tests`, () => HttpResponse.json(buildRegisterPage([buildRegisterTest()]))),
    http.get(`${ADDRESS}/views`, () => HttpResponse.json({ views })),
    http.post(`${ADDRESS}/views`, async ({ request }) => {
      const body = (await request.clone().json()) as CreateView
      await hear(request)
      const view = buildSavedView(body)
      views = [...views, view]
      return HttpResponse.json(view, { status: 201 })
    }),
    http.put(`${ADDRESS}/views/default`, async ({ request }) => {
      await hear(request)
      return HttpResponse.json({ views })
    }),
    http.patch(`${ADDRESS}/views/:id`, async ({ request }) => {
      await hear(request)
      return HttpResponse.json(buildSavedView())
    }),
    http.delete(`${ADDRESS}/views/:id`, async ({ request }) => {
      await hear(request)
      return new HttpResponse(null, { status: 204 })
    }),
  )
}

const open = (address = PAGE, role: Role = 'technician') => {
  answer()
  return openTestsPage(address, role)
}
const searchOf = (router: ReturnType<typeof openTestsPage>) => Object.fromEntries(new URLSearchParams(router.state.location.search))
/** The button that names the view at hand; waits for the views themselves, which its menu needs. */
const openMenu = async () => {
  await screen.findByText(/^1 test/)
  await userEvent.click(screen.getByText('All tests'))
}

beforeEach(() => {
  views = [buildSavedView(), SHARED]
  sent = []
})

describe('views of the register', () => {
  it('bring filter, order and columns at once, one’s own and those shared', async () => {
    const router = open()
    await openMenu()
    expect(within(await screen.findByLabelText('Shared with the site')).getByText('Retests of the pad').getAttribute('role')).toBe('menuitem')
    await userEvent.click(screen.getByText('Failures'))
    expect(searchOf(router)).toEqual({ outcome: 'fail', sort: 'rc', direction: 'asc', columns: 'number,cell,rc,rcLimit', view: buildSavedView().id })
  })

  it('open the register where one is chosen for that, but not over what a link says', async () => {
    views = [buildSavedView({ isDefault: true })]
    const router = open()
    await screen.findByText('Failures')
    expect(searchOf(router)).toMatchObject({ outcome: 'fail', view: buildSavedView().id })
    await userEvent.click(await screen.findByText('Clear filters'))
    expect(searchOf(router).outcome).toBeUndefined()
  })

  it('leave a link as it is', async () => {
    views = [buildSavedView({ isDefault: true })]
    const router = open(`${PAGE}?lift=10`)
    await screen.findByText('1 test of this choice')
    expect(searchOf(router)).toEqual({ lift: '10' })
  })

  it('are saved under a name, and shared only by quality control', async () => {
    const router = open(`${PAGE}?outcome=suspect&columns=number,rc`)
    await openMenu()
    await userEvent.click(await screen.findByText('Save as a view'))
    await userEvent.click(await screen.findByText('Save view'))
    expect((await screen.findByRole('alert')).textContent).toBe('Give a name')
    await userEvent.type(screen.getByLabelText('Name'), 'Doubtful')
    await userEvent.click(screen.getByLabelText('Show it to everybody who sees the results'))
    await userEvent.click(screen.getByLabelText('Open Results with it'))
    await userEvent.click(screen.getByText('Save view'))
    await waitFor(() => expect(sent).toHaveLength(2))
    const [created, chosen] = sent
    const { id, ...rest } = created?.body as CreateView
    expect(rest).toEqual({ name: 'Doubtful', shared: true, content: { filter: { outcome: ['suspect'] }, sort: { key: 'sampled', direction: 'desc' }, columns: ['number', 'rc'] } })
    expect(chosen).toEqual({ method: 'PUT', path: '/default', body: { viewId: id } })
    expect(searchOf(router)).toMatchObject({ view: id })
  })

  it('cannot be shared by a superintendent', async () => {
    open(PAGE, 'superintendent')
    await openMenu()
    await userEvent.click(await screen.findByText('Save as a view'))
    expect((await screen.findByLabelText('Name')).tagName).toBe('INPUT')
    expect(screen.queryByLabelText('Show it to everybody who sees the results')).toBeNull()
  })

  it('say when what is shown was changed, and take the change on', async () => {
    open(`${PAGE}?outcome=fail&sort=rc&direction=desc&columns=number,cell,rc,rcLimit&view=${buildSavedView().id}`)
    await userEvent.click(await screen.findByText('changed'))
    await userEvent.click(await screen.findByText('Update Failures to this'))
    await waitFor(() => expect(sent).toEqual([{ method: 'PATCH', path: `/${buildSavedView().id}`, body: { content: { ...buildSavedView().content, sort: { key: 'rc', direction: 'desc' } } } }]))
  })

  it('are renamed, shared, made the first and removed; those of others only chosen', async () => {
    open()
    await openMenu()
    await userEvent.click(await screen.findByText('Rename, share or remove views'))
    const lines = within(await screen.findByLabelText('Views')).getAllByRole('listitem')
    expect(lines[1]?.textContent).toContain('Shared by Rosa Okafor')
    expect(within(lines[1] ?? document.body).queryByText('Rename')).toBeNull()
    const own = within(lines[0] ?? document.body)
    await userEvent.click(own.getByText('Rename'))
    await userEvent.clear(own.getByLabelText('New name'))
    await userEvent.type(own.getByLabelText('New name'), 'All failures{Enter}')
    await userEvent.click(own.getByLabelText('Everybody sees it'))
    await userEvent.click(own.getByLabelText('Results opens with it'))
    await userEvent.click(own.getByText('Remove'))
    expect(sent.map(({ method }) => method)).not.toContain('DELETE')
    await userEvent.click(own.getByText('Remove Failures'))
    const { id } = buildSavedView()
    await waitFor(() => expect(sent).toHaveLength(4))
    expect(sent).toEqual([
      { method: 'PATCH', path: `/${id}`, body: { name: 'All failures' } },
      { method: 'PATCH', path: `/${id}`, body: { shared: true } },
      { method: 'PUT', path: '/default', body: { viewId: id } },
      { method: 'DELETE', path: `/${id}`, body: null },
    ])
  })

  it('say what was refused', async () => {
    open()
    apiStandIn.use(http.patch(`${ADDRESS}/views/:id`, () => HttpResponse.json({ code: 'conflict', message: 'A view is called "Loose" already. Nothing was saved; give it another name.' }, { status: 409 })))
    await openMenu()
    await userEvent.click(await screen.findByText('Rename, share or remove views'))
    const line = within(within(await screen.findByLabelText('Views')).getAllByRole('listitem')[0] ?? document.body)
    await userEvent.click(line.getByText('Rename'))
    await userEvent.type(line.getByLabelText('New name'), ' 2{Enter}')
    expect((await screen.findByRole('alert')).textContent).toContain('A view is called "Loose" already.')
  })
})
