import { scaleLinear } from 'd3-scale'
import { curveMonotoneX, line } from 'd3-shape'
import { useId } from 'react'
import type { LabPoint } from '#shared/domain/curve-points.ts'
import type { MaximumPair } from '#shared/domain/reference-curve.ts'
import { convertDensity } from '#shared/units/density.ts'
import { plotExtent, type PlotPoint } from '#web/components/drawing/acceptance-window-geometry.ts'
import { placeLabels, type Box } from '#web/components/drawing/place-labels.ts'
import { PlotAxes } from '#web/components/drawing/plot-axes.tsx'
import { useMeasuredWidth } from '#web/components/drawing/use-measured-width.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { SaturationLines } from './saturation-lines.tsx'

export type CurvePlotProps = {
  label: string
  points: readonly LabPoint[]
  /** the smooth curve as a run of points; none where the points make no curve */
  drawn: readonly LabPoint[]
  /** null while it is not known: no line of saturation is drawn then */
  gs: number | null
  pair: MaximumPair | null
  reported: MaximumPair | null
  /** what the plot lies on */
  ground?: 'raised' | 'sheet'
}

const HEIGHT = 380
const TEXT = 12
/** An empty sheet is drawn over the usual range, kg/m³ and percent. */
const BLANK: readonly LabPoint[] = [{ moisture: 6, dryDensity: 1650 }, { moisture: 18, dryDensity: 2050 }]

/** Dry density over moisture: the laboratory's points, the curve through them, its peak, and the lines of 80, 90 and 100 % saturation. */
export function CurvePlot({ label, points, drawn, gs, pair, reported, ground = 'raised' }: CurvePlotProps) {
  const { site, units } = useSite()
  const clipId = useId()
  const [ref, width] = useMeasuredWidth(520)
  const us = units.system === 'us'
  const toPlot = (dryDensity: number) => convertDensity(dryDensity, 'kg/m3', us ? 'pcf' : 'kN/m3')
  const shown = ({ moisture, dryDensity }: LabPoint): PlotPoint => ({ moisture, density: toPlot(dryDensity) })
  const peakOf = (peak: MaximumPair | null) => (peak === null ? null : shown({ moisture: peak.optimumMoisture, dryDensity: peak.maxDryDensity }))
  const peak = peakOf(pair)
  const own = peakOf(reported)
  const marks = points.map(shown)
  const curve = drawn.map(shown)
  const known = [...marks, ...curve, ...[peak, own].filter((point) => point !== null)]
  const extent = plotExtent(known.length === 0 ? BLANK.map(shown) : known, undefined, { moisture: 2, density: us ? 5 : 1 })
  const frame = { left: 44, right: width - 12, top: 8, bottom: HEIGHT - 40 }
  const x = scaleLinear(extent.moisture, [frame.left, frame.right])
  const y = scaleLinear(extent.density, [frame.bottom, frame.top])
  const smooth = line<PlotPoint>((point) => x(point.moisture), (point) => y(point.density)).curve(curveMonotoneX)
  const spot = (point: PlotPoint) => ({ x: x(point.moisture), y: y(point.density) })
  const box = (point: PlotPoint): Box => ({ x: x(point.moisture) - 8, y: y(point.density) - 8, width: 16, height: 16 })
  const peakWords = pair === null ? '' : `${units.density(pair.maxDryDensity)} at ${units.percent(pair.optimumMoisture)}`
  const labels = placeLabels(
    [
      { id: 'axis', text: `Dry density, ${units.marks.density}`, fontSize: TEXT, places: [{ x: frame.left + 6, y: frame.top + TEXT }] },
      ...(peak === null ? [] : [{ id: 'peak', text: peakWords, fontSize: TEXT, places: [{ x: x(peak.moisture) - 60, y: y(peak.density) - 14 }, { x: x(peak.moisture) - 132, y: y(peak.density) - 12 }, { x: x(peak.moisture) + 10, y: y(peak.density) + 30 }] }]),
      ...(own === null ? [] : [{ id: 'own', text: 'laboratory’s own', fontSize: TEXT, places: [{ x: x(own.moisture) + 12, y: y(own.density) + 22 }, { x: x(own.moisture) - 110, y: y(own.density) + 34 }] }]),
    ],
    [...marks.map(box), ...curve.map((point) => ({ ...box(point), y: y(point.density) - 3, height: 6 }))],
    { x: frame.left + 4, y: frame.top, width: frame.right - frame.left - 4, height: frame.bottom - frame.top },
  )
  const wordSpots = labels.flatMap(({ text, x: left, y: base }) => Array.from({ length: 5 }, (_, i) => ({ x: left + (i / 4) * text.length * TEXT * 0.55, y: base - TEXT / 3 })))
  const halo = { paintOrder: 'stroke', stroke: `var(--${ground})`, strokeWidth: 4, strokeLinejoin: 'round' } as const
  return (
    <div ref={ref} className="w-full max-w-[680px]">
      <svg role="img" aria-label={label} width={width} height={HEIGHT} viewBox={`0 0 ${width} ${HEIGHT}`} className="block">
        <clipPath id={clipId}>
          <rect x={frame.left} y={frame.top} width={Math.max(0, frame.right - frame.left)} height={frame.bottom - frame.top} />
        </clipPath>
        <PlotAxes x={x} y={y} {...frame} fontSize={TEXT} grid xLabel="Moisture, %" />
        {gs !== null && <SaturationLines gs={gs} waterDensity={site.waterDensity} x={x} yOf={(dryDensity) => y(toPlot(dryDensity))} frame={frame} fontSize={TEXT} obstacles={[...marks.map(spot), ...curve.map(spot), ...wordSpots]} clip={`url(#${clipId})`} ground={`var(--${ground})`} />}
        <g clipPath={`url(#${clipId})`} fill="none">
          <path d={smooth(curve) ?? ''} stroke="var(--ink)" strokeWidth={2} />
          {peak !== null && <path d={`M${frame.left} ${y(peak.density)}H${x(peak.moisture)}V${frame.bottom}`} stroke="var(--ink)" strokeDasharray="3 3" />}
          {marks.map((point, index) => (
            <path key={index} d={`M${x(point.moisture) - 5} ${y(point.density)}h10m-5 -5v10`} stroke="var(--ink)" strokeWidth={1.6} />
          ))}
          {peak !== null && <circle cx={x(peak.moisture)} cy={y(peak.density)} r={4.5} fill={`var(--${ground})`} stroke="var(--ink)" strokeWidth={2} />}
          {own !== null && <path d={`M${x(own.moisture)} ${y(own.density) - 7}l7 7l-7 7l-7-7z`} fill={`var(--${ground})`} stroke="var(--ink)" strokeWidth={1.6} />}
        </g>
        <g fontSize={TEXT} fontWeight={600} {...halo}>
          {labels.map(({ id, text, x: left, y: base }) => (
            <text key={id} x={left} y={base} fill={id === 'axis' ? 'var(--ink-2)' : 'var(--ink)'}>
              {text}
            </text>
          ))}
        </g>
      </svg>
    </div>
  )
}
