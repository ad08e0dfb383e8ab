import type { ScaleLinear } from 'd3-scale'

type PlotAxesProps = {
  x: ScaleLinear<number, number>
  y: ScaleLinear<number, number>
  left: number
  right: number
  top: number
  bottom: number
  fontSize: number
  grid: boolean
  xLabel: string
}

/** Two axes with their figures. The drawing keeps half a figure's width free at the right, so that the last is never cut off. */
export function PlotAxes({ x, y, left, right, top, bottom, fontSize, grid, xLabel }: PlotAxesProps) {
  const xTicks = x.ticks(Math.min(8, Math.max(2, Math.floor((right - left) / (fontSize * 2.6)))))
  const yTicks = y.ticks(Math.max(2, Math.floor((bottom - top) / (fontSize * 5))))
  const yFormat = y.tickFormat(yTicks.length)
  return (
    <g fontSize={fontSize} fill="var(--ink-2)">
      {grid && (
        <g stroke="var(--rule)">
          {xTicks.map((tick) => (
            <path key={tick} d={`M${x(tick)} ${top}V${bottom}`} />
          ))}
          {yTicks.map((tick) => (
            <path key={tick} d={`M${left} ${y(tick)}H${right}`} />
          ))}
        </g>
      )}
      <g fontFamily="var(--font-mono)">
        {xTicks.map((tick) => (
          <text key={tick} x={x(tick)} y={bottom + fontSize * 1.3} textAnchor="middle">
            {tick}
          </text>
        ))}
        {yTicks.map((tick) => (
          <text key={tick} x={left - 6} y={Math.max(y(tick) + fontSize * 0.33, top + fontSize * 0.8)} textAnchor="end">
            {yFormat(tick)}
          </text>
        ))}
      </g>
      <path d={`M${left} ${top}V${bottom}H${right}`} fill="none" stroke="var(--ink-2)" />
      <text x={(left + right) / 2} y={bottom + fontSize * 2.6} textAnchor="middle" fontWeight={500}>
        {xLabel}
      </text>
    </g>
  )
}
