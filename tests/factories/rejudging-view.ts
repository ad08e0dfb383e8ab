import type { RejudgeAnswer, RejudgedTest, Rejudging, VerdictBrief } from '#shared/schemas/rejudge.ts'
import { convertDensity } from '#shared/units/density.ts'
import { CURVE_ID } from './curve-view.ts'
import { ZONE_ID } from './site-view.ts'

export const SUCCESSOR_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c2003'

const PASS: VerdictBrief = { outcome: 'pass', treatedAsFail: false, near: false, headline: 'Meets spec', rc: 98, moistureDeviation: 0 }
const FAIL: VerdictBrief = { outcome: 'fail', treatedAsFail: false, near: false, headline: 'Too loose, moisture in range', rc: 93.3, moistureDeviation: 0 }

export function buildRejudged(id: string, overrides: Partial<RejudgedTest> = {}): RejudgedTest {
  return {
    id,
    number: id,
    purpose: 'required',
    zoneId: ZONE_ID,
    lift: 2,
    cell: 5,
    sampledAt: '2026-12-01T20:00:00.000Z',
    inForce: true,
    mine: true,
    before: PASS,
    after: { ...PASS, rc: 97.2 },
    refusal: null,
    change: 'figures',
    effect: { marks: 'keep', order: 'none' },
    orderNumber: null,
    ...overrides,
  }
}

/** A pass that would fail, a failure that would pass, one that moves only figures, one of the owner's, and one that cannot be judged. */
export function buildRejudging(overrides: Partial<Rejudging> = {}): Rejudging {
  return {
    curve: { id: CURVE_ID, code: 'RB-3', maxDryDensity: convertDensity(120, 'pcf', 'kg/m3'), optimumMoisture: 12 },
    by: { id: SUCCESSOR_ID, code: 'RB-4', maxDryDensity: convertDensity(126, 'pcf', 'kg/m3'), optimumMoisture: 12 },
    tests: [
      buildRejudged('T-0001'),
      buildRejudged('T-0002', { before: FAIL, after: PASS, change: 'to-pass', effect: { marks: 'lift', order: 'stands' }, orderNumber: 'R-001' }),
      buildRejudged('T-0003', { after: FAIL, change: 'to-fail', effect: { marks: 'make', order: 'issue' } }),
      buildRejudged('T-0004', { purpose: 'verification', mine: false, after: FAIL, change: 'to-fail', effect: { marks: 'make', order: 'issue' } }),
      buildRejudged('T-0005', { after: null, refusal: 'The stones of this curve are not known.', change: null, effect: null }),
    ],
    ...overrides,
  }
}

export const REHEARSED: RejudgeAnswer = {
  revision: 8,
  tests: [{ id: 'T-0003', number: 'T-0003', change: 'to-fail', effect: { marks: 'make', order: 'issue' }, marked: 2, revoked: 2, orderId: 'order-9', orderNumber: 'R-009' }],
  moves: [{ lift: 2, from: 'released', to: 'rework', cells: [4, 5] }],
  releases: [{ number: 'A-012', lift: 2, cells: [4, 5] }],
}
