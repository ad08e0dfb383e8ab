import type { Reason } from '#shared/domain/result.ts'
import { settle } from '#shared/domain/rounding.ts'

/** How far a standard count may lie from its reference, percent of it (gauge operating manuals and agency gauge logs). */
export const DRIFT_LIMITS = { density: 1, moisture: 2 } as const
/** Good daily values that make an average; until there are as many since the calibration, its own counts are the reference. */
export const AVERAGED_DAYS = 4
/** Counts of one stability check. */
export const STABILITY_COUNTS = 5

/** Density and moisture count of a gauge on its reference block. */
export interface CountPair {
  readonly density: number
  readonly moisture: number
}

/** A calibration and the standard counts it was made at. */
export interface GaugeCalibration extends CountPair {
  /** YYYY-MM-DD */
  readonly calibratedOn: string
  /** the last day it may be used, or null where none is set */
  readonly dueOn: string | null
  /** epoch milliseconds; of two of one day the later recorded is in force */
  readonly recordedAt: number
}

export interface StandardCount extends CountPair {
  readonly id: string
  /** the site's working day, YYYY-MM-DD */
  readonly day: string
  /** epoch milliseconds */
  readonly countedAt: number
  readonly recordedAt: number
  readonly voided: boolean
}

/** What a count is compared with: the calibration's own counts, or the average of the last good days. */
export interface CountReference extends CountPair {
  readonly from: 'calibration' | 'average'
  /** the days averaged, oldest first; empty for the calibration */
  readonly days: readonly string[]
}

export interface CountJudgement {
  readonly good: boolean
  /** 100 (count − reference) / reference, unrounded */
  readonly densityPercent: number
  readonly moisturePercent: number
  readonly densityGood: boolean
  readonly moistureGood: boolean
  /** one for each count that has drifted */
  readonly reasons: readonly Reason[]
}

/** A count as it stands: `judgement` is null where it cannot be judged, for `refused`. */
export interface JudgedCount {
  readonly count: StandardCount
  readonly reference: CountReference | null
  readonly judgement: CountJudgement | null
  readonly refused: Reason | null
  /** it is the one that stands for its day */
  readonly stands: boolean
}

function drift(name: keyof CountPair, count: CountPair, reference: CountPair): { percent: number; good: boolean; reasons: Reason[] } {
  const percent = (100 * (count[name] - reference[name])) / reference[name]
  const good = settle(Math.abs(percent)) <= DRIFT_LIMITS[name]
  const message = `The ${name} standard count is ${Math.abs(percent).toFixed(1)} % from its reference; ${DRIFT_LIMITS[name]} % is allowed.`
  return { percent, good, reasons: good ? [] : [{ code: `standard-count-${name}`, message }] }
}

/**
 * Compares a standard count with its reference: density within 1 %, moisture within 2 %; exactly on the limit is within
 * (gauge operating manuals).
 * @param count both above zero
 * @param reference both above zero
 */
export function judgeCount(count: CountPair, reference: CountPair): CountJudgement {
  const density = drift('density', count, reference)
  const moisture = drift('moisture', count, reference)
  return {
    good: density.good && moisture.good,
    densityPercent: density.percent,
    moisturePercent: moisture.percent,
    densityGood: density.good,
    moistureGood: moisture.good,
    reasons: [...density.reasons, ...moisture.reasons],
  }
}

/** The calibration in force on a day: the last made on it or before, or undefined. */
export function calibrationOn(calibrations: readonly GaugeCalibration[], day: string): GaugeCalibration | undefined {
  return [...calibrations]
    .filter((calibration) => calibration.calibratedOn <= day)
    .sort((a, b) => order(a.calibratedOn, b.calibratedOn) || a.recordedAt - b.recordedAt)
    .at(-1)
}

const order = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0)
const byTime = (a: StandardCount, b: StandardCount): number => a.countedAt - b.countedAt || a.recordedAt - b.recordedAt || order(a.id, b.id)

interface GoodDay extends CountPair {
  readonly day: string
}

function referenceFrom(calibration: GaugeCalibration, goodDays: readonly GoodDay[]): CountReference {
  const last = goodDays.slice(-AVERAGED_DAYS)
  if (last.length < AVERAGED_DAYS) return { from: 'calibration', density: calibration.density, moisture: calibration.moisture, days: [] }
  const mean = (name: keyof CountPair) => last.reduce((sum, day) => sum + day[name], 0) / last.length
  return { from: 'average', density: mean('density'), moisture: mean('moisture'), days: last.map((day) => day.day) }
}

