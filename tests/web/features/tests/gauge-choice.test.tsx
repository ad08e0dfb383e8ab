import { configure, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { http, HttpResponse } from 'msw'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import type { Gauge } from '#shared/schemas/gauge.ts'
import { buildGauge, countedGauge, GAUGE_ID } from '#tests/factories/gauge-view.ts'
import { apiStandIn } from '#tests/setup/api-stand-in.ts'
import { keepCsrfToken } from '#web/lib/api-client.ts'
import { ADDRESS, answerSheet, buildCurve, buildDetail, enter, openTestsPage, saidAt, SHEET } from './open-tests-page.tsx'

// a whole sheet is typed in, key by key
vi.setConfig({ testTimeout: 60_000 })
configure({ asyncUtilTimeout: 10_000 })

const SPARE: Gauge = { ...buildGauge(), id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c3009', serial: 'G-58' }

/** The sheet of a gauge test at stake N1, on a site with these gauges. */
async function openGaugeSheet(gauges: () => readonly Gauge[], preview = {}) {
  const sent = answerSheet({ preview })
  apiStandIn.use(http.get(`${ADDRESS}/gauges`, () => HttpResponse.json({ gauges: gauges() })))
  openTestsPage(`${SHEET}?stake=N1`)
  await userEvent.click(await screen.findByRole('radio', { name: 'Nuclear gauge' }))
  return sent
}

async function enterReadings(): Promise<void> {
  await enter('Rod depth', '6')
  await enter('Wet density', '130')
  await enter('Moisture density', '15')
}

const choice = () => screen.findByRole<HTMLSelectElement>('combobox', { name: 'Gauge no.' })
const save = (): Promise<void> => userEvent.click(screen.getAllByRole('button', { name: 'Save result' })[0] ?? document.body)

beforeEach(() => {
  sessionStorage.clear()
  localStorage.clear()
  keepCsrfToken('token')
})

describe('the gauge of a gauge test', () => {
  it('is chosen by itself where there is one, says how it stands, and is sent without retyped counts', async () => {
    const sent = await openGaugeSheet(() => [countedGauge()])
    await waitFor(async () => expect((await choice()).value).toBe(GAUGE_ID))
    expect((await screen.findByRole('status', { name: 'Gauge check' })).textContent).toMatch(/^Good.*Density 2,004, moisture 600, at /)
    expect(screen.queryByText('Standard counts today')).toBeNull()
    await enterReadings()
    await save()
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]?.sheet).toMatchObject({ method: 'nuclear-gauge', gaugeId: GAUGE_ID, wetDensity: 130 })
    expect(sent[0]?.sheet).not.toHaveProperty('standardCounts')
    expect(sent[0]?.sheet.moisture).not.toHaveProperty('gaugeId')
  })

  it('takes the count of the day in a dialog, the form behind it as it was', async () => {
    let counted = false
    const posted: unknown[] = []
    await openGaugeSheet(() => [counted ? countedGauge() : buildGauge()])
    apiStandIn.use(
      http.post(`${ADDRESS}/gauges/${GAUGE_ID}/counts`, async ({ request }) => {
        posted.push(await request.json())
        counted = true
        return HttpResponse.json(countedGauge(), { status: 201 })
      }),
    )
    await enter('Wet density', '130')
    const check = await screen.findByRole('status', { name: 'Gauge check' })
    expect(check.textContent).toMatch(/Not counted.*releases no ground until this is put right/)
    await userEvent.click(within(check).getByRole('button', { name: 'Enter the day’s count' }))
    const dialog = await screen.findByRole('dialog', { name: 'Standard count, gauge G-41' })
    await userEvent.type(within(dialog).getByRole('textbox', { name: 'Density count' }), '2004')
    await userEvent.type(within(dialog).getByRole('textbox', { name: 'Moisture count' }), '600{Enter}')
    await userEvent.click(within(dialog).getByRole('button', { name: 'Save the count' }))
    await waitFor(async () => expect((await screen.findByRole('status', { name: 'Gauge check' })).textContent).toMatch(/^Good/))
    expect(posted).toMatchObject([{ density: 2_004, moisture: 600 }])
    expect(screen.getByLabelText<HTMLInputElement>('Wet density').value).toBe('130')
  })

  it('has to be chosen among several', async () => {
    const sent = await openGaugeSheet(() => [countedGauge(), SPARE])
    await enterReadings()
    await save()
    expect(saidAt('Gauge no.')).toBe('Choose the gauge it was read with.')
    expect(sent).toEqual([])
    await userEvent.selectOptions(await choice(), 'G-58')
    await save()
    await waitFor(() => expect(sent[0]?.sheet).toMatchObject({ gaugeId: SPARE.id }))
  })

  it('leaves the counts to be typed where the site has no register', async () => {
    await openGaugeSheet(() => [])
    expect((await screen.findByText('Standard counts today')).tagName).toBe('H2')
    expect(screen.queryByRole('combobox', { name: 'Gauge no.' })).toBeNull()
  })

  it('says beside the verdict that the ground is not released by it', async () => {
    await openGaugeSheet(() => [buildGauge()], { gauge: { gaugeId: GAUGE_ID, serial: 'G-41', state: 'not-counted', message: 'Gauge G-41 has no standard count on Dec 1.' } })
    await enterReadings()
    expect((await screen.findAllByText(/Gauge G-41 has no standard count on Dec 1\. Until that is put right it releases no ground\./)).length).toBe(2)
  })

  it('offers the correction of its material, one tap from the field', async () => {
    const correction = { id: 'k', materialId: buildCurve().materialId, materialName: 'Ridge borrow', pairs: [{ oven: 12, gauge: 10, k: 18.1818 }], k: 18.1818, least: 18.1818, greatest: 18.1818, inForceFrom: '2026-11-30T16:00:00.000Z', recordedBy: 'Theo Lindqvist', remarks: '', inForce: true, withdrawn: null }
    await openGaugeSheet(() => [{ ...countedGauge(), corrections: [correction] }])
    await userEvent.click(await screen.findByRole('button', { name: 'Use 18.18, mean of 1 pair, Ridge borrow' }))
    expect(screen.getByLabelText<HTMLInputElement>('Site correction K').value).toBe('18.18')
    expect(saidAt('Site correction K')).toBe('In force: mean of 1 pair, Ridge borrow')
  })
})

