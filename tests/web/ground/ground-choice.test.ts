import { describe, expect, it } from 'vitest'
import { buildBoard, buildPlan, buildSheet, buildTestSummary } from '#tests/factories/ground-view.ts'
import { ZONE_ID } from '#tests/factories/site-view.ts'
import { filterRows, listRows } from '#web/features/ground/list/list-rows.ts'
import { chosenTasks } from '#web/features/ground/panel/chosen-tasks.ts'
import { moveCell, pickCells } from '#web/features/ground/plan/cell-choice.ts'
import { readAddress, writeAddress } from '#web/features/ground/plan/ground-address.ts'
import { shownMarks } from '#web/features/ground/sheet/shown-marks.ts'
import { readCells } from '#web/features/ground/tasks/cells-choice.tsx'
import { groundKey } from '#web/features/ground/use-ground-keys.ts'
import { makeUnits } from '#web/lib/units.ts'

const plan = buildPlan()
const units = makeUnits('us', 'America/Los_Angeles')

describe('the address of the Ground', () => {
  it('carries cut, cell and list, and keeps what else stands there', () => {
    const params = writeAddress(new URLSearchParams('x=1'), { cut: { kind: 'elevation', um: 508_000 }, cell: 6, list: true }, plan)
    expect(params.toString()).toBe('x=1&cut=508000&cell=C2&list=1')
    expect(readAddress(params, plan)).toEqual({ cut: { kind: 'elevation', um: 508_000 }, cell: 6, list: true })
  })

  it('falls back to the surface and no cell for what it cannot read', () => {
    expect(readAddress(new URLSearchParams('cut=high&cell=ZZ99'), plan)).toEqual({ cut: { kind: 'surface' }, cell: undefined, list: false })
  })
})

describe('choosing cells', () => {
  it('takes a clicked cell in and out, replaces by a drag and adds by shift', () => {
    expect(pickCells([1, 2], [2], 'replace')).toEqual([1])
    expect(pickCells([1], [2], 'replace')).toEqual([1, 2])
    expect(pickCells([1], [4, 5], 'replace')).toEqual([4, 5])
    expect(pickCells([5], [4, 5], 'add')).toEqual([4, 5])
  })

  it('reads a typed range and passes over what is no cell', () => {
    expect(readCells('A1:B2, C3', plan)).toEqual({ ok: true, cells: [0, 1, 4, 5, 10] })
    expect(readCells('A1:', plan)).toMatchObject({ ok: false })
    expect(readCells('Z1', plan)).toMatchObject({ ok: false, reason: expect.stringMatching(/ends at D3/) as string })
  })

  it('moves to the next cell and stops at the edge', () => {
    expect(moveCell(plan, 0, 1, 0)).toBe(1)
    expect(moveCell(plan, 0, -1, 0)).toBe(0)
    expect(moveCell(plan, undefined, 1, 0)).toBe(0)
  })

  it('offers the tasks of a role, and those of one lift only on one lift', () => {
    const kinds = (...standings: Parameters<typeof chosenTasks>[0]) => chosenTasks(standings, 'qc-lead').map(({ kind }) => kind)
    expect(kinds({ lift: 1, state: 'meets-spec' })).toEqual(['place', 'release', 'rework'])
    expect(kinds({ lift: 1, state: 'meets-spec' }, { lift: 2, state: 'meets-spec' })).toEqual(['place'])
    expect(kinds({ lift: 0, state: 'awaiting-test' })).toEqual(['place', 'inspect'])
    expect(chosenTasks([{ lift: 1, state: 'rework' }], 'owner-rep').map(({ kind }) => kind)).toEqual(['accept-as-is'])
    expect(chosenTasks([{ lift: 1, state: 'rework' }], 'operator')).toEqual([])
  })
})

describe('the marks of a sheet', () => {
  it('are the tests of the layer shown, never voided or replaced ones', () => {
    const tests = [
      buildTestSummary({ id: 'shown', near: true }),
      buildTestSummary({ id: 'deeper', lift: 0 }),
      buildTestSummary({ id: 'voided', voided: true }),
      buildTestSummary({ id: 'replaced', current: false }),
      buildTestSummary({ id: 'owner', purpose: 'verification', outcome: 'fail' }),
    ]
    expect(shownMarks(tests, buildSheet()).map(({ id, outcome, verification }) => [id, outcome, verification])).toEqual([
      ['shown', 'near', false],
      ['owner', 'fail', true],
    ])
  })
})

describe('the list of cells', () => {
  const sheet = buildSheet({ 0: { lift: 2, state: 'meets-spec', flags: ['near', 'doubt'], lot: 4, test: 1 }, 1: { lift: 0, state: 'awaiting-test' }, 2: { lift: 0, state: 'none' } })
  const rows = listRows({ plan, sheet, board: buildBoard(), lots: [], tests: [buildTestSummary()], units })

  it('says of each cell what the map says', () => {
    expect(rows[0]).toMatchObject({ label: 'A1', zone: 'Building pad', lift: 2, stands: 'Meets spec, near a limit, in doubt', test: 'T-0001', topUm: 406_400, next: 'Waiting for 2 tests, lift 2' })
    expect(units.volumeNumber(rows[0]?.volumeCm3 ?? 0)).toBe('62')
    expect(rows[1]).toMatchObject({ label: 'B1', stands: 'Awaiting inspection', volumeCm3: null })
    expect(rows.find((row) => row.label === 'A2')?.next).toBe('Ready for lift 2')
  })

  it('leaves out cells where no fill belongs', () => {
    expect(rows.map((row) => row.label)).not.toContain('C1')
  })

  it('is narrowed by zone, state and every word typed', () => {
    expect(filterRows(rows, { zoneId: '', state: 'meets-spec', text: '' })).toHaveLength(1)
    expect(filterRows(rows, { zoneId: ZONE_ID, state: '', text: '' })).toHaveLength(8)
    expect(filterRows(rows, { zoneId: '', state: '', text: 'doubt t-0001' }).map((row) => row.label)).toEqual(['A1'])
    expect(filterRows(rows, { zoneId: '', state: '', text: 'doubt released' })).toEqual([])
  })
})

describe('keys of the Ground', () => {
  const press = (key: string, target: HTMLElement) => groundKey({ key, ctrlKey: false, metaKey: false, altKey: false, defaultPrevented: false }, target)
  const field = document.createElement('input')

  it('belong to a field while somebody types in it, but for Escape', () => {
    expect(press('l', field)).toBeUndefined()
    expect(press('[', field)).toBeUndefined()
    expect(press('Escape', field)).toBe('leave')
  })

  it('count on a radio of the rail and on the page', () => {
    const radio = document.createElement('input')
    radio.type = 'radio'
    expect(press('[', radio)).toBe('cut-down')
    expect(press('L', document.body)).toBe('list')
  })

  it('leave Enter and Space to the button that has the focus', () => {
    expect(press('Enter', document.createElement('button'))).toBeUndefined()
    expect(press(' ', document.createElement('canvas'))).toBe('toggle')
  })

  it('belong to an open dialog', () => {
    const dialog = document.createElement('div')
    dialog.setAttribute('role', 'dialog')
    dialog.append(document.createElement('button'))
    expect(press('l', dialog.querySelector('button') ?? field)).toBeUndefined()
  })
})
