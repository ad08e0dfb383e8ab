import { fireEvent, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import type { ImportPreview, ImportTests, PreviewedRow } from '#shared/schemas/test-exchange.ts'
import { openSheet, SHEET_ADDRESS } from '#tests/factories/open-sheet.tsx'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { ImportPage } from '#web/features/tests/exchange/import-page.tsx'
import { keepCsrfToken } from '#web/lib/api-client.ts'

// a block is pasted, looked at, corrected and sent
vi.setConfig({ testTimeout: 30_000 })

const BLOCK = [
  ['Sample no.', 'Date', 'Time', 'Location', 'Lift', 'Wet density', 'Water pct', 'Proctor'],
  ['A-1', '12/1/2026', '9:15 am', 'B2', '10', '128.4', '13.1', 'RB-3'],
  ['A-2', '12/1/2026', '9:40 am', 'C2', 'ten', '127.9', '12.8', 'RB-3'],
  ['A-3', '12/1/2026', '10:05 am', 'C3', '10', '118.2', '12.2', 'RB-3'],
].map((row) => row.join('\t')).join('\n')

let asked: ImportPreview[] = []
let sent: ImportTests[] = []

function previewed({ line, test }: ImportPreview['rows'][number]): PreviewedRow {
  const blank = { line, id: test.id, problems: [], number: null, twin: false, cell: 5, verdict: null, flags: [] }
  if (test.lift !== 10) return { ...blank, state: 'attention', problems: [{ column: 'lift', message: `Lift ${test.lift} is not planned in B2.` }] }
  return { ...blank, state: 'ready', verdict: { outcome: 'pass', treatedAsFail: false, near: false, headline: 'Meets spec', rc: 97.1, dryDensity: 1800, moisture: 13.1 } }
}

beforeEach(() => {
  localStorage.clear()
  keepCsrfToken('token')
  asked = []
  sent = []
})

function open(role: 'technician' | 'superintendent' = 'technician') {
  const router = openSheet(ImportPage, { site: { role }, pattern: '/sites/:siteId/tests/import', address: `/sites/${SITE_ID}/tests/import`, answers: { '/curves': { curves: [] }, '/gauges': { gauges: [] } } })
  apiStandIn.use(
    http.post(`${SHEET_ADDRESS}/tests/import/preview`, async ({ request }) => {
      const body = (await request.json()) as ImportPreview
      asked.push(body)
      return HttpResponse.json({ rows: body.rows.map(previewed) })
    }),
    http.post(`${SHEET_ADDRESS}/tests/import`, async ({ request }) => {
      const body = (await request.json()) as ImportTests
      sent.push(body)
      const recorded = body.rows.map(({ line, reference, test }, index) => ({ line, reference, id: test.id, number: `T-020${index + 1}`, outcome: 'pass', headline: 'Meets spec', orderNumber: null }))
      return HttpResponse.json({ id: body.id, revision: 9, recorded, already: [] }, { status: 201 })
    }),
  )
  return router
}

async function paste(text: string): Promise<void> {
  fireEvent.change(await screen.findByLabelText(/Rows copied from a spreadsheet/), { target: { value: text } })
  await userEvent.click(screen.getByRole('button', { name: 'Read the rows' }))
}

/** The block pasted and its columns settled: a plain method, required, moisture stated. */
async function check(): Promise<void> {
  await paste(BLOCK)
  await userEvent.selectOptions(await screen.findByLabelText('Water pct'), 'Moisture')
  await userEvent.selectOptions(screen.getByLabelText('Purpose'), 'Required')
  await userEvent.selectOptions(screen.getByLabelText('Method'), 'Plain')
  await userEvent.click(screen.getByRole('button', { name: 'Check the rows' }))
}

const valueOf = (field: HTMLElement): string => (field as HTMLInputElement | HTMLSelectElement).value
/** What is said beneath a field. */
const saidAt = (field: HTMLElement): string => (field.getAttribute('aria-describedby') ?? '').split(' ').map((id) => document.getElementById(id)?.textContent ?? '').join(' ')

const line = async (number: number) => {
  const list = await screen.findByRole('list', { name: 'Rows of the file' })
  const found = within(list).getAllByRole('listitem').find((item) => item.textContent?.startsWith(`Line ${number}`))
  if (found === undefined) throw new Error(`Line ${number} is not shown`)
  return found
}

describe('importing results', () => {
  it('maps the columns it knows, and asks for the unit the heads do not name', async () => {
    open()
    await paste(BLOCK)
    expect(valueOf(await screen.findByLabelText('Sample no.'))).toBe('number')
    for (const [head, key] of [['Date', 'sampledAt'], ['Time', 'sampledTime'], ['Location', 'cell'], ['Lift', 'lift'], ['Wet density', 'wetDensity'], ['Proctor', 'curve']] as const) expect(valueOf(screen.getByLabelText(head))).toBe(key)
    expect(valueOf(screen.getByLabelText('Water pct'))).toBe('')
    expect(valueOf(screen.getByLabelText('Unit: densities'))).toBe('pcf')
    expect((screen.getByText('The file does not tell. Look at a date.')).isConnected).toBe(true)
  })

  it('shows each row with its verdict or what is wrong at its cell, takes a correction, and stores nothing before all are settled', async () => {
    open()
    await check()
    await waitFor(async () => expect((await line(2)).textContent).toContain('Ready. Meets spec: 97.1'))
    expect((await line(3)).textContent).toContain('Needs attention')
    const record = screen.getByRole<HTMLButtonElement>('button', { name: /^Record/ })
    expect(record.disabled).toBe(true)
    expect(asked.flatMap(({ rows }) => rows.map((row) => row.line)).sort()).toEqual([2, 4])
    const cell = screen.getByLabelText('Line 3: Lift')
    expect(saidAt(cell)).toBe('“ten” is no number. Write it plainly, such as 12.5.')
    await userEvent.clear(cell)
    await userEvent.type(cell, '11{Enter}')
    await waitFor(() => expect(saidAt(screen.getByLabelText('Line 3: Lift'))).toBe('Lift 11 is not planned in B2.'))
    await userEvent.clear(screen.getByLabelText('Line 3: Lift'))
    await userEvent.type(screen.getByLabelText('Line 3: Lift'), '10{Enter}')
    await waitFor(() => expect(record.disabled).toBe(false))
    expect(sent).toEqual([])
    await userEvent.click(record)
    expect((await screen.findByRole('heading', { name: '3 tests were recorded' })).isConnected).toBe(true)
    expect(sent[0]?.rows.map(({ line: at, reference, identified, test }) => [at, reference, identified, test.lift, test.sampledAt, test.place])).toEqual([
      [2, 'A-1', false, 10, '2026-12-01T17:15:00.000Z', { cell: 'B2' }],
      [3, 'A-2', false, 10, '2026-12-01T17:40:00.000Z', { cell: 'C2' }],
      [4, 'A-3', false, 10, '2026-12-01T18:05:00.000Z', { cell: 'C3' }],
    ])
    expect(sent[0]?.rows[0]?.test.sheet).toEqual({ method: 'plain', densityUnit: 'pcf', densityIs: 'wet', density: 128.4, moisture: { method: 'stated', percent: 13.1 } })
    expect((within(screen.getByRole('table', { name: 'Recorded tests' })).getAllByRole('row')[1]).textContent).toContain('T-02012A-1Meets spec')
  })

  it('sends what was set aside with its reason, and gives it back as a file', async () => {
    open()
    await check()
    await waitFor(async () => expect((await line(2)).textContent).toContain('Ready'))
    await userEvent.click(within(await line(3)).getByRole('button', { name: 'Set aside' }))
    expect((await line(3)).textContent).toContain('Set aside: “ten” is no number')
    const saved: Blob[] = []
    vi.spyOn(URL, 'createObjectURL').mockImplementation((blob) => {
      saved.push(blob as Blob)
      return 'blob:x'
    })
    vi.spyOn(HTMLAnchorElement.prototype, 'click').mockImplementation(() => undefined)
    await userEvent.click(screen.getByRole('button', { name: 'Save what is set aside' }))
    const text = await new Promise<string>((resolve) => {
      const reader = new FileReader()
      reader.onload = () => resolve(String(reader.result))
      reader.readAsText(saved[0] as Blob)
    })
    expect(text).toContain('A-2,12/1/2026,9:40 am,C2,ten,127.9,12.8,RB-3,3,"“ten” is no number.')
    await userEvent.click(screen.getByRole('button', { name: 'Record 2 tests' }))
    await screen.findByRole('heading', { name: '2 tests were recorded' })
    expect(sent[0]?.setAside).toEqual([{ line: 3, reason: expect.stringContaining('“ten” is no number') }])
  })

  it('keeps an unfinished import on the device, and the same lines make the same records again', async () => {
    open()
    await check()
    await waitFor(async () => expect((await line(2)).textContent).toContain('Ready'))
    const [first] = asked.flatMap(({ rows }) => rows.filter((row) => row.line === 2))
    document.body.innerHTML = ''
    open()
    await userEvent.click(await screen.findByRole('button', { name: 'Go on' }))
    expect(valueOf(await screen.findByLabelText('Water pct'))).toBe('moisturePercent')
    await userEvent.click(screen.getByRole('button', { name: 'Check the rows' }))
    await waitFor(async () => expect((await line(2)).textContent).toContain('Ready'))
    const again = asked.flatMap(({ rows }) => rows.filter((row) => row.line === 2))
    expect(again.at(-1)?.test.id).toBe(first?.test.id)
    expect(first?.test.id).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-8/)
  })

  it('remembers what heads mean for the next file', async () => {
    open()
    await check()
    await waitFor(async () => expect((await line(2)).textContent).toContain('Ready'))
    await userEvent.click(screen.getByRole('button', { name: 'Back to the columns' }))
    await userEvent.click(screen.getByRole('button', { name: 'Another file' }))
    await paste(`${BLOCK}\nA-4\t12/1/2026\t10:30 am\tC3\t10\t120\t12\tRB-3`)
    expect(valueOf(await screen.findByLabelText('Water pct'))).toBe('moisturePercent')
    expect(valueOf(screen.getByLabelText('Method'))).toBe('Plain')
  })

  it('says what cannot be read, and turns away who does not record', async () => {
    open()
    await paste('one line only')
    expect((await screen.findByRole('alert')).textContent).toContain('There is only one line in this.')
    document.body.innerHTML = ''
    open('superintendent')
    expect((await screen.findByText('Your role does not record tests')).isConnected).toBe(true)
  })
})
