import type { GridPoint } from '#shared/domain/site-geometry.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { stateFill } from '#web/components/drawing/state-fill.ts'
import { useMeasuredWidth } from '#web/components/drawing/use-measured-width.ts'
import { cellRangeWords } from '#web/lib/cell-range.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { layOutOrder, type OrderLayout, type PlanEdge } from './order-plan-geometry.ts'
import { groundOf } from './order-words.ts'

const PITCH = 6

/** An ink line with strokes on its low side; longer and heavier where a fall is open. */
function StepEdge({ edge, side }: { edge: PlanEdge; side: number }) {
  const { x, y, upright, low, open } = edge
  const [long, short] = open ? [11, 6] : [5, 2.6]
  const ticks = Array.from({ length: Math.floor(side / PITCH) }, (_, index) => {
    const along = (index + 0.5) * PITCH
    const reach = low * (index % 2 === 0 ? short : long)
    return upright ? `M${x} ${y + along}h${reach}` : `M${x + along} ${y}v${reach}`
  }).join('')
  return (
    <g stroke="var(--ink)" fill="none">
      <path d={upright ? `M${x} ${y}v${side}` : `M${x} ${y}h${side}`} strokeWidth={open ? 2 : 1.3} />
      <path d={ticks} strokeWidth={open ? 1.2 : 0.7} />
    </g>
  )
}

/** Where the person stands, the arrow turned to the work; outside the drawing it waits at its edge. */
function You({ layout, at, words, width, height }: { layout: OrderLayout; at: GridPoint; words: string; width: number; height: number }) {
  const there = layout.place(at)
  const x = Math.min(width - 46, Math.max(46, there.x))
  const y = Math.min(height - 46, Math.max(24, there.y))
  const turn = (Math.atan2(layout.centre.x - there.x, there.y - layout.centre.y) * 180) / Math.PI
  return (
    <g>
      <g transform={`translate(${x} ${y}) rotate(${turn})`}>
        <circle r={17} fill="#fff" stroke="#10191f" strokeWidth={1.5} />
        <path d="M0-12L8 9L0 4L-8 9Z" fill="#10191f" />
      </g>
      <text x={x} y={y + 40} textAnchor="middle" fontSize={13} fontWeight={600} fill="var(--ink)" paintOrder="stroke" stroke="var(--film)" strokeWidth={4} strokeLinejoin="round">
        {words}
      </text>
    </g>
  )
}

type OrderPlanProps = {
  order: Order
  sheet: GroundSheet | undefined
  height?: number
  you?: { readonly at: GridPoint; readonly words: string } | null
}

/** The order's cells and the ground around them: states, labels, and where it falls away. */
export function OrderPlan({ order, sheet, height = 268, you = null }: OrderPlanProps) {
  const { site, lookup, label } = useSite()
  const [ref, width] = useMeasuredWidth(376)
  const layout = layOutOrder({ cells: order.cells, lift: order.lift, state: groundOf(order), lookup, grid: site.grid, sheet, width, height })
  const { side, squares, edges } = layout
  const words = `Plan of ${order.number}: cells ${cellRangeWords(lookup, order.cells)}, ${stateLook(groundOf(order)).word.toLowerCase()}`
  return (
    <div ref={ref} className="w-full overflow-hidden bg-film">
      <svg role="img" aria-label={words} width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="block">
        {squares.map(({ cell, x, y, state, near, own }) => (
          <rect key={cell} x={x} y={y} width={side} height={side} fill={stateFill(state, near)} fillOpacity={own ? 1 : 0.75} stroke="var(--film)" strokeWidth={0.8} strokeOpacity={0.6} />
        ))}
        {edges.map((edge) => (
          <StepEdge key={`${edge.x} ${edge.y} ${edge.upright}`} edge={edge} side={side} />
        ))}
        {squares
          .filter((square) => square.own)
          .map(({ cell, x, y }) => (
            <g key={cell}>
              <rect x={x} y={y} width={side} height={side} fill="none" stroke="#10191f" strokeWidth={1.4} />
              {side >= 26 && (
                <text x={x + side / 2} y={y + side / 2 + side * 0.1} textAnchor="middle" fontSize={side >= 44 ? 15 : side * 0.34} fontWeight={800} fill="#fff" paintOrder="stroke" stroke="#5c1f07" strokeWidth={4} strokeLinejoin="round">
                  {label(cell)}
                </text>
              )}
            </g>
          ))}
        {you !== null && <You layout={layout} at={you.at} words={you.words} width={width} height={height} />}
      </svg>
    </div>
  )
}
