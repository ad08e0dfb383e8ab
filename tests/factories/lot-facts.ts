import type { LotCell, LotFacts, LotSlice, LotTest } from '#shared/domain/lot-facts.ts'

const SIDE = 10_000
/** Volume of one cell of 10 × 10 m, 0.2 m thick: 20 m³. */
export const CELL = 20_000_000
export const buildLotCell = (cell: number): LotCell => ({
  cell,
  column: cell,
  row: 0,
  centroid: { u: cell * SIDE + SIDE / 2, v: SIDE / 2 },
  areaMm2: SIDE * SIDE,
  thicknessUm: 200_000,
  partial: false,
})
export const buildSlice = (cell: number, placedAt = 10, slice = 'p1', volumeCm3 = CELL): LotSlice => ({ cell, slice, placedAt, volumeCm3 })
export const buildTest = (testId: string, cell: number, change: Partial<LotTest> = {}): LotTest => ({
  testId,
  seq: Number(testId.slice(1)),
  at: buildLotCell(cell).centroid,
  cell,
  sampledAt: 20,
  purpose: 'required',
  outcome: 'pass',
  near: false,
  superseded: false,
  ...change,
})
/** Six cells, 120 m³, one test per 50 m³: three required. */
export const buildLotFacts = (change: Partial<LotFacts> = {}): LotFacts => ({
  lift: 2,
  rules: [{ kind: 'volume', scope: 'lot', perCm3: 50_000_000 }],
  cells: [0, 1, 2, 3, 4, 5].map(buildLotCell),
  slices: [0, 1, 2, 3, 4, 5].map((cell) => buildSlice(cell)),
  tests: [],
  marks: [],
  orders: [],
  releases: [],
  acceptedAsIs: [],
  ...change,
})
