import type { GroundState } from '#shared/domain/ground-state.ts'
import type { MoistureMethod } from '#shared/domain/field-sheets.ts'
import type { WallOffset } from '#shared/domain/wall-offset.ts'
import type { Purpose, TestSummary } from '#shared/schemas/field-test.ts'

export { markOf, resultWord } from '#web/components/ui/test-outcome.ts'

type Judged = Pick<TestSummary, 'outcome' | 'treatedAsFail'>

/** How the offset of a wall is signed, and what is done with it. */
export const WALL_CONVENTION_WORDS: Readonly<Record<WallOffset['convention'], string>> = {
  'block-minus-standard': 'Moisture count on the block beside the wall minus the day’s moisture standard count; it is subtracted.',
  'standard-minus-block': 'The day’s moisture standard count minus the moisture count on the block beside the wall; it is added.',
}

/** The state a result puts its ground into. */
export function groundOf({ outcome, treatedAsFail }: Judged): GroundState {
  if (outcome === 'fail' || treatedAsFail) return 'rework'
  return outcome === 'suspect' ? 'suspect' : 'meets-spec'
}

export const METHOD_WORDS: Readonly<Record<TestSummary['method'], { readonly name: string; readonly standard: string }>> = {
  'sand-cone': { name: 'Sand cone', standard: 'ASTM D1556' },
  'rubber-balloon': { name: 'Rubber balloon', standard: 'ASTM D2167' },
  'drive-cylinder': { name: 'Drive cylinder', standard: 'ASTM D2937' },
  'nuclear-gauge': { name: 'Nuclear gauge', standard: 'ASTM D6938' },
  plain: { name: 'Density and moisture', standard: 'as the report states them' },
}

export const MOISTURE_WORDS: Readonly<Record<MoistureMethod, { readonly name: string; readonly standard: string }>> = {
  oven: { name: 'Oven', standard: 'ASTM D2216' },
  microwave: { name: 'Microwave', standard: 'ASTM D4643' },
  carbide: { name: 'Carbide', standard: 'ASTM D4944' },
  gauge: { name: 'Gauge', standard: 'ASTM D6938' },
  stated: { name: 'Stated', standard: 'as the report states it' },
}

export const PURPOSE_WORDS: Readonly<Record<Purpose, { readonly name: string; readonly meaning: string }>> = {
  required: { name: 'Required', meaning: 'Counts toward the frequency, whichever way it comes out.' },
  judgement: { name: 'Judgement', meaning: 'Taken at a doubtful spot: a failure counts against the fill, a pass does not count toward the minimum.' },
  verification: { name: 'Verification', meaning: 'The owner’s own test: it never counts toward the contractor’s frequency.' },
  referee: { name: 'Referee', meaning: 'By the agreed method, to decide a dispute.' },
}

/** "1 cell", "9 cells". */
export function countOf(n: number, word: string): string {
  return `${n.toLocaleString('en-US')} ${word}${n === 1 ? '' : 's'}`
}
