import { scaleLinear, scaleUtc } from 'd3-scale'
import { curveStepAfter, area, line } from 'd3-shape'
import type { FrequencySeries } from '#shared/schemas/lot.ts'
import { textWidth } from '#web/components/drawing/place-labels.ts'

const DAY_MS = 86_400_000
const FONT = 13

type Day = { readonly at: number; readonly placed: number; readonly spoken: number }
export type ChartLabel = { readonly text: string; readonly x: number; readonly y: number; readonly end: boolean }
export type ChartFrame = { readonly width: number; readonly left: number; readonly right: number; readonly top: number; readonly bottom: number }

const noon = (day: string): number => Date.parse(`${day}T12:00:00Z`)

/** Days with a zero before the first, so that both lines rise from the ground. */
function daysOf(series: FrequencySeries['days'], convert: (cm3: number) => number): Day[] {
  const days = series.map(({ day, placedCm3, spokenCm3 }) => ({ at: noon(day), placed: convert(placedCm3), spoken: convert(spokenCm3) }))
  const first = days[0]
  return first === undefined ? [] : [{ at: first.at - DAY_MS, placed: 0, spoken: 0 }, ...days]
}

/** Evenly spaced days to name, as many as stand side by side without touching. */
function dayTicks(from: number, to: number, width: number): number[] {
  const most = Math.max(2, Math.floor(width / 92))
  const days = Math.max(1, Math.round((to - from) / DAY_MS))
  const step = [1, 2, 7, 14, 28, 56, 112, 224, 364].find((count) => days / count <= most - 1) ?? Math.ceil(days / most)
  const ticks = Array.from({ length: Math.floor(days / step) + 1 }, (_, index) => from + index * step * DAY_MS)
  const room = ((to - (ticks.at(-1) ?? from)) / (to - from)) * width
  return room > 60 ? [...ticks, to] : ticks
}

/** Lines, axis and labels of the chart; the last day's figures stand beside the lines, inside the frame. */
export function layOutChart(series: FrequencySeries['days'], convert: (cm3: number) => number, frame: ChartFrame, write: (cm3: number) => string) {
  const days = daysOf(series, convert)
  const first = days[0]
  const last = days.at(-1)
  const total = series.at(-1)
  if (first === undefined || last === undefined || total === undefined) return null
  const { left, right, top, bottom } = frame
  const x = scaleUtc([first.at, last.at], [left, right])
  const y = scaleLinear([0, Math.max(1, last.placed, last.spoken) * 1.04], [bottom, top])
  const placedText = `${write(total.placedCm3)} placed`
  const spokenText = `${write(total.spokenCm3)} spoken for`
  const placedWidth = textWidth(placedText, FONT)
  const placed: ChartLabel = { text: placedText, x: right, y: y(last.placed) - 10, end: true }
  // inside the area where its left end stands clear of the steps, else above the line
  const beginsAt = x.invert(right - 12 - textWidth(spokenText, FONT)).getTime()
  const height = days.filter((day) => day.at <= beginsAt).at(-1)?.spoken ?? 0
  const under = y(height) + FONT + 8
  const spoken: ChartLabel =
    under < bottom - 8 ? { text: spokenText, x: right - 12, y: under, end: true } : { text: spokenText, x: Math.max(left, right - placedWidth - 24), y: placed.y, end: true }
  return {
    placedPath: line<Day>((day) => x(day.at), (day) => y(day.placed))(days) ?? '',
    spokenPath: line<Day>((day) => x(day.at), (day) => y(day.spoken)).curve(curveStepAfter)(days) ?? '',
    spokenArea: area<Day>((day) => x(day.at), () => y(0), (day) => y(day.spoken)).curve(curveStepAfter)(days) ?? '',
    levels: y.ticks(4).map((value) => ({ value, y: y(value) })),
    days: dayTicks(first.at, last.at, right - left).map((at) => ({ at, x: x(at) })),
    labels: [placed, spoken] as const,
  }
}

/** 25,000 as 25k: the axis names thousands. */
export function levelText(value: number): string {
  return value >= 1000 ? `${Number((value / 1000).toFixed(1))}k` : String(value)
}