describe('a gauge beside a wall', () => {
  it('asks for the sign of the offset, takes it off, and keeps the convention in the sheet', async () => {
    const sent = await openGaugeSheet(() => [countedGauge()])
    await enterReadings()
    await userEvent.click(screen.getByRole('radio', { name: 'Correct it here' }))
    await save()
    expect(screen.getByText('Choose how the offset is signed: see the gauge’s manual.', { selector: '[role=alert]' }).tagName).toBe('P')
    await userEvent.click(screen.getByRole('radio', { name: 'Standard − block' }))
    expect(screen.getByText(/standard count minus the moisture count on the block beside the wall; it is added/).tagName).toBe('P')
    await enter('Offset, as moisture density', '-2')
    // 15 − 2 pcf of water in 130 pcf wet: 13 / 117
    expect(screen.getByLabelText('Moisture of dry mass').textContent).toBe('11.1')
    await enter('Offset, as moisture density', '2')
    expect(saidAt('Offset, as moisture density')).toMatch(/usually below zero\. Check its sign\. You may save it, flagged\.$/)
    await enter('Offset, as moisture density', '-2')
    await save()
    await waitFor(() => expect(sent[0]?.sheet.moisture).toMatchObject({ moistureDensity: 15, wall: { convention: 'standard-minus-block', appliedBy: 'here', offset: -2 } }))
  })
})

describe('a saved gauge test', () => {
  it('says that its gauge was not checked, and how a wall was corrected', async () => {
    answerSheet()
    const sheet = {
      method: 'nuclear-gauge',
      gaugeId: GAUGE_ID,
      mode: 'direct-transmission',
      lengthUnit: 'in',
      rodDepth: 6,
      densityUnit: 'pcf',
      wetDensity: 130,
      moisture: { method: 'gauge', densityUnit: 'pcf', moistureDensity: 15, correctionK: 0, wall: { convention: 'block-minus-standard', appliedBy: 'gauge', offset: 27 } },
    } as const
    const gauge = { gaugeId: GAUGE_ID, serial: 'G-41', state: 'not-counted', message: 'Gauge G-41 has no standard count on Dec 1.' } as const
    const test = buildDetail({ sheet, gauge })
    apiStandIn.use(http.get(`${ADDRESS}/tests/:id`, () => HttpResponse.json(test)))
    openTestsPage(SHEET.replace('new', test.id))
    expect((await screen.findByText('Gauge G-41 has no standard count on Dec 1.')).closest('[role=status]')?.textContent).toContain('releases no ground')
    expect(screen.getByRole('link', { name: 'Open the gauge' }).getAttribute('href')).toMatch(new RegExp(`/lab/gauges\\?gauge=${GAUGE_ID}$`))
    const valueOf = (label: string) => screen.getByText(label).nextElementSibling?.textContent
    expect([valueOf('Gauge'), valueOf('Wall offset, stored in the gauge'), valueOf('Sign of the offset')]).toEqual(['G-41', '27\u2009counts', 'block − standard, subtracted'])
  })
})
