import { scaleLinear } from 'd3-scale'
import { curveMonotoneX, line } from 'd3-shape'
import { useId } from 'react'
import { saturationLineDensity } from '#shared/domain/phase-relations.ts'
import type { LabPoint } from '#shared/domain/curve-points.ts'
import type { MaximumPair } from '#shared/domain/reference-curve.ts'
import { plotExtent, type PlotPoint } from '#web/components/drawing/acceptance-window-geometry.ts'
import { placeLabels, type Box } from '#web/components/drawing/place-labels.ts'
import { PlotAxes } from '#web/components/drawing/plot-axes.tsx'
import { useMeasuredWidth } from '#web/components/drawing/use-measured-width.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { convertDensity } from '#shared/units/density.ts'

export type CurvePlotProps = {
  label: string
  points: readonly LabPoint[]
  /** the smooth curve as a run of points; none where the points make no curve */
  drawn: readonly LabPoint[]
  gs: number
  pair: MaximumPair | null
  reported: MaximumPair | null
}

const HEIGHT = 360
const TEXT = 12
/** Lines of equal saturation beside the zero-air-voids line, told apart by their dashes. */
const SATURATIONS = [
  { percent: 90, dash: '10 3 2 3' },
  { percent: 80, dash: '2 3' },
] as const

