import type { Criterion } from '#shared/domain/limits.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import type { RoundingRule } from '#shared/domain/rounding.ts'

/** The coarse part that the laboratory curve left out, for the correction of D4718. */
export type CoarsePart = {
  /** Bulk specific gravity of the coarse particles (Gm). */
  readonly bulkGravity: number
  /** Moisture of the coarse particles, percent; 0 where it is not known. */
  readonly moisture: number
  readonly sieve: 'no-4' | '3/8-in' | '3/4-in'
}

/** The approved reference a test is judged against: kg/m³ and percent. */
export type ReferencePair = {
  readonly maxDryDensity: number
  readonly optimumMoisture: number
  readonly gs: number
  /** True where the specific gravity was measured, false where it is assumed. */
  readonly gsMeasured: boolean
  readonly coarse?: CoarsePart | undefined
}

/** What is judged: a reduced sheet, and the share (percent of total dry mass) retained on the curve's oversize sieve. */
export type JudgedTest = {
  readonly dryDensity: number
  readonly moisture: number
  readonly oversizeShare?: number | undefined
}

/** One single-operator standard deviation of the method: compaction in percent, moisture in points. */
export type Repeatability = { readonly rc: number; readonly moisture: number }

export const DEFAULT_REPEATABILITY: Repeatability = { rc: 0.5, moisture: 0.3 }

/** Everything a verdict depends on besides the test; frozen into the verdict. */
export type JudgedAgainst = {
  readonly curve: ReferencePair
  readonly criteria: readonly Criterion[]
  readonly rounding: RoundingRule
  readonly repeatability: Repeatability
  /** kg/m³ */
  readonly waterDensity: number
  /** Share of oversize from which the reference is corrected, percent; 5 where left out. */
  readonly oversizeThreshold?: number | undefined
}

export type ReasonCode =
  | 'too-loose'
  | 'too-dense'
  | 'too-dry'
  | 'too-wet'
  | 'saturation-low'
  | 'saturation-high'
  | 'air-voids-high'

/** An unmet limit. `value` is unrounded and in the limit's own unit; `limit` is the limit as written. */
export type VerdictReason = {
  readonly code: ReasonCode
  readonly message: string
  readonly value: number
  readonly limit: string
}

/** Why a result cannot be right, and what to check. */
export type Suspicion = Reason & { readonly check: string }

export type Outcome = 'pass' | 'fail' | 'suspect'

export type Verdict = {
  readonly outcome: Outcome
  /** Suspect and below the density limit: a fail until a re-run and a recorded cause refute it. */
  readonly treatedAsFail: boolean
  /** Within one repeatability of a limit, on either side. */
  readonly near: boolean
  readonly reasons: readonly VerdictReason[]
  readonly suspicions: readonly Suspicion[]
  readonly advice: readonly Reason[]
  /** Relative compaction, percent, unrounded. */
  readonly rc: number
  /** Moisture minus optimum, points, unrounded. */
  readonly moistureDeviation: number
  /** Percent; null where the density leaves no voids to fill. */
  readonly saturation: number | null
  /** Percent of the total volume; negative above the zero-air-voids line. */
  readonly airVoids: number
  /** Reference after the oversize correction, kg/m³ and percent. */
  readonly maxDryDensityUsed: number
  readonly optimumUsed: number
  readonly gsUsed: number
  readonly oversizeCorrected: boolean
  readonly headline: string
  readonly test: JudgedTest
  readonly against: JudgedAgainst
}

/** `judge(test, against)`: a verdict, or what keeps it from being computed. */
export type Judgement =
  | { readonly ok: true; readonly verdict: Verdict }
  | { readonly ok: false; readonly problems: readonly FieldProblem[] }
