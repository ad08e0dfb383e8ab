import type { FieldProblem } from '#shared/domain/result.ts'
import { parseLimit, roundToPlace } from '#shared/domain/rounding.ts'
import type { RoundingRule, WrittenLimit } from '#shared/domain/rounding.ts'
import { convertDensity, DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import type { DensityUnit } from '#shared/units/density.ts'

/** A step of a minimum that depends on the curve's maximum: applies below `belowMaxDryPcf`, the last one to all the rest. */
export type CompactionStep = { readonly belowMaxDryPcf?: number | undefined; readonly text: string }

/**
 * One limit of a specification, kept as it is written: "95" and "95.0" are read differently (ASTM E29).
 * Compaction, saturation and air voids in percent; the moisture band in points from optimum.
 */
export type Criterion =
  | { readonly kind: 'rc-min'; readonly text: string }
  | { readonly kind: 'rc-max'; readonly text: string }
  | { readonly kind: 'rc-min-steps'; readonly steps: readonly CompactionStep[] }
  | { readonly kind: 'moisture-band'; readonly lowText: string; readonly highText: string }
  | { readonly kind: 'saturation-min'; readonly text: string }
  | { readonly kind: 'saturation-max'; readonly text: string }
  | { readonly kind: 'air-voids-max'; readonly text: string }
  | { readonly kind: 'dry-density-min'; readonly text: string; readonly unit: DensityUnit }

export type CriterionKind = Criterion['kind']

const MINUS = '\u2212'

/** A limit's text as it is shown: a true minus for a hyphen, and the plus sign kept. */
export function shownLimit(text: string): string {
  return text.trim().replace(/^[-−]\s*/, MINUS)
}

/**
 * What is wrong with a criterion as entered.
 * @param field path put before the field names of the problems
 */
export function criterionProblems(criterion: Criterion, field: string): FieldProblem[] {
  const problems: FieldProblem[] = []
  const read = (text: string, name: string): WrittenLimit | null => {
    const limit = parseLimit(text)
    if (!limit) problems.push({ field: `${field}.${name}`, code: 'limit-unreadable', message: `"${text.slice(0, 20)}" is not a limit. Write it as the specification does, such as 95 or 95.0.` })
    return limit
  }
  switch (criterion.kind) {
    case 'moisture-band': {
      const low = read(criterion.lowText, 'lowText')
      const high = read(criterion.highText, 'highText')
      if (low && high && low.value > high.value) {
        problems.push({ field: `${field}.lowText`, code: 'band-reversed', message: 'The lower end of the moisture band is above its upper end.' })
      }
      return problems
    }
    case 'rc-min-steps': {
      let before = 0
      criterion.steps.forEach((step, i) => {
        read(step.text, `steps.${i}.text`)
        const last = i === criterion.steps.length - 1
        const bound = step.belowMaxDryPcf
        if (last ? bound !== undefined : !(bound !== undefined && Number.isFinite(bound) && bound > before)) {
          problems.push({ field: `${field}.steps.${i}`, code: 'steps-order', message: 'Steps rise by maximum unit weight, and the last one has no bound.' })
        }
        before = bound ?? before
      })
      if (criterion.steps.length === 0) problems.push({ field: `${field}.steps`, code: 'steps-order', message: 'Give at least one step.' })
      return problems
    }
    default: {
      const limit = read(criterion.text, 'text')
      if (limit && limit.value < 0) problems.push({ field: `${field}.text`, code: 'limit-negative', message: 'This limit cannot be below zero.' })
      return problems
    }
  }
}

/**
 * The minimum compaction that applies to a curve, of a minimum by steps.
 * @param maxDryDensity of the curve before any oversize correction, kg/m³; compared as reported, to 0.1 pcf
 * @returns the limit as written, percent; undefined only where there are no steps
 */
export function stepFor(steps: readonly CompactionStep[], maxDryDensity: number): string | undefined {
  const pcf = roundToPlace(convertDensity(maxDryDensity, 'kg/m3', 'pcf'), 1, 'even')
  return steps.find((step) => step.belowMaxDryPcf === undefined || pcf < step.belowMaxDryPcf)?.text
}

/** A criterion in the words of the trade: "At least 95 % of maximum dry unit weight". */
export function describeCriterion(criterion: Criterion): string {
  switch (criterion.kind) {
    case 'rc-min':
      return `At least ${shownLimit(criterion.text)} % of maximum dry unit weight`
    case 'rc-max':
      return `At most ${shownLimit(criterion.text)} % of maximum dry unit weight`
    case 'rc-min-steps':
      return `At least, by maximum dry unit weight: ${criterion.steps
        .map((step) => `${shownLimit(step.text)} % ${step.belowMaxDryPcf === undefined ? 'otherwise' : `below ${step.belowMaxDryPcf} pcf`}`)
        .join(', ')}`
    case 'moisture-band':
      return `Moisture ${bandText(criterion.lowText, criterion.highText)} points of optimum`
    case 'saturation-min':
      return `Saturation at least ${shownLimit(criterion.text)} %`
    case 'saturation-max':
      return `Saturation at most ${shownLimit(criterion.text)} %`
    case 'air-voids-max':
      return `Air voids at most ${shownLimit(criterion.text)} %`
    case 'dry-density-min':
      return `Dry unit weight at least ${shownLimit(criterion.text)} ${DENSITY_UNIT_LABEL[criterion.unit]}`
  }
}

/** "±2" where the band is even as written, else "−1 to +3". */
function bandText(lowText: string, highText: string): string {
  const [low, high] = [shownLimit(lowText), shownLimit(highText)]
  const bare = (text: string) => text.replace(/^[+−]/, '')
  return low.startsWith(MINUS) && !high.startsWith(MINUS) && bare(low) === bare(high) ? `±${bare(low)}` : `${low} to ${signed(high)}`
}

const signed = (text: string) => (/^[+−]/.test(text) || Number(text) === 0 ? text : `+${text}`)

/**
 * How a limit will be read, shown where it is entered: what the outermost admitted value is, to one place more than
 * the limit is written with ("±2" admits −2.4 to +2.4; "95" by rounding admits 94.6).
 * @param criterion one without problems
 */
export function readingOf(criterion: Criterion, rounding: RoundingRule): string {
  switch (criterion.kind) {
    case 'moisture-band': {
      const low = parseLimit(criterion.lowText)
      const high = parseLimit(criterion.highText)
      if (!low || !high) return ''
      return `Admits ${pointText(outermost(low, 'min', rounding))} to ${pointText(outermost(high, 'max', rounding))} points.`
    }
    case 'rc-min-steps':
      return criterion.steps.map((step) => oneReading(step.text, 'min', rounding)).join(' ')
    case 'rc-max':
    case 'saturation-max':
    case 'air-voids-max':
      return oneReading(criterion.text, 'max', rounding)
    default:
      return oneReading(criterion.text, 'min', rounding)
  }
}

type Edge = { readonly value: number; readonly decimals: number }

/** The last value that meets a limit, at one place more than it is written with. */
function outermost(limit: WrittenLimit, side: 'min' | 'max', rule: RoundingRule): Edge {
  if (rule.method === 'absolute') return limit
  const place = limit.decimals + 1
  const outward = side === 'min' ? -1 : 1
  const half = roundToPlace(limit.value + outward * 5 * 10 ** -place, place, 'even')
  const tieMeets = roundToPlace(half, limit.decimals, rule.ties) === limit.value
  return { value: tieMeets ? half : roundToPlace(half - outward * 10 ** -place, place, 'even'), decimals: place }
}

function oneReading(text: string, side: 'min' | 'max', rule: RoundingRule): string {
  const limit = parseLimit(text)
  if (!limit) return ''
  const edge = outermost(limit, side, rule)
  const written = shownLimit(text)
  if (rule.method === 'absolute') return `"${written}" is compared exactly, with the unrounded value.`
  const beyond = roundToPlace(edge.value + (side === 'min' ? -1 : 1) * 10 ** -edge.decimals, edge.decimals, 'even')
  return `"${written}" admits ${edge.value.toFixed(edge.decimals)}, not ${beyond.toFixed(edge.decimals)}.`
}

function pointText({ value, decimals }: Edge): string {
  const size = Math.abs(value).toFixed(decimals)
  return value < 0 ? `${MINUS}${size}` : value > 0 ? `+${size}` : size
}
