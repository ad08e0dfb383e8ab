import { scaleLinear } from 'd3-scale'
import { curveMonotoneX, line } from 'd3-shape'
import { useId } from 'react'
import { GROUND_INKS } from '#shared/look/ground-look.ts'
import { TestMarkShape, type TestOutcome } from '#web/components/ui/test-mark.tsx'
import { acceptedOutline, missedBy, plotExtent, type AcceptedRange, type PlotPoint } from './acceptance-window-geometry.ts'
import { PlotAxes } from './plot-axes.tsx'
import { windowLabels } from './acceptance-window-labels.ts'
import { useMeasuredWidth } from './use-measured-width.ts'

export type PlottedTest = PlotPoint & {
  readonly id: string
  readonly outcome: TestOutcome
  readonly verification?: boolean
  /** The test this plot is about: larger, with the line that says by how much it misses. */
  readonly current?: boolean
}

export type AcceptanceWindowProps = {
  /** What the plot says, in a sentence, for those who cannot see it. */
  label: string
  densityUnit: string
  /** The compaction curve as a run of points, and the points it was fitted through. */
  curve: readonly PlotPoint[]
  curvePoints?: readonly PlotPoint[]
  zav: { readonly points: readonly PlotPoint[]; readonly label: string }
  accepted?: AcceptedRange | undefined
  /** The line of least density: "95 % of 117.6". */
  limit?: { readonly density: number; readonly label: string } | undefined
  tests: readonly PlottedTest[]
  variant?: 'big' | 'small'
}

const BIG = { width: 448, height: 392, left: 44, right: 10, top: 8, bottom: 40, text: 12, stroke: 2 }
const SMALL = { width: 176, height: 206, left: 30, right: 8, top: 8, bottom: 30, text: 10, stroke: 1.6 }

/** Dry density over moisture: the curve, the zero-air-voids line, the ground that meets the specification, and the tests. */
export function AcceptanceWindow(props: AcceptanceWindowProps) {
  const { label, densityUnit, curve, curvePoints = [], zav, accepted, limit, tests, variant = 'big' } = props
  const clipId = useId()
  const big = variant === 'big'
  const size = big ? BIG : SMALL
  const [ref, width] = useMeasuredWidth(size.width)
  const right = width - size.right
  const bottom = size.height - size.bottom
  const densityStep = densityUnit === 'pcf' ? 5 : densityUnit === 'kg/m³' ? 100 : 1
  const extent = plotExtent([...curve, ...curvePoints, ...tests], accepted, { moisture: 2, density: densityStep })
  const x = scaleLinear(extent.moisture, [size.left, right])
  const y = scaleLinear(extent.density, [bottom, size.top])
  const path = line<PlotPoint>((point) => x(point.moisture), (point) => y(point.density))
  const smooth = line<PlotPoint>((point) => x(point.moisture), (point) => y(point.density)).curve(curveMonotoneX)
  const outline = accepted === undefined ? [] : acceptedOutline(accepted, zav.points, extent)
  const labels = big
    ? windowLabels({ x, y, frame: { x: size.left + 4, y: size.top, width: right - size.left - 4, height: bottom - size.top }, densityUnit, zav, accepted, limit, tests, curve, fontSize: size.text })
    : []

  return (
    <div ref={ref} className="w-full" style={{ maxWidth: big ? 620 : 240 }}>
      <svg role="img" aria-label={label} width={width} height={size.height} viewBox={`0 0 ${width} ${size.height}`} className="block">
        <clipPath id={clipId}>
          <rect x={size.left} y={size.top} width={Math.max(0, right - size.left)} height={bottom - size.top} />
        </clipPath>
        <PlotAxes x={x} y={y} left={size.left} right={right} top={size.top} bottom={bottom} fontSize={size.text} grid={big} xLabel={big ? 'Moisture, %' : `moisture %, dry ${densityUnit}`} />
        <g clipPath={`url(#${clipId})`} fill="none">
          {outline.length > 0 && <path d={`${path(outline) ?? ''}Z`} fill={GROUND_INKS.meetsSpec.css} fillOpacity={0.6} />}
          <path d={path(zav.points) ?? ''} stroke="var(--zav)" strokeWidth={size.stroke - 0.2} strokeDasharray={big ? '8 4' : '6 3'} />
          <path d={smooth(curve) ?? ''} stroke="var(--ink)" strokeWidth={size.stroke} />
          {limit !== undefined && <path d={`M${size.left} ${y(limit.density)}H${right}`} stroke="var(--ink)" strokeDasharray="4 3" />}
          {curvePoints.map((point) => (
            <path key={`${point.moisture} ${point.density}`} d={`M${x(point.moisture) - 4.5} ${y(point.density)}h9m-4.5 -4.5v9`} stroke="var(--ink)" strokeWidth={1.5} />
          ))}
        </g>
        {[...tests].sort((a, b) => Number(a.current ?? false) - Number(b.current ?? false)).map((test) => {
          const edge = test.current === true && test.outcome === 'fails' && accepted !== undefined ? missedBy(test, accepted) : null
          return (
            <g key={test.id}>
              {edge !== null && (
                <path d={`M${x(test.moisture)} ${y(test.density)}L${x(edge.moisture)} ${y(edge.density)}`} stroke="var(--rework-line)" strokeWidth={2.4} />
              )}
              <TestMarkShape outcome={test.outcome} verification={test.verification ?? false} x={x(test.moisture)} y={y(test.density)} scale={big ? (test.current === true ? 0.9 : 0.6) : 0.45} />
            </g>
          )
        })}
        <g fontWeight={600} paintOrder="stroke" stroke="var(--raised)" strokeWidth={3} strokeLinejoin="round">
          {labels.map(({ id, text, fontSize, x: left, y: base }) => (
            <text key={id} x={left} y={base} fontSize={fontSize} fill={id === 'zav' ? 'var(--zav)' : id === 'axis' ? 'var(--ink-2)' : 'var(--ink)'}>
              {text}
            </text>
          ))}
        </g>
      </svg>
    </div>
  )
}
