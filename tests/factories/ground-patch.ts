import type { GroundPatch } from '#shared/ground-codec.ts'

/** A change of nothing on the Ground. */
export function buildPatch(overrides: Partial<Omit<GroundPatch, 'revision' | 'base'>> = {}): Omit<GroundPatch, 'revision' | 'base'> {
  return {
    entries: [],
    lots: [],
    totals: {
      placedTodayCm3: 0,
      placedCm3: 0,
      spokenForCm3: 0,
      testsRequired: 0,
      testsTaken: 0,
      testsOwed: 0,
      cellsInRework: 0,
      openOrders: 0,
      readyCm3: 0,
      readyCells: 0,
    },
    from: null,
    ...overrides,
  }
}
