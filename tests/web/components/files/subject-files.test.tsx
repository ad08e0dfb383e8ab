import { QueryClientProvider } from '@tanstack/react-query'
import { configure, render, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { delay, http, HttpResponse } from 'msw'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { FileSide } from '#shared/policies/attachment.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Attachment } from '#shared/schemas/attachment.ts'
import { buildAttachment } from '#tests/factories/attachment-view.ts'
import { buildCellColumns, buildSiteView, SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { SubjectFiles } from '#web/components/files/subject-files.tsx'
import { uploads } from '#web/data/attachment/uploads.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { createQueryClient } from '#web/lib/query-client.ts'
import { SiteProvider } from '#web/lib/site-context.tsx'

const ADDRESS = `/api/sites/${SITE_ID}/attachments`
const OF = { subject: 'test', subjectId: buildAttachment().subjectId } as const

/** what the server has */
let kept: Attachment[] = []

function arrive(caption: string): Response {
  const attachment = buildAttachment({ id: `6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1f0${kept.length}`, caption })
  kept.push(attachment)
  return HttpResponse.json(attachment, { status: 201 })
}

function openFiles(files: readonly Attachment[] = [], role: Role = 'technician', side: FileSide = 'contractor', first?: () => Response): void {
  kept = [...files]
  apiStandIn.use(http.get(ADDRESS, () => HttpResponse.json({ attachments: kept })))
  if (first) apiStandIn.use(http.get(ADDRESS, first, { once: true }))
  render(
    <QueryClientProvider client={createQueryClient()}>
      <SiteProvider site={buildSiteView({ role })} columns={buildCellColumns()}>
        <SubjectFiles of={OF} side={side} title="Photos and documents" none="No photo yet." />
      </SiteProvider>
    </QueryClientProvider>,
  )
}

const photo = (name: string, size = 1_200_000): File => {
  const file = new File(['x'], name, { type: 'image/jpeg' })
  Object.defineProperty(file, 'size', { value: size })
  return file
}
const choose = async (...files: File[]): Promise<void> => userEvent.upload(await screen.findByLabelText('Add photos or PDF', { selector: 'input' }), files)
const row = (name: string): HTMLElement => screen.getByRole('listitem', { name })

// the first page of a file is drawn slowly where much else runs
configure({ asyncUtilTimeout: 5_000 })

beforeEach(() => keepCsrfToken('token'))
afterEach(() => uploads.clear())

describe('the files of a record', () => {
  it('shows each with who and when, and opens it large, arrow keys going on and Escape closing', async () => {
    openFiles([buildAttachment(), buildAttachment({ id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1e02', kind: 'document', fileName: 'report.pdf', caption: '', takenFrom: 'upload', width: null, height: null })])
    const first = await screen.findByRole('button', { name: 'Open Hole before filling' })
    expect(first.querySelector('img')?.getAttribute('src')).toBe(`${ADDRESS}/${buildAttachment().id}/thumbnail`)
    expect(screen.getByText('Milan Petrak, taken Dec 1, 11:40').tagName).toBe('P')
    await userEvent.click(first)
    const dialog = screen.getByRole('dialog', { name: 'Hole before filling' })
    expect(within(dialog).getByRole('img', { name: 'Hole before filling' }).getAttribute('src')).toBe(`${ADDRESS}/${buildAttachment().id}/file`)
    expect(within(dialog).getByText('1 of 2').tagName).toBe('SPAN')
    expect(dialog.textContent).toContain('ab12cd34ef56')
    await userEvent.keyboard('{ArrowRight}')
    expect(within(screen.getByRole('dialog', { name: 'report.pdf' })).getByRole('link', { name: 'Save the document' }).getAttribute('download')).toBe('report.pdf')
    await userEvent.keyboard('{ArrowRight}{Escape}')
    expect(screen.queryByRole('dialog')).toBeNull()
    expect(document.activeElement).toBe(first)
  })

  it('says when there are none, to who can add some', async () => {
    openFiles()
    expect((await screen.findByText('No photo yet.')).tagName).toBe('P')
    expect(screen.getByRole('button', { name: 'Add photos or PDF' }).tagName).toBe('BUTTON')
  })

  it.each([
    ['superintendent', 'contractor'],
    ['owner-rep', 'contractor'],
    ['qc-lead', 'owner'],
  ] as const)('offers no adding to a %s on a record of the %s', async (role, side) => {
    openFiles([buildAttachment()], role, side)
    await screen.findByRole('button', { name: 'Open Hole before filling' })
    expect(screen.queryByRole('button', { name: 'Add photos or PDF' })).toBeNull()
  })

  it('says that they cannot be read, and tries again', async () => {
    openFiles([buildAttachment()], 'technician', 'contractor', () => HttpResponse.json({ code: 'not_found', message: 'There is nothing here that you can see.', requestId: 'r' }, { status: 404 }))
    expect((await screen.findByRole('alert')).textContent).toMatch(/^There is nothing here/)
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }))
    expect((await screen.findByRole('button', { name: 'Open Hole before filling' })).tagName).toBe('BUTTON')
  })

  it('withdraws only with a reason', async () => {
    openFiles([buildAttachment()], 'qc-lead')
    const reasons: unknown[] = []
    const withdrawn = buildAttachment({ withdrawn: { at: '2026-12-01T21:00:00.000Z', by: 'Rosa Okafor', reason: 'Another hole' } })
    apiStandIn.use(
      http.post(`${ADDRESS}/:id/withdraw`, async ({ request }) => {
        reasons.push(await request.json())
        return HttpResponse.json(withdrawn)
      }),
    )
    await userEvent.click(await screen.findByRole('button', { name: 'Open Hole before filling' }))
    await userEvent.click(screen.getByRole('button', { name: 'Withdraw' }))
    const dialog = screen.getByRole('dialog', { name: 'Withdraw “Hole before filling”?' })
    await userEvent.click(within(dialog).getByRole('button', { name: 'Withdraw with reason' }))
    expect(within(dialog).getByRole('alert').textContent).toBe('Say why, in a few words')
    apiStandIn.use(http.get(ADDRESS, () => HttpResponse.json({ attachments: [withdrawn] })))
    await userEvent.type(within(dialog).getByLabelText('Reason'), 'Another hole')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Withdraw with reason' }))
    expect((await screen.findByText('Withdrawn: Another hole')).tagName).toBe('P')
    expect(reasons).toEqual([{ reason: 'Another hole' }])
    expect(screen.queryByRole('dialog')).toBeNull()
  })
})

describe('adding files', () => {
  it('sends those chosen with their captions, one after the other, and shows how far each is', async () => {
    openFiles()
    let underway = 0
    let most = 0
    const tokens: (string | null)[] = []
    apiStandIn.use(
      http.post(ADDRESS, async ({ request }) => {
        most = Math.max(most, ++underway)
        tokens.push(request.headers.get('x-csrf-token'))
        await delay(60)
        underway--
        return arrive(`Photo ${tokens.length}`)
      }),
    )
    await choose(photo('a.jpg'), photo('b.jpg'))
    await userEvent.type(within(row('a.jpg')).getByLabelText('What it shows'), 'Hole')
    expect(uploads.list().map((upload) => [upload.file.name, upload.caption, upload.state])).toEqual([['a.jpg', 'Hole', 'chosen'], ['b.jpg', '', 'chosen']])
    await userEvent.click(screen.getByRole('button', { name: 'Send 2 files' }))
    expect(within(row('a.jpg')).getByRole('progressbar', { name: 'Sending' }).getAttribute('aria-valuemax')).toBe('1200')
    expect(within(row('b.jpg')).getByText('Waits for its turn').tagName).toBe('P')
    expect((await screen.findByRole('button', { name: 'Open Photo 2' })).tagName).toBe('BUTTON')
    await waitFor(() => expect(uploads.list()).toEqual([]))
    expect([most, tokens]).toEqual([1, ['token', 'token']])
  })

  it('keeps a file that failed and sends it again under the same id, without choosing it anew', async () => {
    openFiles()
    let tries = 0
    apiStandIn.use(http.post(ADDRESS, () => (++tries === 1 ? HttpResponse.error() : arrive('Arrived'))))
    await choose(photo('a.jpg'))
    const [before] = uploads.list()
    await userEvent.click(screen.getByRole('button', { name: 'Send the file' }))
    expect((await within(row('a.jpg')).findByRole('alert')).textContent).toBe('The server does not answer. The file is kept here; try again when there is a signal.')
    expect(uploads.list()[0]?.id).toBe(before?.id)
    await userEvent.click(within(row('a.jpg')).getByRole('button', { name: 'Try again' }))
    expect((await screen.findByRole('button', { name: 'Open Arrived' })).tagName).toBe('BUTTON')
    expect(tries).toBe(2)
  })

  it('says what is wrong with one file and keeps the others', async () => {
    openFiles()
    const message = 'By its content this file is neither a photo nor a PDF, whatever its name says.'
    let tries = 0
    apiStandIn.use(http.post(ADDRESS, () => (++tries === 1 ? HttpResponse.json({ code: 'invalid', message, requestId: 'r' }, { status: 400 }) : arrive('Second'))))
    await choose(photo('a.jpg'), photo('b.jpg'), photo('huge.jpg', 15_000_001))
    expect(within(row('huge.jpg')).getByRole('alert').textContent).toMatch(/up to 15 MB/)
    await userEvent.click(screen.getByRole('button', { name: 'Send 2 files' }))
    expect((await within(row('a.jpg')).findByRole('alert')).textContent).toBe(message)
    expect(within(row('a.jpg')).queryByRole('button', { name: 'Try again' })).toBeNull()
    expect((await screen.findByRole('button', { name: 'Open Second' })).tagName).toBe('BUTTON')
    await userEvent.click(within(row('a.jpg')).getByRole('button', { name: 'Leave out' }))
    expect(screen.queryByRole('listitem', { name: 'a.jpg' })).toBeNull()
  })

  it('gets a fresh token where the one at hand has run out', async () => {
    openFiles()
    const tokens: (string | null)[] = []
    apiStandIn.use(
      http.get('/api/me', () => HttpResponse.json({ user: null, csrfToken: 'fresh' })),
      http.post(ADDRESS, ({ request }) => {
        tokens.push(request.headers.get('x-csrf-token'))
        return tokens.length === 1 ? HttpResponse.json({ code: 'csrf', message: 'Reload', requestId: 'r' }, { status: 403 }) : arrive('Arrived')
      }),
    )
    await choose(photo('a.jpg'))
    await userEvent.click(screen.getByRole('button', { name: 'Send the file' }))
    await screen.findByRole('button', { name: 'Open Arrived' })
    expect(tokens).toEqual(['token', 'fresh'])
  })

  it('asks before the window is left while files are on their way', async () => {
    openFiles()
    const leaves = () => window.dispatchEvent(new Event('beforeunload', { cancelable: true }))
    expect(leaves()).toBe(true)
    await choose(photo('a.jpg'))
    expect(leaves()).toBe(false)
    uploads.clear()
    await waitFor(() => expect(leaves()).toBe(true))
  })
})
