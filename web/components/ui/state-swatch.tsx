import type { GroundState } from '#shared/domain/ground-state.ts'
import { OVERLAY_MARKS, stateLook } from '#shared/look/ground-look.ts'
import { MARK_INK } from '#shared/look/theme.ts'
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
  const wedge = size * OVERLAY_MARKS.covered.wedgeShare
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
        <g fill="none" stroke={MARK_INK.css}>
          <rect x={edge + 1.5} y={edge + 1.5} width={size - 2 * edge - 3} height={size - 2 * edge - 3} strokeWidth={3} />
          <path d={`M${edge} ${edge}h${wedge + 3}L${edge} ${edge + wedge + 3}z`} fill={MARK_INK.css} stroke="none" />
        </g>
      )}
    </svg>
  )
}
