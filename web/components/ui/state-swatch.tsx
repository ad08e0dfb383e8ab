import { stateLook } from '#shared/look/ground-look.ts'
import type { GroundState } from '#shared/domain/ground-state.ts'
import { stateFill } from '#web/components/drawing/state-fill.ts'

type StateSwatchProps = {
  state: GroundState
  near?: boolean
  covered?: boolean
  size?: number
  /** Without it the swatch only repeats words beside it and is hidden from readers. */
  label?: string
}

/** A square of ground in its state: colour, hatch and edge. */
export function StateSwatch({ state, near = false, covered = false, size = 20, label }: StateSwatchProps) {
  const bare = state === 'not-placed' || state === 'none'
  const edge = size >= 48 ? 2 : 0.9
  const wedge = size * 0.32
  return (
    <svg
      width={size}
      height={size}
      viewBox={`0 0 ${size} ${size}`}
      className="block shrink-0"
      {...(label === undefined ? { 'aria-hidden': true } : { role: 'img', 'aria-label': label })}
      data-state={state}
      data-word={stateLook(state).word}
    >
      <rect
        x={edge / 2}
        y={edge / 2}
        width={size - edge}
        height={size - edge}
        fill={stateFill(state, near)}
        stroke={bare ? 'var(--ink-3)' : 'var(--ink)'}
        strokeWidth={edge}
        strokeDasharray={bare ? '2 3' : undefined}
      />
      {covered && (
        <g fill="none" stroke="var(--ink)">
          <rect x={1.5} y={1.5} width={size - 3} height={size - 3} strokeWidth={3} />
          <path d={`M0 0h${wedge + 3}L0 ${wedge + 3}z`} fill="var(--ink)" stroke="none" />
        </g>
      )}
    </svg>
  )
}
