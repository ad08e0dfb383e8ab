import { screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { describe, expect, it } from 'vitest'
import { REGISTER_KEYS } from '#shared/schemas/test-register.ts'
import { buildRegisterPage, buildRegisterTest } from '#tests/factories/register-view.ts'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { moved } from '#web/features/tests/register/column-dialog.tsx'
import { ADDRESS, answerSheet, openTestsPage } from './open-tests-page.tsx'

const PAGE = `/sites/${SITE_ID}/tests`

function answer(test = buildRegisterTest()): void {
  answerSheet()
  apiStandIn.use(http.get(`${ADDRESS}/tests`, () => HttpResponse.json(buildRegisterPage([test]))), http.get(`${ADDRESS}/views`, () => HttpResponse.json({ views: [] })))
}

const heads = (): (string | null)[] => within(screen.getByRole('table', { name: 'Field tests', hidden: true })).getAllByRole('columnheader', { hidden: true }).map((head) => head.textContent)

describe('the columns of the register', () => {
  it('can all be shown, each figure in the site’s unit', async () => {
    answer(buildRegisterTest({ oversizePercent: 12, saturation: null, rcLimit: null, lotName: null }))
    openTestsPage(`${PAGE}?columns=${REGISTER_KEYS.join(',')}`)
    const table = await screen.findByRole('table', { name: 'Field tests' })
    const cells = within(within(table).getAllByRole('row')[1] ?? table).getAllByRole('cell').map((cell) => cell.textContent)
    expect(Object.fromEntries(heads().slice(1).map((head, index) => [head, cells[index]]))).toEqual({
      Sampled: 'Dec 1, 12:00',
      Zone: 'Pad',
      Lift: '10',
      Cell: 'B2',
      Lot: '–',
      Purpose: 'Required',
      Method: 'Density and moisture',
      'Moisture by': 'Stated',
      'Wet, pcf': '120.8',
      'Dry, pcf': '106.7',
      'w, %': '13.2',
      'Opt., %': '14.0',
      'Δw, %': '−0.8',
      'Max dry, pcf': '115.0',
      Curve: 'RB-3',
      Material: 'Ridge borrow',
      'Oversize, %': '12.0',
      'RC, %': '92.8',
      'Limit, %': '–',
      'S, %': '–',
      'Air voids, %': '14.0',
      Result: 'Too loose',
      Flags: '–',
      By: 'Milan Petrak',
      Recorded: 'Dec 1, 12:30',
    })
  })

  it('are hidden, shown and ordered by keyboard, and the address holds them', async () => {
    answer()
    const router = openTestsPage(`${PAGE}?columns=number,cell,rc,outcome`)
    await userEvent.click(await screen.findByText('Columns'))
    expect(screen.getByLabelText<HTMLInputElement>('Number').disabled).toBe(true)
    const right = await screen.findByLabelText('Move Cell right')
    right.focus()
    await userEvent.keyboard('{Enter}')
    expect(heads()).toEqual(['Test', 'RC, %', 'Cell', 'Result'])
    expect(document.activeElement?.getAttribute('aria-label')).toBe('Move Cell right')
    expect(screen.getByText('Cell, 3 of 4').getAttribute('aria-live')).toBe('polite')
    await userEvent.keyboard('{Enter}{Enter}')
    expect(heads()).toEqual(['Test', 'RC, %', 'Result', 'Cell'])
    screen.getByLabelText('Relative compaction').focus()
    await userEvent.keyboard(' ')
    screen.getByLabelText('Lot').focus()
    await userEvent.keyboard(' ')
    await waitFor(() => expect(heads()).toEqual(['Test', 'Result', 'Cell', 'Lot']))
    expect(new URLSearchParams(router.state.location.search).get('columns')).toBe('number,outcome,cell,lot')
    await userEvent.click(screen.getByText('The usual ones'))
    expect(new URLSearchParams(router.state.location.search).get('columns')).toBeNull()
  })

  it('move by one place and never past the number or the end', () => {
    expect(moved(['number', 'cell', 'rc'], 'cell', 1)).toEqual(['number', 'rc', 'cell'])
    expect(moved(['number', 'cell', 'rc'], 'cell', -1)).toEqual(['number', 'cell', 'rc'])
    expect(moved(['number', 'cell', 'rc'], 'rc', 1)).toEqual(['number', 'cell', 'rc'])
    expect(moved(['number', 'cell', 'rc'], 'number', 1)).toEqual(['number', 'cell', 'rc'])
  })
})
