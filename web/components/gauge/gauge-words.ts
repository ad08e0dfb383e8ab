import { dayWords } from '#shared/domain/gauge-check.ts'
import { formatNumber, THIN_SPACE } from '#shared/units/format.ts'
import type { CountReferenceView, Gauge, JudgedCountView, TestGauge } from '#shared/schemas/gauge.ts'

export const GAUGE_STATE_WORDS: Readonly<Record<TestGauge['state'], string>> = {
  good: 'Good',
  'not-counted': 'Not counted',
  'count-bad': 'Out of limits',
  'out-of-service': 'Out of service',
  overdue: 'Calibration overdue',
  'not-calibrated': 'No calibration',
  'not-named': 'Gauge not named',
}

/** "Sep 24, 2027" */
export function dateWords(day: string): string {
  return `${dayWords(day)}, ${day.slice(0, 4)}`
}

/** A count, with its part of one only where it has one. */
export function countText(count: number): string {
  return formatNumber(count, Number.isInteger(count) ? 0 : 1)
}

/** "+0.4 %" with a true minus. */
export function driftText(percent: number | null): string {
  if (percent === null) return '–'
  const sign = percent > 0 ? '+' : ''
  return `${sign}${formatNumber(percent, 2)}${THIN_SPACE}%`
}

/** What the counts of a day are compared with, in words. */
export function referenceWords(reference: CountReferenceView | null): string {
  if (reference === null) return 'No calibration is in force that day, so that there is nothing to compare with.'
  const { from, days, density, moisture } = reference
  const of = from === 'calibration' ? 'the calibration, until four days are good' : `the average of the last four good days, ${dayWords(days[0] ?? '')} to ${dayWords(days.at(-1) ?? '')}`
  return `compared with ${of}: density ${formatNumber(density, 1)}, moisture ${formatNumber(moisture, 1)}.`
}

/** One word for what a count is. */
export function countWords(count: JudgedCountView): string {
  if (count.void !== null) return 'Void'
  if (!count.stands) return count.good ? 'Good, counted again' : 'Out, counted again'
  return count.good ? 'Good' : 'Out of limits'
}

/** "2 gauges, 1 not counted today": what stands on the sheet. */
export function registerWords(gauges: readonly Gauge[]): string {
  const [first, ...rest] = [`${gauges.length} ${gauges.length === 1 ? 'gauge' : 'gauges'}`, ...stateCounts(gauges)]
  return [first, ...rest].join(', ')
}

function stateCounts(gauges: readonly Gauge[]): string[] {
  const words = { good: 'good today', 'not-counted': 'not counted today', 'count-bad': 'out of limits today', 'out-of-service': 'out of service', overdue: 'past its calibration', 'not-calibrated': 'without a calibration' } as const
  return Object.entries(words).flatMap(([state, word]) => {
    const n = gauges.filter((gauge) => gauge.check.state === state).length
    return n === 0 ? [] : [`${n} ${word}`]
  })
}
