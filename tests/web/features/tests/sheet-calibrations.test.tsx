import { screen } from '@testing-library/react'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it } from 'vitest'
import type { TestDetail } from '#shared/schemas/field-test.ts'
import { buildCalibration } from '#tests/factories/calibration-view.ts'
import { coneSheet } from '#tests/factories/calibration.ts'
import { SITE_ID } from '#tests/factories/site-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { ADDRESS, answerSheet, buildDetail, openTestsPage } from './open-tests-page.tsx'

const PAGE = `/sites/${SITE_ID}/tests/${buildDetail().id}`
/** the whole sheet is drawn first */
const PATIENCE = { timeout: 5_000 }
const SAND = buildCalibration()
const CONE = buildCalibration({ id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d42', apparatus: 'Cone 2', sheet: { kind: 'cone', massUnit: 'g', trials: [{ before: 5000, after: 3452 }] }, value: 1548, void: { at: '2026-11-30T16:00:00.000Z', by: 'Rosa Okafor', reason: 'Dented rim' } })

function open(sheet: TestDetail['sheet'], ...answers: Parameters<typeof apiStandIn.use>): void {
  answerSheet({ calibrations: [SAND, CONE] })
  apiStandIn.use(http.get(`${ADDRESS}/tests/:id`, () => HttpResponse.json(buildDetail({ method: sheet.method, sheet }))), http.get(`${ADDRESS}/attachments`, () => HttpResponse.json({ attachments: [] })), ...answers)
  openTestsPage(PAGE)
}

beforeEach(() => keepCsrfToken(null))

describe('the saved sheet', () => {
  it('names the calibrations it was reduced with, and what became of them since', async () => {
    open(coneSheet([SAND.id, CONE.id]))
    const sand = await screen.findByText('Sand, batch 4', {}, PATIENCE)
    expect(sand.nextElementSibling?.textContent).toBe('1.4180\u2009g/cm³ (88.52\u2009pcf), Nov 2, 2026')
    expect(screen.getByText('Cone 2').nextElementSibling?.textContent).toBe('1,548.0\u2009g, Nov 2, 2026; void since Nov 30, 2026: Dented rim')
  })

  it('says so where they cannot be read now, and keeps the rest of the sheet', async () => {
    open(coneSheet([SAND.id]), http.get(`${ADDRESS}/calibrations`, () => HttpResponse.json({ code: 'forbidden', message: 'No.' }, { status: 403 })))
    expect((await screen.findByText(/1 named, which could not be read now/, {}, PATIENCE)).tagName).toBe('P')
    expect(screen.getByText('Bulk density of sand').nextElementSibling?.textContent).toBe('1.418\u2009g/cm³')
  })

  it('has no such part where none was used, and says the volume of a cylinder by its name', async () => {
    open({ method: 'drive-cylinder', massUnit: 'lb', cylinderAndSoil: 6.1, cylinder: 1.86, volumeBy: 'stated', volumeUnit: 'ft3', volume: 0.0333, lengthUnit: 'in', moisture: { method: 'stated', percent: 14 } })
    expect((await screen.findByText('Cylinder volume', {}, PATIENCE)).nextElementSibling?.textContent).toBe('0.0333\u2009ft³')
    expect(screen.queryByRole('heading', { name: 'Calibrations' })).toBeNull()
  })
})
