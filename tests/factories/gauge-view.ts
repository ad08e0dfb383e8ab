import { judgeCounts, type GaugeCalibration } from '#shared/domain/standard-count.ts'
import type { Gauge, GaugeDetail, JudgedCountView } from '#shared/schemas/gauge.ts'

export const GAUGE_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c3001'
const CALIBRATION: GaugeCalibration = { calibratedOn: '2026-11-20', dueOn: '2027-11-20', recordedAt: 0, density: 2_000, moisture: 600 }

type Counted = { readonly id: string; readonly day: string; readonly density: number; readonly moisture?: number; readonly voided?: boolean }

/** Counts as the API judges them, each at 14:00 UTC of its day or a minute after the one before. */
export function judgedViews(counted: readonly Counted[]): JudgedCountView[] {
  const counts = counted.map(({ id, day, density, moisture = 600, voided = false }, index) => ({ id, day, density, moisture, voided, countedAt: Date.parse(`${day}T14:00:00Z`) + index * 60_000, recordedAt: 0 }))
  return judgeCounts([CALIBRATION], counts).judged.map(({ count, reference, judgement, stands }) => ({
    id: count.id,
    day: count.day,
    countedAt: new Date(count.countedAt).toISOString(),
    countedBy: 'Theo Lindqvist',
    density: count.density,
    moisture: count.moisture,
    reference: reference && { ...reference, days: [...reference.days] },
    good: judgement?.good ?? false,
    densityPercent: judgement?.densityPercent ?? null,
    moisturePercent: judgement?.moisturePercent ?? null,
    densityGood: judgement?.densityGood ?? false,
    moistureGood: judgement?.moistureGood ?? false,
    reasons: judgement?.reasons.map((reason) => reason.message) ?? [],
    stands,
    stability: null,
    remarks: '',
    void: count.voided ? { at: '2026-12-01T15:00:00.000Z', by: 'Theo Lindqvist', reason: 'Wrong line' } : null,
  }))
}

/** A gauge calibrated at 2,000 and 600, not counted on Dec 1. */
export function buildGauge(overrides: Partial<Gauge> = {}): Gauge {
  return {
    id: GAUGE_ID,
    serial: 'G-41',
    model: 'Surface gauge',
    leakTestedOn: '2026-10-01',
    calibration: { id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c3002', calibratedOn: '2026-11-20', dueOn: '2027-11-20', density: 2_000, moisture: 600, recordedBy: 'Theo Lindqvist' },
    outage: null,
    check: { state: 'not-counted', message: 'Gauge G-41 has no standard count on Dec 1.', day: '2026-12-01', reference: { from: 'calibration', density: 2_000, moisture: 600, days: [] }, count: null },
    corrections: [],
    ...overrides,
  }
}

/** The same once it was counted well. */
export function countedGauge(): Gauge {
  const [count] = judgedViews([{ id: 'today', day: '2026-12-01', density: 2_004 }])
  const gauge = buildGauge()
  return { ...gauge, check: { ...gauge.check, state: 'good', message: 'Gauge G-41 has a good standard count on Dec 1.', count: count ?? null } }
}

export function buildGaugeDetail(overrides: Partial<GaugeDetail> = {}): GaugeDetail {
  const gauge = buildGauge()
  return { ...gauge, calibrations: gauge.calibration === null ? [] : [gauge.calibration], outages: [], counts: [], ...overrides }
}
