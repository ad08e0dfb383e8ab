import { stepFor } from '#shared/domain/limits.ts'
import { parseLimit } from '#shared/domain/rounding.ts'
import type { Criterion } from '#shared/domain/limits.ts'
import { formatNumber } from '#shared/units/format.ts'
import type { TestDetail } from '#shared/schemas/field-test.ts'

/** What both a verdict being typed and a frozen one carry. */
export type ShownVerdict = Pick<TestDetail['verdict'], 'outcome' | 'near' | 'reasons' | 'suspicions' | 'advice' | 'rc' | 'moistureDeviation' | 'saturation' | 'airVoids' | 'maxDryDensityUsed' | 'optimumUsed' | 'gsUsed' | 'treatedAsFail' | 'headline'> & {
  readonly against: { readonly criteria: readonly Criterion[]; readonly curve: { readonly maxDryDensity: number } }
}

/** How far a passing result stands from its limits, one line each. */
export function marginWords(verdict: Omit<ShownVerdict, 'reasons' | 'suspicions' | 'advice'>): string[] {
  return verdict.against.criteria.flatMap((criterion) => {
    switch (criterion.kind) {
      case 'rc-min':
      case 'rc-min-steps': {
        const text = criterion.kind === 'rc-min' ? criterion.text : stepFor(criterion.steps, verdict.against.curve.maxDryDensity)
        const limit = text === undefined ? null : parseLimit(text)
        if (limit === null) return []
        const over = verdict.rc - limit.value
        return [`Compaction ${formatNumber(Math.abs(over), 1)} % ${over < 0 ? 'under' : 'over'} the limit of ${text} %.`]
      }
      case 'moisture-band': {
        const [low, high] = [parseLimit(criterion.lowText), parseLimit(criterion.highText)]
        if (!low || !high) return []
        const [fromDry, fromWet] = [verdict.moistureDeviation - low.value, high.value - verdict.moistureDeviation]
        const side = fromDry <= fromWet ? 'dry' : 'wet'
        return [`Moisture ${formatNumber(Math.min(fromDry, fromWet), 1)} % from the ${side} limit.`]
      }
      default:
        return []
    }
  })
}
