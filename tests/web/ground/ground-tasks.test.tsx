import { screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { useEffect } from 'react'
import { describe, expect, it } from 'vitest'
import type { Role } from '#shared/policies/role.ts'
import type { ReleaseCheck } from '#shared/schemas/release.ts'
import { buildSheet, CELL_LIFT_CM3 } from '#tests/factories/ground-view.ts'
import { ZONE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import type { GroundTask } from '#web/features/ground/plan/ground-task.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { TaskPanel } from '#web/features/ground/tasks/task-panel.tsx'
import { answerGround, GROUND_API, renderGround } from './render-ground.tsx'

function Begin({ first, cells }: { first: GroundTask; cells: readonly number[] }) {
  const { task, start } = useGroundView()
  useEffect(() => start(first, cells), [])
  return task === null ? <p>No task</p> : <TaskPanel task={task} surface={buildSheet()} />
}

function begin(role: Role, task: GroundTask, cells: readonly number[]): void {
  answerGround(role)
  renderGround(<Begin first={task} cells={cells} />, { role })
}

/** What the API takes at an address; answered as a write to the Ground. */
function takes(path: string): unknown[] {
  const bodies: unknown[] = []
  apiStandIn.use(
    http.post(`${GROUND_API}${path}`, async ({ request }) => {
      bodies.push(await request.json())
      return HttpResponse.json({ id: 'x', number: 'A-013', revision: 8, cells: 2, volume: 1 }, { status: 201 })
    }),
  )
  return bodies
}

function checks(check: Partial<ReleaseCheck>): void {
  apiStandIn.use(http.post(`${GROUND_API}/releases/check`, () => HttpResponse.json({ red: [], amber: [], overridable: false, hold: false, volumeCm3: 2 * CELL_LIFT_CM3, ...check })))
}

const RELEASE: GroundTask = { kind: 'release', lift: 2 }
const SHORT = { code: 'tests-owed', message: 'These are the last cells of the lot, and it owes 1 test.', cells: [0, 1] }

describe('releasing cells', () => {
  it('is free where nothing stands against it', async () => {
    checks({})
    const bodies = takes('/releases')
    begin('qc-lead', RELEASE, [0, 1])
    expect((await screen.findByRole('status', { name: 'Checklist' })).textContent).toMatch(/^2 cells, 123\u2009cy\. Nothing stands against it\./)
    await userEvent.click(screen.getByRole('button', { name: 'Release' }))
    await screen.findByText('No task')
    expect(bodies[0]).toMatchObject({ zoneId: ZONE_ID, lift: 2, cells: [0, 1], overrideReason: null })
  })

  it('needs a reason where the frequency is short', async () => {
    checks({ red: [SHORT], overridable: true })
    const bodies = takes('/releases')
    begin('qc-lead', RELEASE, [0, 1])
    const button = await screen.findByRole('button', { name: 'Release with reason' })
    expect(button).toHaveProperty('disabled', true)
    await userEvent.type(screen.getByLabelText('Why it is released all the same'), 'Gauge broke')
    await userEvent.click(button)
    await screen.findByText('No task')
    expect(bodies[0]).toMatchObject({ overrideReason: 'Gauge broke' })
  })

  it('is blocked by a failing cell, which may be left out', async () => {
    checks({ red: [{ code: 'failed', message: 'A failing test or an open rework order marks it.', cells: [1] }] })
    begin('qc-lead', RELEASE, [0, 1])
    await userEvent.click(await screen.findByRole('button', { name: 'Leave it out' }))
    expect(screen.getByLabelText('Cells')).toHaveProperty('value', 'A1')
    expect(screen.getByRole('button', { name: 'Release' })).toHaveProperty('disabled', true)
  })

  it('is asked for by the superintendent whatever the checklist says', async () => {
    checks({ red: [SHORT], overridable: true })
    const bodies = takes('/releases')
    begin('superintendent', RELEASE, [0, 1])
    await screen.findByText(`Blocks: ${SHORT.message}`)
    await userEvent.click(screen.getByRole('button', { name: 'Ask for release' }))
    await screen.findByText('No task')
    expect(bodies[0]).toMatchObject({ overrideReason: null })
  })

  it('takes one zone at a time', async () => {
    begin('qc-lead', RELEASE, [2, 3])
    expect((await screen.findByRole('alert')).textContent).toMatch(/more than one zone/)
    expect(screen.getByRole('button', { name: 'Release' })).toHaveProperty('disabled', true)
  })
})

describe('other tasks', () => {
  it('records an inspection that is not accepted', async () => {
    const bodies = takes('/inspections')
    begin('technician', { kind: 'inspect' }, [0, 1])
    await userEvent.click(await screen.findByRole('radio', { name: 'Visual' }))
    await userEvent.click(screen.getByRole('radio', { name: 'Not accepted' }))
    await userEvent.type(screen.getByLabelText('Remarks'), 'Soft at B1')
    await userEvent.click(screen.getByRole('button', { name: 'Save inspection' }))
    await screen.findByText('No task')
    expect(bodies[0]).toMatchObject({ cells: [0, 1], method: 'visual', outcome: 'not-accepted', remarks: 'Soft at B1' })
  })

  it('accepts as is only with engineer, document and reason', async () => {
    const bodies = takes('/dispositions')
    begin('owner-rep', { kind: 'accept-as-is', lift: 2 }, [0])
    const button = await screen.findByRole('button', { name: 'Accept as is' })
    expect(button).toHaveProperty('disabled', true)
    await userEvent.type(screen.getByLabelText('Engineer'), 'L. Brandt')
    await userEvent.type(screen.getByLabelText('Document'), 'Letter of Nov 30')
    await userEvent.type(screen.getByLabelText('Reason'), 'Landscape above')
    await userEvent.click(button)
    await screen.findByText('No task')
    expect(bodies[0]).toMatchObject({ lift: 2, cells: [0], engineer: 'L. Brandt', document: 'Letter of Nov 30', reason: 'Landscape above' })
  })

  it('issues a rework order by hand with what is wrong', async () => {
    const bodies = takes('/rework')
    begin('qc-lead', { kind: 'rework', lift: 1 }, [0])
    await userEvent.click(await screen.findByRole('checkbox', { name: 'Too wet' }))
    await userEvent.type(screen.getByLabelText('What was seen, what to do'), 'Pumping under the roller')
    await userEvent.click(screen.getByRole('button', { name: 'Issue order' }))
    await screen.findByText('No task')
    expect(bodies[0]).toMatchObject({ zoneId: ZONE_ID, lift: 1, actions: ['too-wet'], remarks: 'Pumping under the roller' })
  })

  it('says that a release was answered meanwhile', async () => {
    begin('owner-rep', { kind: 'review', releaseId: 'gone' }, [])
    expect((await screen.findByText('This release needs no answer any more.')).tagName).toBe('B')
  })
})
