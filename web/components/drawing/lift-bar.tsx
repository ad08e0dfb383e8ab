import type { GroundState } from '#shared/domain/ground-state.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import { stateFill } from './state-fill.ts'

export type LiftShare = { readonly state: GroundState; readonly share: number }

type LiftBarProps = {
  lift: number
  /** Shares of the lift's cells by state, left to right; together 1, or less where the rest is not placed. */
  shares: readonly LiftShare[]
  width?: number
  height?: number
  selected?: boolean
}

/** Below this share of the block the label sits on more than one state and takes a plate of its own. */
const SETTLED = 0.62

/** One lift as a block of the lift rail, its states side by side, its number in the middle. */
export function LiftBar({ lift, shares, width = 58, height = 44, selected = false }: LiftBarProps) {
  const shown = shares.filter(({ share }) => share > 0)
  const empty = shown.every(({ state }) => state === 'not-placed' || state === 'none')
  const first = shown[0]
  const onFirst = first !== undefined && first.share >= SETTLED && !empty
  const hatched = first !== undefined && stateLook(first.state).hatch.kind !== 'none'
  const plate = !empty && (!onFirst || hatched)
  return (
    <svg aria-hidden width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="block">
      <rect width={width} height={height} fill={stateFill('not-placed')} />
      {shown.map(({ state, share }, index) => {
        const start = shown.slice(0, index).reduce((sum, each) => sum + each.share, 0)
        return <rect key={state} x={start * width} width={share * width} height={height} fill={stateFill(state)} />
      })}
      <rect
        x={0.5}
        y={0.5}
        width={width - 1}
        height={height - 1}
        fill="none"
        stroke={empty ? 'var(--ink-3)' : 'var(--ink)'}
        strokeWidth={selected ? 4 : 0.8}
        strokeDasharray={empty && !selected ? '2 3' : undefined}
      />
      {plate && <rect x={width / 2 - 11} y={height / 2 - 9} width={22} height={18} fill="var(--raised)" />}
      <text
        x={width / 2}
        y={height / 2 + 4.5}
        textAnchor="middle"
        fontSize={12.5}
        fontWeight={700}
        fill={onFirst && !plate ? stateLook(first.state).label.css : 'var(--ink)'}
      >
        {lift}
      </text>
    </svg>
  )
}