/** Dry density over moisture: the laboratory's points, the curve through them, its peak, and the lines of 80, 90 and 100 % saturation. */
export function CurvePlot({ label, points, drawn, gs, pair, reported }: CurvePlotProps) {
  const { site, units } = useSite()
  const clipId = useId()
  const [ref, width] = useMeasuredWidth(520)
  const us = units.system === 'us'
  const shown = (point: LabPoint): PlotPoint => ({ moisture: point.moisture, density: convertDensity(point.dryDensity, 'kg/m3', us ? 'pcf' : 'kN/m3') })
  const peakOf = (peak: MaximumPair) => shown({ moisture: peak.optimumMoisture, dryDensity: peak.maxDryDensity })
  const peak = pair === null ? null : peakOf(pair)
  const own = reported === null ? null : peakOf(reported)
  const marks = points.map(shown)
  const extent = plotExtent([...marks, ...drawn.map(shown), ...[peak, own].filter((point) => point !== null)], undefined, { moisture: 2, density: us ? 5 : 1 })
  const frame = { left: 44, right: width - 12, top: 8, bottom: HEIGHT - 40 }
  const x = scaleLinear(extent.moisture, [frame.left, frame.right])
  const y = scaleLinear(extent.density, [frame.bottom, frame.top])
  const path = line<PlotPoint>((point) => x(point.moisture), (point) => y(point.density))
  const smooth = line<PlotPoint>((point) => x(point.moisture), (point) => y(point.density)).curve(curveMonotoneX)
  const lineOf = (saturation: number) =>
    Array.from({ length: 61 }, (_, index): PlotPoint => {
      const moisture = extent.moisture[0] + (index / 60) * (extent.moisture[1] - extent.moisture[0])
      return shown({ moisture, dryDensity: saturationLineDensity(moisture, saturation, gs, site.waterDensity) })
    })
  const zav = lineOf(100)
  const partly = SATURATIONS.map(({ percent, dash }) => ({ percent, dash, run: lineOf(percent) }))
  const box = ({ moisture, density }: PlotPoint): Box => ({ x: x(moisture) - 8, y: y(density) - 8, width: 16, height: 16 })
  const alongZav = zav.filter((point) => y(point.density) >= frame.top && y(point.density) <= frame.bottom)
  const zavAt = alongZav[Math.floor(alongZav.length * 0.25)] ?? alongZav[0]
  const zavText = `zero air voids, Gs ${gs}`
  const labels = placeLabels(
    [
      { id: 'axis', text: `Dry density, ${units.marks.density}`, fontSize: TEXT, places: [{ x: frame.left + 6, y: frame.top + TEXT }] },
      ...(peak === null || pair === null
        ? []
        : [{ id: 'peak', text: `${units.density(pair.maxDryDensity)} at ${units.percent(pair.optimumMoisture)}`, fontSize: TEXT, places: [{ x: x(peak.moisture) - 60, y: y(peak.density) - 14 }, { x: x(peak.moisture) - 132, y: y(peak.density) - 12 }, { x: x(peak.moisture) + 10, y: y(peak.density) + 30 }] }]),
      ...(own === null ? [] : [{ id: 'own', text: 'laboratory’s own', fontSize: TEXT, places: [{ x: x(own.moisture) + 12, y: y(own.density) + 22 }, { x: x(own.moisture) - 110, y: y(own.density) + 34 }] }]),
      ...partly.flatMap(({ percent, run }) => {
        const at = run.findLast((point) => y(point.density) >= frame.top + TEXT && y(point.density) <= frame.bottom - TEXT)
        if (at === undefined) return []
        return [{ id: `s${percent}`, text: `${percent} %`, fontSize: TEXT, places: [{ x: x(at.moisture) - 34, y: y(at.density) - 8 }, { x: x(at.moisture) - 40, y: y(at.density) + 14 }] }]
      }),
      ...(zavAt === undefined ? [] : [{ id: 'zav', text: zavText, fontSize: TEXT, places: [{ x: x(zavAt.moisture) + 12, y: y(zavAt.density) - 4 }, { x: frame.right - 150, y: frame.top + 2 * TEXT }] }]),
    ],
    [...marks.map(box), ...drawn.map(shown).map((point) => ({ ...box(point), y: y(point.density) - 3, height: 6 })), ...zav.map((point) => ({ x: x(point.moisture) - 5, y: y(point.density) - 3, width: 10, height: 6 }))],
    { x: frame.left + 4, y: frame.top, width: frame.right - frame.left - 4, height: frame.bottom - frame.top },
  )
  return (
    <div ref={ref} className="w-full max-w-[680px]">
      <svg role="img" aria-label={label} width={width} height={HEIGHT} viewBox={`0 0 ${width} ${HEIGHT}`} className="block">
        <clipPath id={clipId}>
          <rect x={frame.left} y={frame.top} width={Math.max(0, frame.right - frame.left)} height={frame.bottom - frame.top} />
        </clipPath>
        <PlotAxes x={x} y={y} {...frame} fontSize={TEXT} grid xLabel="Moisture, %" />
        <g clipPath={`url(#${clipId})`} fill="none">
          {partly.map(({ percent, dash, run }) => (
            <path key={percent} d={path(run) ?? ''} stroke="var(--zav)" strokeWidth={1} strokeDasharray={dash} />
          ))}
          <path d={path(zav) ?? ''} stroke="var(--zav)" strokeWidth={1.8} strokeDasharray="8 4" />
          <path d={smooth(drawn.map(shown)) ?? ''} stroke="var(--ink)" strokeWidth={2} />
          {peak !== null && <path d={`M${frame.left} ${y(peak.density)}H${x(peak.moisture)}V${frame.bottom}`} stroke="var(--ink)" strokeDasharray="3 3" />}
          {marks.map((point, index) => (
            <path key={index} d={`M${x(point.moisture) - 5} ${y(point.density)}h10m-5 -5v10`} stroke="var(--ink)" strokeWidth={1.6} />
          ))}
          {peak !== null && <circle cx={x(peak.moisture)} cy={y(peak.density)} r={4.5} fill="var(--raised)" stroke="var(--ink)" strokeWidth={2} />}
          {own !== null && <path d={`M${x(own.moisture)} ${y(own.density) - 7}l7 7l-7 7l-7-7z`} fill="var(--raised)" stroke="var(--ink)" strokeWidth={1.6} />}
        </g>
        <g fontSize={TEXT} fontWeight={600} paintOrder="stroke" stroke="var(--raised)" strokeWidth={3} strokeLinejoin="round">
          {labels.map(({ id, text, x: left, y: base }) => (
            <text key={id} x={left} y={base} fill={id === 'zav' || id.startsWith('s') ? 'var(--zav)' : id === 'axis' ? 'var(--ink-2)' : 'var(--ink)'}>
              {text}
            </text>
          ))}
        </g>
      </svg>
    </div>
  )
}
