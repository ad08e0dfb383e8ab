/** What a test's part of a lot stands for, or that it is still owed. */
export type LotBlockState = 'meets' | 'released' | 'rework' | 'suspect' | 'owed'

/** A part of a lot's volume: one test's, or one that a test still has to speak for. */
export interface LotBlock {
  readonly testId: string | null
  readonly state: LotBlockState
  /** whole cm³, above 0 */
  readonly cm3: number
}

/** What one test holds of a lot. */
export interface TestHolding {
  readonly testId: string
  /** running number */
  readonly seq: number
  readonly outcome: 'pass' | 'fail' | 'suspect'
  /** whole cm³ */
  readonly cm3: number
  /** every cell it holds a part of is released or accepted */
  readonly released: boolean
}

/**
 * A lot cut into what each test holds and what is owed, for the bar that shows it (domain section 6).
 * @param volumeCm3 placed volume of the lot, whole cm³, not below the sum of the holdings
 * @param fCm3 volume one test may speak for, whole cm³; 0 leaves the rest in one piece
 * @returns tests by running number, then pieces of f still owed, the last one the remainder; they sum to the volume
 */
export function lotBlocks(volumeCm3: number, fCm3: number, holdings: readonly TestHolding[]): LotBlock[] {
  const held = [...holdings]
    .filter((holding) => holding.cm3 > 0)
    .sort((a, b) => a.seq - b.seq)
    .map(({ testId, outcome, cm3, released }): LotBlock => ({ testId, state: stateOf(outcome, released), cm3 }))
  const owed: LotBlock[] = []
  let rest = volumeCm3 - held.reduce((sum, block) => sum + block.cm3, 0)
  while (rest > 0) {
    const cm3 = fCm3 > 0 ? Math.min(fCm3, rest) : rest
    owed.push({ testId: null, state: 'owed', cm3 })
    rest -= cm3
  }
  return [...held, ...owed]
}

function stateOf(outcome: TestHolding['outcome'], released: boolean): LotBlockState {
  if (outcome === 'fail') return 'rework'
  if (outcome === 'suspect') return 'suspect'
  return released ? 'released' : 'meets'
}
