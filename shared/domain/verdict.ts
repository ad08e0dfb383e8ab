import { criterionProblems } from '#shared/domain/limits.ts'
import { correctForOversize } from '#shared/domain/oversize.ts'
import type { OversizeReference } from '#shared/domain/oversize.ts'
import { airVoids, saturation } from '#shared/domain/phase-relations.ts'
import type { FieldProblem, Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'
import { checkCriteria } from '#shared/domain/verdict-criteria.ts'
import type { Computed } from '#shared/domain/verdict-criteria.ts'
import { headlineOf } from '#shared/domain/verdict-headline.ts'
import type { JudgedAgainst, JudgedTest, Judgement, Suspicion } from '#shared/domain/verdict-types.ts'

export * from '#shared/domain/verdict-types.ts'

const SUSPECT_COMPACTION = 120
const CURVE_CHECK_COMPACTION = 105
const SUSPECT_SATURATION_ASSUMED_GS = 103

/**
 * Judges a reduced field test against a specification. Suspect and fail are found independently: a suspicion never
 * launders a failure. Every value is rounded once, where it is compared; a value exactly on a limit meets it.
 * @param test dry density kg/m³, moisture percent, oversize share percent
 * @param against the reference pair (kg/m³, percent), criteria as written, rounding rule, repeatability, water density
 * @returns a deeply frozen verdict carrying what it was judged against, or what keeps it from being computed
 */
export function judge(test: JudgedTest, against: JudgedAgainst): Judgement {
  const problems = inputProblems(test, against)
  if (problems.length > 0) return { ok: false, problems }
  const { curve, waterDensity } = against
  const corrected = correctForOversize(curve, test.oversizeShare ?? 0, curve.coarse, {
    threshold: against.oversizeThreshold,
    waterDensity,
  })
  if (!corrected.ok) return { ok: false, problems: [{ field: 'oversizeShare', ...corrected.reason }] }

  const reference = corrected.value
  const computed = compute(test.dryDensity, test.moisture, reference, waterDensity)
  const { reasons, near, belowDensityLimit } = checkCriteria(test, computed, reference, against)
  const suspicions = suspicionsOf(computed, curve.gsMeasured)
  const outcome = suspicions.length > 0 ? 'suspect' : reasons.length > 0 ? 'fail' : 'pass'
  const treatedAsFail = outcome === 'suspect' && belowDensityLimit
  const verdict = {
    outcome,
    treatedAsFail,
    near,
    reasons,
    suspicions,
    advice: adviceOf(computed, curve.gsMeasured, curve.gs),
    ...computed,
    maxDryDensityUsed: reference.maxDryDensity,
    optimumUsed: reference.optimumMoisture,
    gsUsed: reference.gs,
    oversizeCorrected: reference.corrected,
    headline: headlineOf(outcome, reasons, against.criteria, near, treatedAsFail),
    test,
    against,
  } as const
  return { ok: true, verdict: frozenCopy(verdict) }
}

function compute(dryDensity: number, moisture: number, reference: OversizeReference, waterDensity: number): Computed {
  const filled = saturation(dryDensity, moisture, reference.gs, waterDensity)
  return {
    rc: (100 * dryDensity) / reference.maxDryDensity,
    moistureDeviation: moisture - reference.optimumMoisture,
    saturation: filled.ok ? filled.value : null,
    airVoids: airVoids(dryDensity, moisture, reference.gs, waterDensity),
  }
}

function suspicionsOf({ rc, saturation: filled }: Computed, gsMeasured: boolean): Suspicion[] {
  const suspicions: Suspicion[] = []
  const greatest = gsMeasured ? 100 : SUSPECT_SATURATION_ASSUMED_GS
  if (filled === null) {
    suspicions.push({
      code: 'denser-than-solids',
      message: 'As dense as solid rock: there is no room left for water or air.',
      check: 'Check Gs, the moisture, the standard count and the curve.',
    })
  } else if (settle(filled) > greatest) {
    suspicions.push({
      code: 'above-zero-air-voids',
      message: `${filled.toFixed(1)} % saturated: above the zero-air-voids line.`,
      check: gsMeasured ? 'Check the moisture, the standard count and the curve.' : 'Check Gs first, then the moisture and the standard count.',
    })
  }
  if (settle(rc) > SUSPECT_COMPACTION) {
    suspicions.push({
      code: 'compaction-too-high',
      message: `${rc.toFixed(1)} % compaction is more than rolling gives.`,
      check: 'Check that this is the right curve, then the volume or the standard count.',
    })
  }
  return suspicions
}

function adviceOf({ rc, saturation: filled }: Computed, gsMeasured: boolean, gs: number): Reason[] {
  const advice: Reason[] = []
  if (settle(rc) > CURVE_CHECK_COMPACTION) {
    advice.push({ code: 'check-curve', message: `Above ${CURVE_CHECK_COMPACTION} % compaction: check that the curve is of this soil.` })
  }
  if (!gsMeasured && filled !== null && settle(filled) > 100 && settle(filled) <= SUSPECT_SATURATION_ASSUMED_GS) {
    advice.push({ code: 'check-gs', message: `${filled.toFixed(1)} % saturated with an assumed Gs of ${gs}: have Gs measured.` })
  }
  return advice
}

function inputProblems(test: JudgedTest, against: JudgedAgainst): FieldProblem[] {
  const problems: FieldProblem[] = []
  const within = (field: string, value: number, low: number, high: number, message: string) => {
    if (!(value >= low && value <= high)) problems.push({ field, code: 'out-of-range', message })
  }
  const { curve } = against
  within('dryDensity', test.dryDensity, 1, 10_000, 'The dry density must be above zero, in kg/m³.')
  within('moisture', test.moisture, 0, 500, 'The moisture must be a percentage from 0 to 500.')
  within('oversizeShare', test.oversizeShare ?? 0, 0, 100, 'The oversize share must lie between 0 and 100 %.')
  within('curve.maxDryDensity', curve.maxDryDensity, 400, 3500, 'The curve needs a maximum dry density.')
  within('curve.optimumMoisture', curve.optimumMoisture, 0, 500, 'The curve needs an optimum moisture.')
  within('curve.gs', curve.gs, 1.5, 6, 'The curve needs a specific gravity between 1.5 and 6.')
  within('waterDensity', against.waterDensity, 900, 1100, 'The density of water must lie between 900 and 1,100 kg/m³.')
  within('oversizeThreshold', against.oversizeThreshold ?? 0, 0, 100, 'The oversize threshold is a percentage.')
  within('repeatability.rc', against.repeatability.rc, 0, 100, 'The repeatability of compaction is a percentage.')
  within('repeatability.moisture', against.repeatability.moisture, 0, 100, 'The repeatability of moisture is in points.')
  against.criteria.forEach((criterion, i) => problems.push(...criterionProblems(criterion, `criteria.${i}`)))
  return problems
}

/** A deep copy that nothing can change: what a test was judged against must not move under it. */
function frozenCopy<T>(value: T): T {
  if (typeof value !== 'object' || value === null) return value
  if (Array.isArray(value)) return Object.freeze(value.map(frozenCopy)) as T
  return Object.freeze(Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, frozenCopy(inner)]))) as T
}
