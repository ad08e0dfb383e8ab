import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { buildCurve, CURVE_ID } from '#tests/factories/curve-view.ts'
import { openSheet, SHEET_ADDRESS } from '#tests/factories/open-sheet.tsx'
import { buildRejudging, REHEARSED, SUCCESSOR_ID } from '#tests/factories/rejudging-view.ts'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { RejudgePage } from '#web/features/lab/rejudge/rejudge-page.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'

const SUCCESSOR = buildCurve({ id: SUCCESSOR_ID, code: 'RB-4', status: 'approved' })
const SUPERSEDED = { status: 'superseded', superseded: { by: { id: SUCCESSOR_ID, code: 'RB-4' }, at: '2026-11-30T16:00:00.000Z', who: 'Ines Marsh', reason: 'The pit turned' } } as const

function open(role: Role = 'qc-lead', change: Partial<Curve> = SUPERSEDED, rejudging = buildRejudging()) {
  const curve = buildCurve({ status: 'approved', ...change })
  return openSheet(RejudgePage, {
    site: { role },
    pattern: '/sites/:siteId/lab/curves/:curveId/rejudge',
    address: `/sites/${SITE_ID}/lab/curves/${CURVE_ID}/rejudge`,
    answers: { '/curves': { curves: [curve, SUCCESSOR] }, [`/curves/${CURVE_ID}/rejudging`]: rejudging },
  })
}

function takePosts(path: string, answer: () => Response): unknown[] {
  const sent: unknown[] = []
  apiStandIn.use(
    http.post(`${SHEET_ADDRESS}/curves/${CURVE_ID}${path}`, async ({ request }) => {
      sent.push(await request.json())
      return answer()
    }),
  )
  return sent
}

const rows = async () => within(await screen.findByRole('table', { name: 'Verdicts before and after' })).getAllByRole('row').slice(1)

beforeEach(() => keepCsrfToken('token'))

describe('judging the tests of a superseded curve again', () => {
  it('shows what changes first, and counts each kind of change', async () => {
    open()
    expect((await rows()).map((row) => within(row).getByRole('rowheader').textContent)).toEqual(['T-0003', 'T-0004', 'T-0002'])
    expect(screen.getAllByRole('radio').map((radio) => radio.closest('label')?.textContent)).toEqual(['Changed, 3', 'Would fail, 2', 'Would pass, 1', 'Figures only, 1', 'Cannot be judged, 1', 'All, 5'])
    const [first, second, third] = await rows()
    expect(first?.textContent).toContain('98.0 → 93.3')
    expect(first?.textContent).toContain('Marks its ground and issues or joins a rework order')
    expect(second?.textContent).toContain('the owner’s to judge again')
    expect(third?.textContent).toContain('R-001 stands: work on it has begun')
    await userEvent.click(screen.getByRole('radio', { name: 'Cannot be judged, 1' }))
    expect((await rows())[0]?.textContent).toContain('The stones of this curve are not known.')
  })

  it('rehearses the choice, asks why, and judges exactly the chosen tests', async () => {
    open()
    await rows()
    const rehearsed = takePosts('/rejudging/rehearse', () => HttpResponse.json(REHEARSED))
    const sent = takePosts('/rejudge', () => HttpResponse.json(REHEARSED))
    expect(screen.queryByRole('checkbox', { name: 'Judge T-0004 again' })).toBeNull()
    await userEvent.click(within(screen.getByRole('table')).getByRole('checkbox', { name: 'Judge T-0003 again' }))
    await userEvent.click(screen.getByRole('button', { name: 'Judge 1 test again' }))
    const dialog = await screen.findByRole('dialog')
    const list = await within(dialog).findByRole('list', { name: 'What it would do' })
    expect(within(list).getAllByRole('listitem').map((item) => item.textContent)).toEqual(['2 cells: released to rework, lift 2', 'Release A-012 revoked in 2 cells of lift 2', 'A rework order for T-0003'])
    expect(rehearsed).toEqual([{ by: SUCCESSOR_ID, tests: ['T-0003'] }])
    await userEvent.click(within(dialog).getByRole('button', { name: 'Judge again' }))
    expect((await within(dialog).findByRole('alert')).textContent).toBe('Say why, in a few words')
    expect(sent).toEqual([])
    await userEvent.type(within(dialog).getByLabelText('Why'), 'New curve of the pit')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Judge again' }))
    expect((await screen.findByText('1 test judged again by RB-4.')).textContent).toBe('1 test judged again by RB-4.')
    expect(sent).toEqual([expect.objectContaining({ by: SUCCESSOR_ID, tests: ['T-0003'], reason: 'New curve of the pit' })])
    expect(screen.getByText('R-009 for T-0003').textContent).toBe('R-009 for T-0003')
  })

  it('keeps what was typed when the server refuses', async () => {
    open()
    await rows()
    takePosts('/rejudging/rehearse', () => HttpResponse.json(REHEARSED))
    takePosts('/rejudge', () => HttpResponse.json({ code: 'conflict', message: 'Look at the table again; nothing was changed.' }, { status: 409 }))
    await userEvent.click(within(screen.getByRole('table')).getByRole('checkbox', { name: 'All that are shown' }))
    await userEvent.click(screen.getByRole('button', { name: 'Judge 2 tests again' }))
    const dialog = await screen.findByRole('dialog')
    await within(dialog).findByRole('list', { name: 'What it would do' })
    await userEvent.type(within(dialog).getByLabelText('Why'), 'New curve')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Judge again' }))
    expect((await within(dialog).findByRole('alert')).textContent).toContain('Look at the table again')
    expect(within(dialog).getByLabelText<HTMLTextAreaElement>('Why').value).toBe('New curve')
  })

  it('is read by others without choosing', async () => {
    open('superintendent')
    await rows()
    expect(screen.queryByRole('checkbox')).toBeNull()
    expect(screen.queryByRole('button', { name: /^Judge/ })).toBeNull()
  })
})

describe('superseding a curve', () => {
  it('shows beforehand what judging again would change, and asks why', async () => {
    open('qc-lead', {})
    await rows()
    const sent = takePosts('/supersede', () => HttpResponse.json(buildCurve(SUPERSEDED)))
    await userEvent.click(screen.getByRole('button', { name: 'Supersede RB-3' }))
    expect((await screen.findByRole('alert')).textContent).toBe('Say why, in a few words')
    await userEvent.type(screen.getByLabelText('Why'), 'The pit turned')
    await userEvent.click(screen.getByRole('button', { name: 'Supersede RB-3' }))
    await waitFor(() => expect(sent).toEqual([{ successorId: SUCCESSOR_ID, reason: 'The pit turned' }]))
    expect(screen.queryByRole('checkbox')).toBeNull()
  })

  it('is the lead’s alone; others only compare', async () => {
    open('technician', {})
    await rows()
    expect(screen.queryByLabelText('Why')).toBeNull()
    expect(screen.getByRole('heading', { name: /Compare RB-3/ }).textContent).toContain('Compare RB-3')
  })

  it('says what is missing where nothing can take its place', async () => {
    openSheet(RejudgePage, {
      site: { role: 'qc-lead' },
      pattern: '/sites/:siteId/lab/curves/:curveId/rejudge',
      address: `/sites/${SITE_ID}/lab/curves/${CURVE_ID}/rejudge`,
      answers: { '/curves': { curves: [buildCurve({ status: 'approved' })] } },
    })
    expect((await screen.findByText('Nothing can take the place of RB-3 yet')).textContent).toBe('Nothing can take the place of RB-3 yet')
  })
})
