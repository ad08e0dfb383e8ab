import { apportion } from './apportion.ts'
import type { FrequencyRule } from './frequency-rule.ts'
import { ceilRatio } from './whole-ratio.ts'

/** What a lot measures: integers, 0 or more; the length only where a rule per length is in force. */
export interface LotMeasure {
  readonly volumeCm3: number
  readonly areaMm2: number
  readonly lengthMm?: number
}

export interface FrequencyOptions {
  /** a remainder up to this share of a rule's unit asks no further test; 0 to 100, thousandths kept; default 0 */
  readonly remainderTolerancePercent?: number
  /** how many times the tests: 2 where hand-compacted fill asks double; 1 or more, thousandths kept; default 1 */
  readonly multiplier?: number
}

/**
 * Tests the lot-scope rules ask of one lot: the largest of the rules, each rounded up "or fraction thereof"
 * (UFGS 31 00 00 part 3), except for a remainder inside the tolerance. Running and per-lift-day rules
 * are not counted in one lot: see owedRunning and shareMinimum.
 * @returns whole number; 0 for a lot without volume; at least 1 where any lot-scope rule is given
 */
export function requiredTests(rules: readonly FrequencyRule[], lot: LotMeasure, options: FrequencyOptions = {}): number {
  return rules.reduce((most, rule) => Math.max(most, testsOfRule(rule, lot, options) ?? 0), 0)
}

/**
 * f: the volume one test may speak for in a lot, the smallest over its lot-scope rules (domain section 6).
 * A rule's own V, or A or L × the lot's volume per area or length, or the lot's volume / n; rounded up to whole cm³
 * and then held inside [⌈V/m⌉, ⌈V/(m−1)⌉ − 1], m being the tests that rule asks. So m tests always cover the lot and
 * m − 1 never do: no rounding, and no remainder inside the tolerance, parts the count from the coverage.
 * Without a lot-scope rule: the V of the running rules; without any: the whole lot.
 * @returns whole cm³; 0 for a lot without volume
 */
export function spokenVolume(rules: readonly FrequencyRule[], lot: LotMeasure, options: FrequencyOptions = {}): number {
  const volume = lot.volumeCm3
  if (volume <= 0) return 0
  const inLot = rules.flatMap((rule) => {
    const tests = testsOfRule(rule, lot, options)
    return tests === null ? [] : [holdBetween(volumePerTest(rule, lot, options), volume, tests)]
  })
  if (inLot.length > 0) return Math.min(...inLot)
  const running = rules.flatMap((rule) => (rule.kind === 'volume' ? [ceilRatio(rule.perCm3, 1000, thousandths(options.multiplier ?? 1))] : []))
  return running.length > 0 ? Math.min(...running) : volume
}

/**
 * The minimum per lift and day shared over that day's lots of the lift, by volume, largest remainder.
 * @param atLeast whole number, 0 or more
 * @param lotVolumesCm3 0 or more each
 * @returns tests per lot, in the order of the lots, adding up to atLeast; all 0 where nothing was placed
 */
export function shareMinimum(atLeast: number, lotVolumesCm3: readonly number[]): number[] {
  if (!lotVolumesCm3.some((volume) => volume > 0)) return lotVolumesCm3.map(() => 0)
  return apportion(atLeast, lotVolumesCm3)
}

/**
 * Tests owed under a running rule: ⌈ΣV / V⌉ − taken, never below 0.
 * @param volumesCm3 volumes of the zone and material's lots, whole cm³
 * @param perCm3 V of the rule, whole cm³ above 0
 * @param taken current required-purpose results, as in a lot
 */
export function owedRunning(volumesCm3: readonly number[], perCm3: number, taken: number): number {
  const total = volumesCm3.reduce((sum, volume) => sum + volume, 0)
  return Math.max(0, ceilRatio(total, 1, perCm3) - taken)
}

/** Tests one rule asks of the lot; null where the rule does not count in a single lot. */
function testsOfRule(rule: FrequencyRule, lot: LotMeasure, options: FrequencyOptions): number | null {
  if (lot.volumeCm3 <= 0) return rule.kind === 'per-lift-day' || isRunning(rule) ? null : 0
  switch (rule.kind) {
    case 'volume':
      return isRunning(rule) ? null : countTests(lot.volumeCm3, rule.perCm3, options)
    case 'area':
      return countTests(lot.areaMm2, rule.perMm2, options)
    case 'length':
      return countTests(lot.lengthMm ?? 0, rule.perMm, options)
    case 'per-lot':
      return rule.atLeast > 0 ? rule.atLeast : null
    case 'per-lift-day':
      return null
  }
}

function isRunning(rule: FrequencyRule): boolean {
  return rule.kind === 'volume' && rule.scope === 'running'
}

/** ⌈measure × multiplier / per⌉, less one where the remainder is inside the tolerance; at least 1. */
function countTests(measure: number, per: number, options: FrequencyOptions): number {
  const units = BigInt(measure) * BigInt(thousandths(options.multiplier ?? 1))
  const unit = BigInt(per) * 1000n
  const remainder = units % unit
  const whole = Number(units / unit)
  const forgiven = remainder * 100_000n <= unit * BigInt(thousandths(options.remainderTolerancePercent ?? 0))
  return Math.max(1, forgiven ? whole : whole + 1)
}

/** The rule's volume per test before it is held to the count, whole cm³ rounded up. */
function volumePerTest(rule: FrequencyRule, lot: LotMeasure, options: FrequencyOptions): number {
  const perThousand = thousandths(options.multiplier ?? 1)
  const volume = lot.volumeCm3
  const along = (per: number, measure: number) =>
    measure > 0 ? ceilRatio(ceilRatio(per, 1000, perThousand), volume, measure) : volume
  switch (rule.kind) {
    case 'volume':
      return ceilRatio(rule.perCm3, 1000, perThousand)
    case 'area':
      return along(rule.perMm2, lot.areaMm2)
    case 'length':
      return along(rule.perMm, lot.lengthMm ?? 0)
    case 'per-lot':
      return ceilRatio(volume, 1, rule.atLeast)
    case 'per-lift-day':
      return volume
  }
}

function holdBetween(perTest: number, volume: number, tests: number): number {
  const least = ceilRatio(volume, 1, Math.max(1, tests))
  const most = tests > 1 ? ceilRatio(volume, 1, tests - 1) - 1 : Number.MAX_SAFE_INTEGER
  return Math.max(least, Math.min(perTest, most))
}

function thousandths(value: number): number {
  return Math.round(value * 1000)
}
