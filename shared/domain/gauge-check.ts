import type { RawSheet } from '#shared/domain/field-sheets.ts'
import { calibrationOn, judgeCounts, judgeDay, type CountReference, type GaugeCalibration, type JudgedCount, type StandardCount } from '#shared/domain/standard-count.ts'

/** A time a gauge was out of service; `until` is null while it still is. Epoch milliseconds. */
export interface GaugeOutage {
  readonly from: number
  readonly until: number | null
  readonly reason: string
}

/** All that is known of a gauge of the register. */
export interface GaugeFacts {
  readonly serial: string
  readonly calibrations: readonly GaugeCalibration[]
  readonly outages: readonly GaugeOutage[]
  readonly counts: readonly StandardCount[]
}

export const GAUGE_STATES = ['good', 'out-of-service', 'not-calibrated', 'overdue', 'not-counted', 'count-bad'] as const
export type GaugeState = (typeof GAUGE_STATES)[number]

export interface GaugeCheck {
  readonly state: GaugeState
  /** one sentence that names the gauge and the day */
  readonly message: string
  readonly day: string
  /** what a count of that day is compared with, null without a calibration in force */
  readonly reference: CountReference | null
  /** the count that stands for the day */
  readonly count: JudgedCount | null
}

const DAY = new Intl.DateTimeFormat('en-US', { month: 'short', day: 'numeric', timeZone: 'UTC' })

/** A working day, YYYY-MM-DD, as people write it: "Dec 1". */
export function dayWords(day: string): string {
  return DAY.format(Date.parse(`${day}T12:00:00Z`))
}

/**
 * Whether a gauge may be relied on at a moment: in service, calibrated and not past its due day, and with a good standard
 * count on the working day (practice: start of day; limits of {@link judgeCounts}). A count of that day recorded later
 * serves as well; one voided no longer does.
 * @param at the moment, epoch milliseconds
 * @param day the site's working day of that moment, YYYY-MM-DD
 * @returns the first that applies of: out of service, not calibrated, overdue, not counted, count out of limits, good
 */
export function checkGauge({ serial, calibrations, outages, counts }: GaugeFacts, at: number, day: string): GaugeCheck {
  const { next: reference } = judgeCounts(calibrations, counts, day)
  const count = judgeDay(counts.filter((each) => each.day === day), reference).find((each) => each.stands) ?? null
  const found = (state: GaugeState, what: string): GaugeCheck => ({ state, message: `Gauge ${serial} ${what}`, day, reference, count })
  const outage = outages.find((each) => each.from <= at && (each.until === null || at < each.until))
  if (outage) return found('out-of-service', `was out of service on ${dayWords(day)}: ${outage.reason}`)
  const calibration = calibrationOn(calibrations, day)
  if (!calibration) return found('not-calibrated', `had no calibration in force on ${dayWords(day)}.`)
  if (calibration.dueOn !== null && calibration.dueOn < day) return found('overdue', `was past its calibration on ${dayWords(day)}: due ${dayWords(calibration.dueOn)}.`)
  if (!count) return found('not-counted', `has no standard count on ${dayWords(day)}.`)
  if (count.judgement?.good !== true) return found('count-bad', `has a standard count out of limits on ${dayWords(day)}. ${(count.judgement?.reasons ?? [count.refused]).flatMap((reason) => reason?.message ?? []).join(' ')}`)
  return found('good', `has a good standard count on ${dayWords(day)}.`)
}

/** What stands in place of a check where a gauge test names no gauge of the register. */
export const GAUGE_NOT_NAMED = { state: 'not-named', message: 'It names no gauge of the register, so that its standard count is not known.' } as const

/** True where a sheet was read off a nuclear gauge, its density or only its moisture. */
export function usesGauge(sheet: RawSheet): boolean {
  return sheet.method === 'nuclear-gauge' || sheet.moisture.method === 'gauge'
}

/** The gauge of the register a sheet names, or null. */
export function gaugeIdOf(sheet: RawSheet): string | null {
  if (sheet.method === 'nuclear-gauge') return sheet.gaugeId ?? null
  return sheet.moisture.method === 'gauge' ? (sheet.moisture.gaugeId ?? null) : null
}
