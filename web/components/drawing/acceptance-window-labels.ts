import type { ScaleLinear } from 'd3-scale'
import { densityOn, type AcceptedRange, type PlotPoint } from './acceptance-window-geometry.ts'
import { placeLabels, textWidth, type Box, type LabelWish, type PlacedLabel } from './place-labels.ts'

type LabelInput = {
  readonly x: ScaleLinear<number, number>
  readonly y: ScaleLinear<number, number>
  readonly frame: Box
  readonly densityUnit: string
  readonly zav: { readonly points: readonly PlotPoint[]; readonly label: string }
  readonly accepted: AcceptedRange | undefined
  readonly limit: { readonly density: number; readonly label: string } | undefined
  readonly tests: readonly PlotPoint[]
  readonly curve: readonly PlotPoint[]
  readonly fontSize: number
}

const MARK = 11

/** Boxes along a line, so that a label keeps off it. */
function boxesAlong({ x, y, frame }: LabelInput, points: readonly PlotPoint[]): readonly Box[] {
  const steps = 48
  return Array.from({ length: steps }, (_, index): Box | null => {
    const px = frame.x + ((index + 0.5) / steps) * frame.width
    const density = densityOn(points, x.invert(px))
    const first = points[0]
    const last = points.at(-1)
    if (density === null || first === undefined || last === undefined) return null
    if (x.invert(px) < first.moisture || x.invert(px) > last.moisture) return null
    return { x: px - frame.width / steps / 2, y: y(density) - 3, width: frame.width / steps, height: 6 }
  }).filter((box) => box !== null)
}

function zavPlaces(input: LabelInput, text: string): LabelWish['places'] {
  const { x, y, frame, zav } = input
  const width = textWidth(text, input.fontSize)
  const right = frame.x + frame.width
  const beside = [0.08, 0.14, 0.2, 0.28, 0.36, 0.44, 0.52, 0.6, 0.7, 0.8].flatMap((share) => {
    const base = frame.y + share * frame.height
    const onLine = zav.points.find((point) => y(point.density) >= base)
    const onTop = zav.points.find((point) => y(point.density) >= base - input.fontSize)
    if (onLine === undefined || onTop === undefined) return []
    return [
      { x: x(onLine.moisture) + 12, y: base },
      { x: x(onTop.moisture) - width - 12, y: base },
    ]
  })
  return [...beside.filter((place) => place.x >= frame.x && place.x + width <= right), { x: right - width, y: frame.y + input.fontSize }]
}

/** Where the words of the plot stand, clear of the tests, the curve and one another. */
export function windowLabels(input: LabelInput): readonly PlacedLabel[] {
  const { x, y, frame, densityUnit, zav, accepted, limit, tests, curve, fontSize } = input
  const wishes: LabelWish[] = [
    { id: 'axis', text: `Dry density, ${densityUnit}`, fontSize, places: [{ x: frame.x + 4, y: frame.y + fontSize }, { x: frame.x + 4, y: frame.y + fontSize * 2.4 }] },
  ]
  if (zav.points.length > 0) wishes.push({ id: 'zav', text: zav.label, fontSize, places: zavPlaces(input, zav.label) })
  if (limit !== undefined) {
    const base = y(limit.density)
    const width = textWidth(limit.label, fontSize)
    wishes.push({
      id: 'limit',
      text: limit.label,
      fontSize,
      places: [1, 0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9].map((share) => frame.x + share * (frame.width - width)).flatMap((left) => [
        { x: left, y: base + fontSize * 1.35 },
        { x: left, y: base - fontSize * 0.5 },
      ]),
    })
  }
  if (accepted !== undefined) {
    const left = x(accepted.moistureMin ?? x.domain()[0] ?? 0) + 5
    const floor = y(accepted.densityMin)
    wishes.push({
      id: 'accepted',
      text: 'meets spec',
      fontSize,
      places: [0, 1, 2, 3].map((row) => ({ x: Math.max(frame.x + 4, left), y: frame.y + fontSize * (1.6 + row * 1.5) })).concat({ x: left, y: floor - 6 }),
    })
  }
  const marks = tests.map((test): Box => ({ x: x(test.moisture) - MARK, y: y(test.density) - MARK, width: 2 * MARK, height: 2 * MARK }))
  return placeLabels(wishes, [...marks, ...boxesAlong(input, curve), ...boxesAlong(input, zav.points)], frame)
}
