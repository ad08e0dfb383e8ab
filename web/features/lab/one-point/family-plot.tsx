import { scaleLinear } from 'd3-scale'
import { curveMonotoneX, line } from 'd3-shape'
import { useId } from 'react'
import type { LabPoint } from '#shared/domain/curve-points.ts'
import { zeroAirVoidsDensity } from '#shared/domain/phase-relations.ts'
import type { MaximumPair } from '#shared/domain/reference-curve.ts'
import { plotExtent, type PlotPoint } from '#web/components/drawing/acceptance-window-geometry.ts'
import { placeLabels, type Box } from '#web/components/drawing/place-labels.ts'
import { PlotAxes } from '#web/components/drawing/plot-axes.tsx'
import { useMeasuredWidth } from '#web/components/drawing/use-measured-width.ts'
import { convertDensity } from '#shared/units/density.ts'
import { useSite } from '#web/lib/site-context.tsx'

export type PlottedMember = { readonly id: string; readonly code: string; readonly pair: MaximumPair; readonly drawn: readonly LabPoint[]; readonly inUse: boolean }

type FamilyPlotProps = {
  label: string
  members: readonly PlottedMember[]
  /** the one-point, null until it can be worked out */
  point: LabPoint | null
  /** the curve drawn through it between two members */
  between: { readonly drawn: readonly LabPoint[]; readonly pair: MaximumPair } | null
  gs: number
}

const HEIGHT = 380
const TEXT = 12

/** A family of curves with the spine through its peaks, the point, and the curve that follows from it. */
export function FamilyPlot({ label, members, point, between, gs }: FamilyPlotProps) {
  const { site, units } = useSite()
  const clipId = useId()
  const [ref, width] = useMeasuredWidth(520)
  const us = units.system === 'us'
  const shown = ({ moisture, dryDensity }: LabPoint): PlotPoint => ({ moisture, density: convertDensity(dryDensity, 'kg/m3', us ? 'pcf' : 'kN/m3') })
  const peakOf = (pair: MaximumPair) => shown({ moisture: pair.optimumMoisture, dryDensity: pair.maxDryDensity })
  const spine = members.map(({ pair }) => peakOf(pair)).sort((a, b) => a.moisture - b.moisture)
  const at = point === null ? null : shown(point)
  const found = between === null ? null : peakOf(between.pair)
  const lines = members.map((member) => ({ ...member, line: member.drawn.map(shown) }))
  const extent = plotExtent([...lines.flatMap((each) => each.line), ...spine, ...(at === null ? [] : [at])], undefined, { moisture: 2, density: us ? 5 : 1 })
  const frame = { left: 44, right: width - 12, top: 8, bottom: HEIGHT - 40 }
  const x = scaleLinear(extent.moisture, [frame.left, frame.right])
  const y = scaleLinear(extent.density, [frame.bottom, frame.top])
  const path = line<PlotPoint>((each) => x(each.moisture), (each) => y(each.density))
  const smooth = line<PlotPoint>((each) => x(each.moisture), (each) => y(each.density)).curve(curveMonotoneX)
  const zav = Array.from({ length: 61 }, (_, i): PlotPoint => {
    const moisture = extent.moisture[0] + (i / 60) * (extent.moisture[1] - extent.moisture[0])
    return shown({ moisture, dryDensity: zeroAirVoidsDensity(moisture, gs, site.waterDensity) })
  })
  const box = (each: PlotPoint, half: number): Box => ({ x: x(each.moisture) - half, y: y(each.density) - half, width: 2 * half, height: 2 * half })
  const alongZav = zav.filter((each) => y(each.density) >= frame.top && y(each.density) <= frame.bottom)
  const zavAt = alongZav[Math.floor(alongZav.length * 0.35)]
  const labels = placeLabels(
    [
      { id: 'axis', text: `Dry density, ${units.marks.density}`, fontSize: TEXT, places: [{ x: frame.left + 6, y: frame.top + TEXT }] },
      ...lines.map(({ id, code, inUse, pair }) => {
        const peak = peakOf(pair)
        return { id, text: inUse ? `${code}, in use` : code, fontSize: TEXT, places: [{ x: x(peak.moisture) + 4, y: y(peak.density) - 10 }, { x: x(peak.moisture) + 12, y: y(peak.density) + 4 }, { x: x(peak.moisture) - 40, y: y(peak.density) + 22 }] }
      }),
      ...(found === null ? [] : [{ id: 'found', text: 'found', fontSize: TEXT, places: [{ x: x(found.moisture) - 20, y: y(found.density) + 20 }, { x: x(found.moisture) + 10, y: y(found.density) - 8 }] }]),
      ...(at === null ? [] : [{ id: 'point', text: 'this point', fontSize: TEXT, places: [{ x: x(at.moisture) - 72, y: y(at.density) + 4 }, { x: x(at.moisture) + 12, y: y(at.density) + 18 }] }]),
      ...(zavAt === undefined ? [] : [{ id: 'zav', text: `zero air voids, Gs ${gs}`, fontSize: TEXT, places: [{ x: x(zavAt.moisture) + 14, y: y(zavAt.density) - 4 }, { x: frame.right - 150, y: frame.top + 2 * TEXT }] }]),
    ],
    [...lines.flatMap((each) => each.line).map((each) => box(each, 3)), ...spine.map((each) => box(each, 6)), ...zav.map((each) => box(each, 4)), ...(at === null ? [] : [box(at, 8)])],
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
          <path d={path(zav) ?? ''} stroke="var(--zav)" strokeWidth={1.8} strokeDasharray="8 4" />
          <path d={path(spine) ?? ''} stroke="var(--ink-2)" strokeDasharray="2 3" />
          {lines.map(({ id, line: run, inUse }) => (
            <path key={id} d={smooth(run) ?? ''} stroke="var(--ink)" strokeWidth={inUse ? 2.6 : 1.2} />
          ))}
          {between !== null && <path d={smooth(between.drawn.map(shown)) ?? ''} stroke="var(--ink)" strokeWidth={2} strokeDasharray="7 3" />}
          {spine.map((peak) => (
            <circle key={`${peak.moisture} ${peak.density}`} cx={x(peak.moisture)} cy={y(peak.density)} r={3.5} fill="var(--raised)" stroke="var(--ink)" strokeWidth={1.5} />
          ))}
          {found !== null && <circle cx={x(found.moisture)} cy={y(found.density)} r={4.5} fill="var(--ink)" stroke="var(--raised)" strokeWidth={1.5} />}
          {at !== null && <path d={`M${x(at.moisture) - 7} ${y(at.density)}h14m-7 -7v14`} stroke="var(--ink)" strokeWidth={2.4} />}
        </g>
        <g fontSize={TEXT} fontWeight={600} paintOrder="stroke" stroke="var(--raised)" strokeWidth={3} strokeLinejoin="round">
          {labels.map(({ id, text, x: left, y: base }) => (
            <text key={id} x={left} y={base} fill={id === 'zav' ? 'var(--zav)' : id === 'axis' ? 'var(--ink-2)' : 'var(--ink)'}>
              {text}
            </text>
          ))}
        </g>
      </svg>
    </div>
  )
}