const isPositive = ({ density, moisture }: CountPair): boolean => Number.isFinite(density) && Number.isFinite(moisture) && density > 0 && moisture > 0

/**
 * Judges every standard count of a gauge (gauge operating manuals): against the calibration's counts until
 * four days since it are good, then against the average of the last four good days before its own. All counts of one day
 * have one reference. Of several counts in a day the last that is not void stands for it; only a good one that stands
 * enters an average. A new calibration starts again.
 * @param counts in any order; the result does not depend on it
 * @param until only days before this one are read, YYYY-MM-DD; all where it is left out
 * @returns the counts by time, and the reference for `until` (null without a calibration in force)
 */
export function judgeCounts(
  calibrations: readonly GaugeCalibration[],
  counts: readonly StandardCount[],
  until?: string,
): { readonly judged: readonly JudgedCount[]; readonly next: CountReference | null } {
  const inOrder = [...counts].sort((a, b) => order(a.day, b.day) || byTime(a, b))
  const days = [...new Set(inOrder.map((count) => count.day))].filter((day) => until === undefined || day < until)
  const judged: JudgedCount[] = []
  let goodDays: GoodDay[] = []
  let calibration: GaugeCalibration | undefined
  const referenceOn = (day: string): CountReference | null => {
    const inForce = calibrationOn(calibrations, day)
    if (inForce !== calibration) goodDays = []
    calibration = inForce
    return inForce && isPositive(inForce) ? referenceFrom(inForce, goodDays) : null
  }
  for (const day of days) {
    const ofDay = judgeDay(inOrder.filter((count) => count.day === day), referenceOn(day))
    judged.push(...ofDay)
    const standing = ofDay.find((each) => each.stands)
    if (standing?.judgement?.good === true) goodDays.push({ day, density: standing.count.density, moisture: standing.count.moisture })
  }
  return { judged, next: until === undefined ? null : referenceOn(until) }
}

/**
 * The counts of one day against its reference.
 * @param counts of one day, in any order
 * @returns the counts by time; the last that is not void stands for the day
 */
export function judgeDay(counts: readonly StandardCount[], reference: CountReference | null): JudgedCount[] {
  const own = [...counts].sort(byTime)
  const standing = own.findLast((count) => !count.voided)
  return own.map((count) => ({ count, reference, ...judgeOne(count, reference), stands: count === standing }))
}

function judgeOne(count: StandardCount, reference: CountReference | null): Pick<JudgedCount, 'judgement' | 'refused'> {
  if (reference === null) return { judgement: null, refused: { code: 'not-calibrated', message: 'No calibration was in force that day.' } }
  if (!isPositive(count)) return { judgement: null, refused: { code: 'not-positive', message: 'A count is above zero.' } }
  return { judgement: judgeCount(count, reference), refused: null }
}

export type Stability =
  | { readonly ok: true; readonly stable: boolean; readonly densityPercent: number; readonly moisturePercent: number }
  | { readonly ok: false; readonly reason: Reason }

/**
 * The quick stability check: five counts one after another, of which the largest and the smallest lie less than 1 %
 * (density) and 2 % (moisture) apart (gauge operating manuals; the limit itself is out there, and we take the
 * percentage of the mean of the five).
 * @param counts five, each above zero
 * @returns the ranges in percent of the mean, and whether both are within
 */
export function checkStability(counts: readonly CountPair[]): Stability {
  if (counts.length !== STABILITY_COUNTS) return { ok: false, reason: { code: 'five-counts', message: 'A stability check takes five counts.' } }
  if (!counts.every(isPositive)) return { ok: false, reason: { code: 'not-positive', message: 'A count is above zero.' } }
  const range = (name: keyof CountPair) => {
    const values = counts.map((count) => count[name])
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length
    return (100 * (Math.max(...values) - Math.min(...values))) / mean
  }
  const [densityPercent, moisturePercent] = [range('density'), range('moisture')]
  return { ok: true, stable: settle(densityPercent) < DRIFT_LIMITS.density && settle(moisturePercent) < DRIFT_LIMITS.moisture, densityPercent, moisturePercent }
}
