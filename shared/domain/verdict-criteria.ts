import { shownLimit, stepFor } from '#shared/domain/limits.ts'
import type { Criterion } from '#shared/domain/limits.ts'
import type { OversizeReference } from '#shared/domain/oversize.ts'
import { airVoids, saturation } from '#shared/domain/phase-relations.ts'
import { meets, parseLimit, settle } from '#shared/domain/rounding.ts'
import type { JudgedAgainst, JudgedTest, ReasonCode, VerdictReason } from '#shared/domain/verdict-types.ts'
import { convertDensity, DENSITY_UNIT_LABEL } from '#shared/units/density.ts'

/** What follows from a test and its reference alone: percent, points, percent, percent; all unrounded. */
export type Computed = {
  readonly rc: number
  readonly moistureDeviation: number
  readonly saturation: number | null
  readonly airVoids: number
}

export type CriteriaResult = {
  readonly reasons: VerdictReason[]
  readonly near: boolean
  readonly belowDensityLimit: boolean
}

/** One comparison: the value, the limit as written, and how far a repeat of the test may move the value. */
type Check = {
  readonly side: 'min' | 'max'
  readonly value: number
  readonly limit: string
  readonly reach: number
  readonly code: ReasonCode
  readonly onDensity?: boolean
  readonly say: (limit: string) => string
}

/**
 * Compares a test with each limit of its specification, independently.
 * @param test, computed, reference, against as in `judge`, already found valid
 */
export function checkCriteria(
  test: JudgedTest,
  computed: Computed,
  reference: OversizeReference,
  against: JudgedAgainst,
): CriteriaResult {
  const reasons: VerdictReason[] = []
  let near = false
  let belowDensityLimit = false
  for (const criterion of against.criteria) {
    for (const check of checksOf(criterion, test, computed, reference, against)) {
      const limit = parseLimit(check.limit)
      if (!limit) continue
      if (settle(Math.abs(check.value - limit.value)) <= settle(check.reach)) near = true
      if (meets(check.value, limit, check.side, against.rounding)) continue
      reasons.push({ code: check.code, message: check.say(shownLimit(check.limit)), value: check.value, limit: check.limit })
      if (check.onDensity) belowDensityLimit = true
    }
  }
  return { reasons, near, belowDensityLimit }
}

function checksOf(
  criterion: Criterion,
  test: JudgedTest,
  computed: Computed,
  reference: OversizeReference,
  against: JudgedAgainst,
): Check[] {
  const { rc, moistureDeviation } = computed
  const { repeatability } = against
  const compaction = { value: rc, reach: repeatability.rc } as const
  const atLeast = (text: string): Check => ({
    ...compaction, side: 'min', limit: text, code: 'too-loose', onDensity: true,
    say: (limit) => `${apart(rc, text)} % compaction, limit ${limit} %.`,
  })
  switch (criterion.kind) {
    case 'rc-min':
      return [atLeast(criterion.text)]
    case 'rc-min-steps': {
      const text = stepFor(criterion.steps, against.curve.maxDryDensity)
      return text === undefined ? [] : [atLeast(text)]
    }
    case 'rc-max':
      return [{
        ...compaction, side: 'max', limit: criterion.text, code: 'too-dense',
        say: (limit) => `${apart(rc, criterion.text)} % compaction, at most ${limit} %.`,
      }]
    case 'moisture-band': {
      const moisture = { value: moistureDeviation, reach: repeatability.moisture } as const
      const from = (text: string) =>
        `${apart(Math.abs(moistureDeviation), text)} % ${moistureDeviation < 0 ? 'below' : 'above'} optimum`
      const shown = (limit: string) => (Math.sign(parseLimit(limit)?.value ?? 0) === Math.sign(moistureDeviation) ? limit.replace(/^[+−]/, '') : limit)
      return [
        { ...moisture, side: 'min', limit: criterion.lowText, code: 'too-dry', say: (limit) => `${from(criterion.lowText)}, limit ${shown(limit)} %.` },
        { ...moisture, side: 'max', limit: criterion.highText, code: 'too-wet', say: (limit) => `${from(criterion.highText)}, limit ${shown(limit)} %.` },
      ]
    }
    case 'saturation-min':
    case 'saturation-max': {
      // No voids at all means that what there is of them is full; the suspicion says the rest.
      const value = computed.saturation ?? 1000
      const reach = spread(value, test, against, (density, moisture) => {
        const filled = saturation(density, moisture, reference.gs, against.waterDensity)
        return filled.ok ? filled.value : 1000
      })
      const low = criterion.kind === 'saturation-min'
      const amount = computed.saturation === null ? 'No voids' : `${apart(value, criterion.text)} % saturated`
      return [{
        side: low ? 'min' : 'max', value, reach, limit: criterion.text, code: low ? 'saturation-low' : 'saturation-high',
        say: (limit) => `${amount}, ${low ? 'at least' : 'at most'} ${limit} %.`,
      }]
    }
    case 'air-voids-max': {
      const value = computed.airVoids
      const reach = spread(value, test, against, (density, moisture) => airVoids(density, moisture, reference.gs, against.waterDensity))
      return [{
        side: 'max', value, reach, limit: criterion.text, code: 'air-voids-high',
        say: (limit) => `${apart(value, criterion.text)} % air voids, at most ${limit} %.`,
      }]
    }
    case 'dry-density-min': {
      const shown = DENSITY_UNIT_LABEL[criterion.unit]
      const value = convertDensity(test.dryDensity, 'kg/m3', criterion.unit)
      const reach = convertDensity((repeatability.rc / 100) * reference.maxDryDensity, 'kg/m3', criterion.unit)
      return [{
        side: 'min', value, reach, limit: criterion.text, code: 'too-loose', onDensity: true,
        say: (limit) => `${apart(value, criterion.text)} ${shown} dry, limit ${limit} ${shown}.`,
      }]
    }
  }
}

/** How far a quantity moves when density or moisture moves by one repeatability, the larger of the two. */
function spread(
  value: number,
  { dryDensity, moisture }: JudgedTest,
  { repeatability }: JudgedAgainst,
  quantity: (dryDensity: number, moisture: number) => number,
): number {
  const byDensity = Math.abs(quantity(dryDensity * (1 + repeatability.rc / 100), moisture) - value)
  const byMoisture = Math.abs(quantity(dryDensity, moisture + repeatability.moisture) - value)
  return Math.max(byDensity, byMoisture)
}

/** A value with enough places to be told apart from the limit it misses: never fewer than one, at most four. */
function apart(value: number, limitText: string): string {
  const limit = Math.abs(parseLimit(limitText)?.value ?? 0)
  for (let places = 1; places < 4; places++) {
    if (Number(Math.abs(value).toFixed(places)) !== limit) return value.toFixed(places)
  }
  return value.toFixed(4)
}
