import { describe, expect, it } from 'vitest'
import { checkGauge, gaugeIdOf, usesGauge, type GaugeFacts } from '#shared/domain/gauge-check.ts'
import type { NuclearGaugeSheet } from '#shared/domain/field-sheets.ts'
import type { StandardCount } from '#shared/domain/standard-count.ts'

const DAY = '2026-03-05'
const NOON = Date.parse(`${DAY}T20:00:00Z`)
const GOOD: StandardCount = { id: 'a', day: DAY, countedAt: NOON - 1, recordedAt: 0, voided: false, density: 2_004, moisture: 602 }
const FACTS: GaugeFacts = { serial: '4127', calibrations: [{ calibratedOn: '2026-03-01', dueOn: null, recordedAt: 0, density: 2_000, moisture: 600 }], outages: [], counts: [GOOD] }
const check = (change: Partial<GaugeFacts> = {}, at = NOON, day = DAY) => checkGauge({ ...FACTS, ...change }, at, day)

// practice.md, start of day: a good standard count, the calibration in date, before the gauge is relied on
describe('whether a gauge may be relied on', () => {
  it('is good with a good count on the working day, before or after the test', () => {
    expect(check()).toMatchObject({ state: 'good', message: 'Gauge 4127 has a good standard count on Mar 5.', reference: { from: 'calibration', density: 2_000 }, count: { count: { id: 'a' } } })
    expect(check({ counts: [{ ...GOOD, countedAt: NOON + 3_600_000 }] }).state).toBe('good')
  })

  it('says that the day has no count, a void one, or one out of limits', () => {
    expect(check({ counts: [] })).toMatchObject({ state: 'not-counted', message: 'Gauge 4127 has no standard count on Mar 5.' })
    expect(check({ counts: [{ ...GOOD, voided: true }] }).state).toBe('not-counted')
    expect(check({}, NOON, '2026-03-06').state).toBe('not-counted')
    expect(check({ counts: [{ ...GOOD, density: 2_050 }] })).toMatchObject({
      state: 'count-bad',
      message: 'Gauge 4127 has a standard count out of limits on Mar 5. The density standard count is 2.5 % from its reference; 1 % is allowed.',
    })
  })

  it('says that the calibration is missing or past due; the due day itself is in date', () => {
    const [calibration] = FACTS.calibrations
    if (!calibration) throw new Error('The gauge has a calibration')
    expect(check({ calibrations: [] }).state).toBe('not-calibrated')
    expect(check({ calibrations: [{ ...calibration, dueOn: DAY }] }).state).toBe('good')
    expect(check({ calibrations: [{ ...calibration, dueOn: '2026-03-04' }] })).toMatchObject({ state: 'overdue', message: 'Gauge 4127 was past its calibration on Mar 5: due Mar 4.' })
  })

  it('is out of service from when it was taken out until it came back', () => {
    const outage = { from: NOON - 10, until: NOON + 10, reason: 'Dropped' }
    expect(check({ outages: [outage] })).toMatchObject({ state: 'out-of-service', message: 'Gauge 4127 was out of service on Mar 5: Dropped' })
    expect(check({ outages: [outage] }, NOON - 11).state).toBe('good')
    expect(check({ outages: [outage] }, NOON + 10).state).toBe('good')
    expect(check({ outages: [{ ...outage, until: null }] }, NOON + 1e9).state).toBe('out-of-service')
  })
})

describe('the gauge of a sheet', () => {
  const gauge: NuclearGaugeSheet = { method: 'nuclear-gauge', gaugeId: 'g', mode: 'backscatter', lengthUnit: 'in', rodDepth: 0, densityUnit: 'pcf', wetDensity: 130, moisture: { method: 'stated', percent: 12 } }
  it('is the one it names, for its density or only for its moisture', () => {
    expect([usesGauge(gauge), gaugeIdOf(gauge)]).toEqual([true, 'g'])
    const plain = { method: 'plain', densityUnit: 'pcf', densityIs: 'wet', density: 130 } as const
    const byGauge = { ...plain, moisture: { method: 'gauge', densityUnit: 'pcf', moistureDensity: 12, correctionK: 0, gaugeId: 'h' } } as const
    expect([usesGauge(byGauge), gaugeIdOf(byGauge)]).toEqual([true, 'h'])
    const stated = { ...plain, moisture: { method: 'stated', percent: 12 } } as const
    expect([usesGauge(stated), gaugeIdOf(stated)]).toEqual([false, null])
  })
})
