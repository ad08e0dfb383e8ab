import { randomUUID } from 'node:crypto'
import { convertDensity } from '#shared/units/density.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'
import type { CreateGauge, RecordCount } from '#shared/schemas/gauge.ts'

let made = 0

/** What POST …/gauges takes: calibrated long ago at 2,000 and 600 counts. */
export function gaugeInput(overrides: Partial<CreateGauge> = {}, calibration: Partial<CreateGauge['calibration']> = {}): CreateGauge {
  return {
    id: randomUUID(),
    serial: `G-${++made}`,
    model: 'Surface gauge',
    leakTestedOn: null,
    calibration: { id: randomUUID(), calibratedOn: '2024-01-15', dueOn: null, density: 2_000, moisture: 600, ...calibration },
    ...overrides,
  }
}

/** What POST …/gauges/:id/counts takes: a good count a minute ago. */
export function countInput(overrides: Partial<RecordCount> = {}): RecordCount {
  return { id: randomUUID(), countedAt: new Date(Date.now() - 60_000).toISOString(), density: 2_004, moisture: 603, stability: null, remarks: '', ...overrides }
}

/** What a gauge reads over the small site's passing ground: 117.6 pcf dry at 12.0 %. */
export function gaugeSheet(gaugeId?: string): CreateTest['sheet'] {
  return {
    method: 'nuclear-gauge',
    ...(gaugeId === undefined ? {} : { gaugeId }),
    mode: 'direct-transmission',
    lengthUnit: 'in',
    rodDepth: 6,
    densityUnit: 'kg/m3',
    wetDensity: convertDensity(117.6 * 1.12, 'pcf', 'kg/m3'),
    moisture: { method: 'gauge', densityUnit: 'kg/m3', moistureDensity: convertDensity(117.6 * 0.12, 'pcf', 'kg/m3'), correctionK: 0 },
  }
}
