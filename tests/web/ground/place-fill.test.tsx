import { onlineManager } from '@tanstack/react-query'
import { act, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { useEffect } from 'react'
import { describe, expect, it } from 'vitest'
import type { CreatePlacement } from '#shared/schemas/placement.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { buildSheet } from '#tests/factories/ground-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { PlaceFill } from '#web/features/ground/tasks/place/place-fill.tsx'
import { answerGround, GROUND_API, renderGround } from './render-ground.tsx'

function Task({ surface, cells }: { surface: GroundSheet; cells: readonly number[] }) {
  const { task, chosen, start } = useGroundView()
  useEffect(() => start({ kind: 'place', lift: null }, cells), [])
  return task === null ? <p>{chosen.length} chosen, no task</p> : <PlaceFill surface={surface} lift={null} />
}

function open(cells: readonly number[], surface = buildSheet()): void {
  answerGround('superintendent')
  renderGround(<Task surface={surface} cells={cells} />)
}

type Answer = (body: CreatePlacement) => Response

function answerSaves(...answers: Answer[]): CreatePlacement[] {
  const sent: CreatePlacement[] = []
  apiStandIn.use(
    http.post(`${GROUND_API}/placements`, async ({ request }) => {
      const body = (await request.json()) as CreatePlacement
      sent.push(body)
      return (answers[sent.length - 1] ?? saved)(body)
    }),
  )
  return sent
}

const saved: Answer = ({ id, cells }) => HttpResponse.json({ id, number: 'P-0007', revision: 8, cells: cells.length, volume: 1e8 }, { status: 201 })
const tooEarly = (cells: readonly number[]): Answer => () =>
  HttpResponse.json({ code: 'covered_too_early', message: 'Some sit on ground that is not released.', details: { cells } }, { status: 409 })

const save = async () => userEvent.click(screen.getByRole('button', { name: 'Save placement' }))
const ready = () => waitFor(() => expect(screen.getByRole('button', { name: 'Save placement' })).toHaveProperty('disabled', false))

describe('placing fill', () => {
  it('takes a typed range, keeps it as typed, and shows the volume both ways with the flag above 15 %', async () => {
    open([])
    const cells = await screen.findByLabelText('Cells')
    await userEvent.type(cells, 'a1:b1')
    expect(cells).toHaveProperty('value', 'a1:b1')
    expect((await screen.findByText('2 cells, 123 cy')).textContent).toBe('2 cells, 123\u2009cy')
    await userEvent.type(screen.getByLabelText('Loads'), '10')
    const volume = within(screen.getByRole('group', { name: 'Compacted volume' }))
    expect(volume.getByText('Loads give').nextElementSibling?.textContent).toMatch(/^100/)
    expect(volume.getByText('Difference').nextElementSibling?.textContent).toMatch(/^−19\.0/)
    expect(volume.getByRole('status').textContent).toMatch(/differ by more than 15 %/)
  })

  it('says what it cannot read in a range and keeps the cells there were', async () => {
    open([0])
    const cells = await screen.findByLabelText('Cells')
    await userEvent.clear(cells)
    await userEvent.type(cells, 'A1:B')
    expect((await screen.findByRole('alert')).textContent).toMatch(/is not a cell or a range/)
  })

  it('saves with what is usual on the site, and ends', async () => {
    const sent = answerSaves()
    open([0, 1])
    await ready()
    await save()
    expect((await screen.findByText('0 chosen, no task')).textContent).toBe('0 chosen, no task')
    expect(sent[0]).toMatchObject({ lift: 2, cells: [{ cell: 0, quarters: 15 }, { cell: 1, quarters: 15 }], machine: 'Roller 2', loads: 0, coverReason: null })
  })

  it('takes quarters of a single cell, never none', async () => {
    const sent = answerSaves()
    open([0])
    await ready()
    for (const quarter of ['upper left', 'upper right', 'lower left', 'lower right']) await userEvent.click(screen.getByRole('checkbox', { name: quarter }))
    expect(screen.getByText('1 of 4').textContent).toBe('1 of 4')
    await save()
    await screen.findByText('0 chosen, no task')
    expect(sent[0]?.cells).toEqual([{ cell: 0, quarters: 8 }])
  })

  it('asks first where the ground below is not released, and leaves those cells out', async () => {
    const sent = answerSaves()
    open([0, 1], buildSheet({ 1: { lift: 1, state: 'awaiting-test' } }))
    await ready()
    await save()
    const question = within(await screen.findByRole('alertdialog', { name: '1 of these cells sits on ground that is not released' }))
    expect(question.getByText(/^Lift 1 in B1 still waits for a test/).textContent).toMatch(/covered too early/)
    expect(sent).toEqual([])
    await userEvent.click(question.getByRole('button', { name: 'Leave them out' }))
    expect(screen.getByLabelText('Cells')).toHaveProperty('value', 'A1')
    await save()
    await screen.findByText('0 chosen, no task')
    expect(sent[0]?.cells).toEqual([{ cell: 0, quarters: 15 }])
  })

  it('places anyway only with a reason', async () => {
    const sent = answerSaves()
    open([1], buildSheet({ 1: { lift: 1, state: 'awaiting-test' } }))
    await ready()
    await save()
    await userEvent.click(await screen.findByRole('button', { name: 'Place anyway, with reason' }))
    expect(screen.getByRole('button', { name: 'Place anyway' })).toHaveProperty('disabled', true)
    await userEvent.type(screen.getByLabelText('Why fill goes there now'), 'Haul road')
    await userEvent.click(screen.getByRole('button', { name: 'Place anyway' }))
    await screen.findByText('0 chosen, no task')
    expect(sent[0]).toMatchObject({ coverReason: 'Haul road' })
  })

  it('asks the same when only the server knows, with the same id afterwards', async () => {
    const sent = answerSaves(tooEarly([1]))
    open([0, 1])
    await ready()
    await save()
    expect((await screen.findByRole('alertdialog')).textContent).toMatch(/^1 of these cells sits/)
    await userEvent.click(screen.getByRole('button', { name: 'Leave them out' }))
    await save()
    await screen.findByText('0 chosen, no task')
    expect(sent.map((body) => body.cells.length)).toEqual([2, 1])
    expect(sent[0]?.id).toBe(sent[1]?.id)
  })

  it('keeps everything typed when the save is refused', async () => {
    answerSaves(() => HttpResponse.json({ code: 'conflict', message: 'A1 is already placed at lift 2.' }, { status: 409 }))
    open([0])
    await ready()
    await userEvent.type(screen.getByLabelText('Remarks'), 'Wet along the east edge')
    await save()
    expect((await screen.findByRole('alert')).textContent).toMatch(/A1 is already placed at lift 2\. What you entered is kept/)
    expect(screen.getByLabelText('Remarks')).toHaveProperty('value', 'Wet along the east edge')
  })

  it('waits without a signal, says so, and sends once it is back', async () => {
    const sent = answerSaves()
    open([0])
    await ready()
    onlineManager.setOnline(false)
    try {
      await save()
      expect((await screen.findByRole('button', { name: 'Waiting for signal' })).getAttribute('aria-busy')).toBe('true')
      expect(sent).toEqual([])
    } finally {
      act(() => onlineManager.setOnline(true))
    }
    await screen.findByText('0 chosen, no task')
    expect(sent).toHaveLength(1)
  })
})
