import { screen, waitFor } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { buildCalibration } from '#tests/factories/calibration-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { ADDRESS, answerSheet, enter, openTestsPage, reloadTestsPage, saidAt, SHEET } from './open-tests-page.tsx'

// whole sheets are typed in, key by key
vi.setConfig({ testTimeout: 30_000 })

const AT_STAKE = `${SHEET}?stake=N1`
const CYLINDER = buildCalibration({ apparatus: 'Cylinder 7', sheet: { kind: 'cylinder', lengthUnit: 'in', diameters: [4], heights: [4.584] }, value: 943.9644 })
const AGAIN = { ...CYLINDER, id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d52', performedAt: '2026-05-02T16:00:00.000Z', value: 943.2 }
const OTHER = { ...CYLINDER, id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d53', apparatus: 'Cylinder 9', value: 941 }

const volume = () => screen.getByLabelText<HTMLInputElement>('Volume').value
const choice = () => screen.getByLabelText<HTMLSelectElement>('Cylinder').value

async function open(calibrations: readonly ReturnType<typeof buildCalibration>[]) {
  const sent = answerSheet({ calibrations })
  openTestsPage(AT_STAKE)
  await userEvent.click(await screen.findByRole('radio', { name: 'Drive cylinder' }))
  await screen.findByLabelText('Cylinder')
  return sent
}

beforeEach(() => {
  window.localStorage.clear()
  window.sessionStorage.clear()
  keepCsrfToken('token')
})

describe('the calibration of the apparatus', () => {
  it('is there at once where there is only one apparatus, the last calibrated', async () => {
    await open([CYLINDER, AGAIN])
    await waitFor(() => expect(choice()).toBe(CYLINDER.id))
    expect(volume()).toBe('943.96')
    await userEvent.selectOptions(screen.getByLabelText('Cylinder'), '')
    await enter('Volume', '944.5')
    expect(choice()).toBe('')
    expect(volume()).toBe('944.5')
  })

  it('is asked for where there are several', async () => {
    await open([CYLINDER, OTHER])
    await waitFor(() => expect(screen.getAllByRole('option', { name: /^Cylinder \d, / })).toHaveLength(2))
    expect(choice()).toBe('')
    expect(volume()).toBe('')
    // D2937 scope, scribd.com 233505500
    expect(screen.getByText('Not for gravel above 4.75 mm (No. 4), organic or very hard soil.').tagName).toBe('P')
  })

  it('says where the sheet carries another value, by more than rounding', async () => {
    await open([CYLINDER])
    await waitFor(() => expect(volume()).toBe('943.96'))
    await enter('Volume', '944')
    expect(screen.queryByText(/carries another value/)).toBeNull()
    await enter('Volume', '950')
    expect(saidAt('Cylinder')).toBe('The sheet carries another value than this. You may save it, flagged.')
  })

  it('says at the choice what the server has against it, and keeps the sheet', async () => {
    await open([CYLINDER])
    const message = 'The calibration of Cylinder 7 is void. Choose another; what you entered was kept.'
    apiStandIn.use(http.post(`${ADDRESS}/tests`, () => HttpResponse.json({ code: 'invalid', message, details: { issues: [{ path: 'body.sheet.calibrationIds', message }] } }, { status: 400 })))
    await userEvent.click(screen.getByRole('radio', { name: 'Stated' }))
    await enter('Cylinder and soil', '2765')
    await enter('Cylinder, empty', '845')
    await enter('Moisture of dry mass', '14')
    await enter('Depth below surface', '6')
    await userEvent.click(screen.getAllByRole('button', { name: 'Save result' })[0] ?? document.body)
    await waitFor(() => expect(saidAt('Cylinder')).toBe(message))
    expect(screen.getByLabelText<HTMLInputElement>('Cylinder and soil').value).toBe('2765')
  })

  it('makes no draft of a sheet nobody typed in', async () => {
    answerSheet({ calibrations: [CYLINDER] })
    window.localStorage.setItem('hardpan.testing.4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', JSON.stringify({ method: 'drive-cylinder' }))
    openTestsPage(AT_STAKE)
    await waitFor(() => expect(volume()).toBe('943.96'))
    reloadTestsPage(AT_STAKE)
    await waitFor(() => expect(volume()).toBe('943.96'))
    expect(screen.queryByText('What you typed here before is back.')).toBeNull()
  })
})
