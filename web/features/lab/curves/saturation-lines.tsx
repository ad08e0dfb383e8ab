import type { ScaleLinear } from 'd3-scale'
import { line } from 'd3-shape'
import { saturationLineDensity } from '#shared/domain/phase-relations.ts'
import { labelAlong, type Spot } from './label-along.ts'

/** Lines of equal saturation: full, and two beside it that a good curve runs along. Told apart by weight, dash and word. */
const LINES = [
  { percent: 100, weight: 1.8, dash: '8 4', words: (gs: number) => `zero air voids, Gs ${gs}` },
  { percent: 90, weight: 1.1, dash: '10 3 2 3', words: () => '90 % saturated' },
  { percent: 80, weight: 1.1, dash: '2 3', words: () => '80 %' },
] as const
const STEPS = 120

type Frame = { readonly left: number; readonly right: number; readonly top: number; readonly bottom: number }
type SaturationLinesProps = {
  gs: number
  waterDensity: number
  x: ScaleLinear<number, number>
  /** of a density in kg/m³ */
  yOf: (dryDensity: number) => number
  frame: Frame
  fontSize: number
  /** what the labels keep away from */
  obstacles: readonly Spot[]
  clip: string
  /** colour of what the plot lies on; a line is broken by its label */
  ground: string
}

export function SaturationLines({ gs, waterDensity, x, yOf, frame, fontSize, obstacles, clip, ground }: SaturationLinesProps) {
  const draw = line<Spot>((spot) => spot.x, (spot) => spot.y)
  const lines = LINES.map(({ percent, weight, dash, words }) => {
    const run = Array.from({ length: STEPS + 1 }, (_, i): Spot => {
      const at = frame.left + (i / STEPS) * (frame.right - frame.left)
      return { x: at, y: yOf(saturationLineDensity(x.invert(at), percent, gs, waterDensity)) }
    })
    const seen = run.filter((spot) => spot.y >= frame.top && spot.y <= frame.bottom)
    const text = words(gs)
    return { percent, weight, dash, run, text, label: labelAlong(seen, text, fontSize, obstacles) }
  })
  return (
    <>
      <g clipPath={clip} fill="none" stroke="var(--zav)">
        {lines.map(({ percent, weight, dash, run }) => (
          <path key={percent} d={draw(run) ?? ''} strokeWidth={weight} strokeDasharray={dash} />
        ))}
      </g>
      <g fontSize={fontSize} fontWeight={600} textAnchor="middle" fill="var(--zav)">
        {lines.map(({ percent, text, label }) =>
          label === null ? null : (
            <g key={percent} transform={`translate(${label.x} ${label.y}) rotate(${label.angle})`}>
              <rect x={-0.44 * label.width} y={-fontSize * 0.6} width={0.88 * label.width} height={fontSize * 1.2} fill={ground} />
              <text dy="0.32em">{text}</text>
            </g>
          ),
        )}
      </g>
    </>
  )
}
