import type { Lot } from '#shared/schemas/lot.ts'
import { ZONE_ID } from '#tests/factories/site-view.ts'

export const LOT_ID = '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1f01'
/** 500 yd³, what one test speaks for */
export const F_CM3 = 382_277_429

/** A lot as the API answers it: 2 of its 4 tests are owed, one of them a re-run. */
export function buildLot(overrides: Partial<Lot> = {}): Lot {
  return {
    id: LOT_ID,
    seq: 10,
    name: 'Pad L10, Dec 1',
    zoneId: ZONE_ID,
    lift: 10,
    materialId: 'ridge',
    materialName: 'Ridge borrow',
    workDay: '2026-12-01',
    specificationVersion: 1,
    cells: [0, 1, 2, 3],
    volumeCm3: 4 * F_CM3,
    spokenCm3: F_CM3,
    areaMm2: 1e9,
    fCm3: F_CM3,
    required: 4,
    taken: 2,
    passing: 1,
    owed: 2,
    reruns: 1,
    staked: 0,
    standing: 'suspect',
    releasedAt: null,
    blocks: [
      { testId: 'a', state: 'meets', cm3: F_CM3 },
      { testId: 'b', state: 'suspect', cm3: F_CM3 },
      { testId: null, state: 'owed', cm3: F_CM3 },
      { testId: null, state: 'owed', cm3: F_CM3 / 2 },
    ],
    ...overrides,
  }
}
