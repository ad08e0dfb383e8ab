import type { RegisterPage, RegisterTest } from '#shared/schemas/test-register.ts'
import type { SavedView } from '#shared/schemas/saved-view.ts'
import { convertDensity } from '#shared/units/density.ts'
import { ZONE_ID } from '#tests/factories/site-view.ts'

const pcf = (value: number): number => convertDensity(value, 'pcf', 'kg/m3')

/** A line of the register of the invented site: 106.7 pcf at 13.2 % against 115.0 pcf at 14.0 %. */
export function buildRegisterTest(overrides: Partial<RegisterTest> = {}): RegisterTest {
  return {
    id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d20',
    number: 'T-0142',
    seq: 142,
    purpose: 'required',
    method: 'plain',
    zoneId: ZONE_ID,
    lift: 10,
    cell: 5,
    lotId: 'lot-1',
    lotName: 'Pad L10, Dec 1',
    easting: 1_281_475,
    northing: 231_875,
    sampledAt: '2026-12-01T20:00:00.000Z',
    recordedAt: '2026-12-01T20:30:00.000Z',
    recordedBy: { id: '4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', name: 'Milan Petrak' },
    curveId: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d10',
    curveCode: 'RB-3',
    materialId: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d12',
    materialName: 'Ridge borrow',
    outcome: 'fail',
    treatedAsFail: false,
    near: false,
    headline: 'Too loose, moisture in range',
    rc: 92.8126,
    rcLimit: '95',
    moisture: 13.2,
    moistureMethod: 'stated',
    moistureDeviation: -0.8,
    optimum: 14,
    maxDryDensity: pcf(115),
    dryDensity: pcf(106.73),
    wetDensity: pcf(120.8),
    oversizePercent: null,
    oversizeCorrected: false,
    saturation: 61.2,
    airVoids: 14,
    followKind: null,
    current: true,
    superseded: false,
    voided: false,
    flagged: false,
    flags: [],
    ...overrides,
  }
}

export function buildRegisterPage(tests: readonly RegisterTest[], overrides: Partial<RegisterPage> = {}): RegisterPage {
  const counts = { pass: 0, fail: 0, suspect: 0 }
  for (const { outcome } of tests) counts[outcome] += 1
  return { tests: [...tests], total: tests.length, counts, ...overrides }
}

/** A view of one's own: failures, lowest compaction first, four columns. */
export function buildSavedView(overrides: Partial<SavedView> = {}): SavedView {
  return {
    id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d71',
    name: 'Failures',
    shared: false,
    author: { id: '4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', name: 'Milan Petrak' },
    content: { filter: { outcome: ['fail'] }, sort: { key: 'rc', direction: 'asc' }, columns: ['number', 'cell', 'rc', 'rcLimit'] },
    isDefault: false,
    mayEdit: true,
    ...overrides,
  }
}
