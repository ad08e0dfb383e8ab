import type { CoarsePart } from '#shared/domain/verdict-types.ts'
import { WATER_DENSITY } from '#shared/domain/phase-relations.ts'
import type { Result } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'

/** Share of oversize from which a reference is corrected, percent, where no other is set (T 99 and T 180 annex). */
export const OVERSIZE_THRESHOLD = 5

/**
 * Greatest share, percent, that D4718 corrects for: 40 retained on the No. 4, 30 on the 3/4 in. The standard names no
 * figure for the 3/8 in; the stricter of its two is taken.
 */
const GREATEST_SHARE = { 'no-4': 40, '3/8-in': 30, '3/4-in': 30 } as const

export type OversizeSieve = CoarsePart['sieve']
export type CurveMethod = 'D698' | 'D1557' | 'T 99' | 'T 180'
export type CurveLetter = 'A' | 'B' | 'C' | 'D'

/**
 * The sieve whose retained part a curve leaves out: D698 and D1557 methods A, B, C use the No. 4, 3/8 in, 3/4 in; T 99
 * and T 180 methods A, B the No. 4 and C, D the 3/4 in.
 */
export function oversizeSieve(method: CurveMethod, letter: CurveLetter): OversizeSieve {
  if (method === 'T 99' || method === 'T 180') return letter === 'A' || letter === 'B' ? 'no-4' : '3/4-in'
  return letter === 'A' ? 'no-4' : letter === 'B' ? '3/8-in' : '3/4-in'
}

export type OversizeInput = {
  /** kg/m³, percent and specific gravity of the part that was compacted in the mould. */
  readonly maxDryDensity: number
  readonly optimumMoisture: number
  readonly gs: number
}

export type OversizeReference = OversizeInput & { readonly corrected: boolean }

/**
 * The reference for soil with stones in it (D4718, T 99 annex): ρ = 100 / (Pc/(Gm·ρw) + Pf/ρf),
 * w = (wf·Pf + wc·Pc)/100, and the combined specific gravity 1/(Pf/Gs + Pc/Gm).
 * @param reference of the fine part
 * @param share Pc, percent of the total dry mass retained on the sieve, 0 to 100
 * @param coarse the stones; may be left out while the share is below the threshold
 * @param options threshold in percent (5), water density in kg/m³ (1000)
 * @returns the reference unchanged below the threshold, corrected from it on; refused beyond the standard's limit
 */
export function correctForOversize(
  reference: OversizeInput,
  share: number,
  coarse: CoarsePart | undefined,
  options: { readonly threshold?: number | undefined; readonly waterDensity?: number | undefined } = {},
): Result<OversizeReference> {
  const { threshold = OVERSIZE_THRESHOLD, waterDensity = WATER_DENSITY } = options
  const refuse = (code: string, message: string) => ({ ok: false, reason: { code, message } }) as const
  if (!(share >= 0 && share <= 100)) return refuse('oversize-range', 'The oversize share must lie between 0 and 100 %.')
  if (settle(share) < threshold || share === 0) return { ok: true, value: { ...pairOf(reference), corrected: false } }
  if (!coarse) {
    return refuse('oversize-gravity', `${share} % is oversize, and the curve does not know the specific gravity of its stones. Add it to the curve.`)
  }
  if (!(coarse.bulkGravity >= 1.5 && coarse.bulkGravity <= 6) || !(coarse.moisture >= 0 && coarse.moisture <= 100)) {
    return refuse('oversize-gravity', 'The stones of the curve need a specific gravity of 1.5 to 6 and a moisture of 0 to 100 %.')
  }
  const greatest = GREATEST_SHARE[coarse.sieve]
  if (settle(share) > greatest) {
    return refuse('oversize-beyond', `${share} % is oversize; the correction of D4718 ends at ${greatest} %. Use a method for rock fill.`)
  }
  const fine = 100 - share
  return {
    ok: true,
    value: {
      maxDryDensity: 100 / (share / (coarse.bulkGravity * waterDensity) + fine / reference.maxDryDensity),
      optimumMoisture: (reference.optimumMoisture * fine + coarse.moisture * share) / 100,
      gs: 100 / (fine / reference.gs + share / coarse.bulkGravity),
      corrected: true,
    },
  }
}

function pairOf({ maxDryDensity, optimumMoisture, gs }: OversizeInput): OversizeInput {
  return { maxDryDensity, optimumMoisture, gs }
}
