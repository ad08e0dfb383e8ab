import { GROUND_STATES } from '#shared/domain/ground-state.ts'
import { STIPPLE_DOTS, stateLook, type Hatch, type HatchKind } from '#shared/look/ground-look.ts'
import { hatchId } from './state-fill.ts'

/** Strokes run past the tile so that the ends of slanting lines meet across its corners. */
function hatchPath(kind: HatchKind, spacing: number): string {
  const s = spacing
  const rising = `M-2 ${s + 2}L${s + 2} -2M-2 2L2 -2M${s - 2} ${s + 2}L${s + 2} ${s - 2}`
  const falling = `M-2 -2L${s + 2} ${s + 2}M-2 ${s - 2}L2 ${s + 2}M${s - 2} -2L${s + 2} 2`
  switch (kind) {
    case 'diagonals':
    case 'sparse-diagonals':
      return rising
    case 'cross-hatch':
      return rising + falling
    case 'horizontals':
      return `M0 ${s / 2}h${s}`
    case 'thin-verticals':
    case 'verticals':
      return `M${s / 2} 0v${s}`
    case 'stipple':
    case 'none':
      return ''
  }
}

function HatchMarks({ hatch }: { hatch: Hatch }) {
  const { kind, spacing, stroke, mark } = hatch
  if (kind === 'stipple') {
    return STIPPLE_DOTS.map(([x, y, radius]) => (
      <circle key={`${x} ${y}`} cx={x * spacing} cy={y * spacing} r={radius * spacing} fill={mark.css} />
    ))
  }
  return <path d={hatchPath(kind, spacing)} stroke={mark.css} strokeWidth={stroke} fill="none" />
}

/** The patterns of every state, once in the page; drawings refer to them by stateFill. */
export function HatchDefs() {
  const states = GROUND_STATES.filter((state) => state !== 'none' && state !== 'not-placed')
  return (
    <svg aria-hidden width={0} height={0} className="absolute">
      <defs>
        {states.flatMap((state) =>
          [false, true].map((near) => {
            const look = stateLook(state)
            // The product of two spacings is a tile that both repeat in without a seam.
            const tile = near ? look.hatch.spacing * look.nearHatch.spacing : look.hatch.spacing
            return (
              <pattern key={hatchId(state, near)} id={hatchId(state, near)} width={tile} height={tile} patternUnits="userSpaceOnUse">
                <rect width={tile} height={tile} fill={look.fill.css} />
                {tiles(tile, look.hatch.spacing).map(([x, y]) => (
                  <g key={`${x} ${y}`} transform={`translate(${x} ${y})`}>
                    <HatchMarks hatch={look.hatch} />
                  </g>
                ))}
                {near && <path d={nearPath(tile, look.nearHatch.spacing)} stroke={look.nearHatch.mark.css} strokeWidth={look.nearHatch.stroke} />}
              </pattern>
            )
          }),
        )}
      </defs>
    </svg>
  )
}

function tiles(side: number, step: number): readonly (readonly [number, number])[] {
  const count = Math.round(side / step)
  return Array.from({ length: count * count }, (_, index) => [(index % count) * step, Math.floor(index / count) * step] as const)
}

function nearPath(side: number, spacing: number): string {
  return Array.from({ length: Math.round(side / spacing) }, (_, index) => `M0 ${(index + 0.5) * spacing}h${side}`).join('')
}
