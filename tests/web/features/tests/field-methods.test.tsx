import { screen, waitFor } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Calibration } from '#shared/schemas/calibration.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { answerSheet, enter, openTestsPage, saidAt, SHEET } from './open-tests-page.tsx'

const AT_STAKE = `${SHEET}?stake=N1`

function calibration(overrides: Partial<Calibration> & Pick<Calibration, 'id' | 'apparatus' | 'sheet' | 'value'>): Calibration {
  return {
    performedAt: '2026-11-02T16:00:00.000Z',
    validUntil: null,
    remarks: '',
    spreadPercent: 0.1,
    flags: [],
    recordedBy: { id: 'u', name: 'Milan Petrak' },
    recordedAt: '2026-11-02T16:05:00.000Z',
    void: null,
    ...overrides,
  }
}
const SAND = calibration({ id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d41', apparatus: 'Sand, batch 4', sheet: { kind: 'sand-density', massUnit: 'g', volumeUnit: 'cm3', containerVolume: 1000, container: 0, filled: [1418] }, value: 1418 })
const CYLINDER = calibration({ id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d42', apparatus: 'Cylinder 7', sheet: { kind: 'cylinder', lengthUnit: 'in', diameters: [4], heights: [4.584] }, value: 943.9644 })
const OLD = calibration({ ...SAND, id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d43', apparatus: 'Sand, batch 3', validUntil: '2026-11-20T16:00:00.000Z' })

let sent: CreateTest[]

beforeEach(() => {
  window.localStorage.clear()
  window.sessionStorage.clear()
  keepCsrfToken('token')
  sent = answerSheet({ calibrations: [SAND, CYLINDER, OLD] })
})

async function open(method: string): Promise<void> {
  openTestsPage(AT_STAKE)
  await userEvent.click(await screen.findByRole('radio', { name: method }))
}

async function save(): Promise<CreateTest> {
  await enter('Depth below surface', '6')
  await userEvent.click(screen.getAllByRole('button', { name: 'Save result' })[0] as HTMLElement)
  await waitFor(() => expect(sent).toHaveLength(1))
  return sent[0] as CreateTest
}

describe('recording each method', { timeout: 30_000 }, () => {
  it('takes a rubber balloon, with its verdict while typing', async () => {
    await open('Rubber balloon')
    await userEvent.click(screen.getByRole('radio', { name: 'Stated' }))
    await enter('Indicator on the plate', '580')
    await enter('Indicator in the hole', '2210')
    expect(screen.getByLabelText('Hole volume').textContent).toContain('1,630')
    await enter('Moist soil from hole', '3410')
    await enter('Moisture of dry mass', '14')
    expect((await screen.findAllByText(/Meets spec/)).length).toBeGreaterThan(0)
    await enter('Largest particle, if seen', '1')
    expect(saidAt('Hole volume')).toContain('smaller than D2167 advises')
    expect((await save()).sheet).toEqual({
      method: 'rubber-balloon', volumeUnit: 'cm3', volumeBefore: 580, volumeAfter: 2210, massUnit: 'g', moistSoil: 3410, largestParticle: 1, lengthUnit: 'in', moisture: { method: 'stated', percent: 14 },
    })
  })

  it('takes a drive cylinder by its calibration, or by diameter and height', async () => {
    await open('Drive cylinder')
    await userEvent.click(screen.getByRole('radio', { name: 'Stated' }))
    await userEvent.selectOptions(await screen.findByLabelText('Cylinder'), CYLINDER.id)
    expect(screen.getByLabelText<HTMLInputElement>('Volume').value).toBe('943.96')
    await userEvent.selectOptions(screen.getByLabelText('Volume in'), 'ft³')
    await waitFor(() => expect(screen.getByLabelText<HTMLInputElement>('Volume').value).toBe('0.033336'))
    await enter('Cylinder and soil', '2765')
    await enter('Cylinder, empty', '845')
    await enter('Moisture of dry mass', '14')
    expect((await save()).sheet).toMatchObject({ method: 'drive-cylinder', volumeBy: 'stated', volumeUnit: 'ft3', volume: 0.033336, cylinderAndSoil: 2765, cylinder: 845, calibrationIds: [CYLINDER.id] })
  })

  it('fills the sand in from its calibration in the unit of the sheet, and offers none that is out of date', async () => {
    await open('Sand cone')
    const choice = await screen.findByLabelText('Sand')
    expect(choice.textContent).not.toContain('batch 3')
    await userEvent.selectOptions(choice, SAND.id)
    expect(screen.getByLabelText<HTMLInputElement>('Bulk density of sand').value).toBe('1.418')
    await userEvent.selectOptions(screen.getByLabelText('Density of sand in'), 'pcf')
    await waitFor(() => expect(screen.getByLabelText<HTMLInputElement>('Bulk density of sand').value).toBe('88.523'))
  })

  it('puts microwave weighings aside until two agree to 0.1 % of the wet soil', async () => {
    await open('Drive cylinder')
    await userEvent.click(screen.getByRole('radio', { name: 'Microwave' }))
    await enter('Wet soil and tin', '212.4')
    await enter('Tin', '61.2')
    await enter('Dry soil and tin', '197.0')
    await userEvent.click(screen.getByRole('button', { name: 'Dried again, weigh again' }))
    await enter('Dry soil and tin', '196.2')
    screen.getByText(/not constant yet/)
    await userEvent.click(screen.getByRole('button', { name: 'Dried again, weigh again' }))
    await enter('Dry soil and tin', '196.1')
    screen.getByText(/0.07 % of the wet soil: constant mass/)
    await userEvent.click(screen.getByRole('button', { name: 'Take the last back' }))
    expect(screen.getByLabelText<HTMLInputElement>('Dry soil and tin').value).toBe('196.2')
    await enter('Cylinder and soil', '2765')
    await enter('Cylinder, empty', '845')
    await enter('Volume', '944')
    expect((await save()).sheet.moisture).toEqual({ method: 'microwave', massUnit: 'g', wetAndTin: 212.4, dryAndTin: 196.2, tin: 61.2, earlier: [197] })
  })

  it('remembers the apparatus for the next test', async () => {
    await open('Drive cylinder')
    await userEvent.click(screen.getByRole('radio', { name: 'Stated' }))
    await userEvent.selectOptions(await screen.findByLabelText('Cylinder'), CYLINDER.id)
    await enter('Cylinder and soil', '2765')
    await enter('Cylinder, empty', '845')
    await enter('Moisture of dry mass', '14')
    await save()
    openTestsPage(AT_STAKE)
    await waitFor(() => expect(screen.getByLabelText<HTMLInputElement>('Cylinder').value).toBe(CYLINDER.id))
    expect(screen.getByLabelText<HTMLInputElement>('Volume').value).toBe('943.96')
  })
})
