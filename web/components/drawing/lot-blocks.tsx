import type { GroundState } from '#shared/domain/ground-state.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import { stateFill } from './state-fill.ts'

export type LotBlock = {
  /** Part of one test's volume that this block stands for, above 0 up to 1. */
  readonly share: number
  /** State of the ground its test speaks for, or `owed` where no test speaks yet. */
  readonly state: GroundState | 'owed'
  readonly near?: boolean
}

const GAP = 2
const HEIGHT = 22

function wordsOf(blocks: readonly LotBlock[]): string {
  const counts = new Map<string, number>()
  for (const { state } of blocks) {
    const word = state === 'owed' ? 'owed' : stateLook(state).word.toLowerCase()
    counts.set(word, (counts.get(word) ?? 0) + 1)
  }
  return [...counts].map(([word, count]) => `${count} ${word}`).join(', ')
}

type LotBlocksProps = {
  /** Names the lot: "Pad L10, Dec 1". */
  label: string
  blocks: readonly LotBlock[]
  /** Width of a full block and of the whole drawing at most, px. */
  blockWidth?: number
  maxWidth?: number
}

/** A lot as blocks of one test's volume. A long lot narrows its blocks; it never runs out of its column. */
export function LotBlocks({ label, blocks, blockWidth = 72, maxWidth = 520 }: LotBlocksProps) {
  const shares = blocks.map((block) => Math.min(1, Math.max(0, block.share)))
  const total = shares.reduce((sum, share) => sum + share, 0)
  const full = Math.min(blockWidth, Math.max(4, (maxWidth - 2 - GAP * blocks.length) / Math.max(1, total)))
  const widths = shares.map((share) => Math.max(1.5, full * share))
  const left = (index: number) => 1 + widths.slice(0, index).reduce((sum, width) => sum + width + GAP, 0)
  const width = Math.ceil(left(blocks.length)) + 1
  return (
    <svg
      role="img"
      aria-label={`${label}: ${blocks.length === 0 ? 'nothing placed' : wordsOf(blocks)}`}
      width={width}
      height={HEIGHT}
      viewBox={`0 0 ${width} ${HEIGHT}`}
      className="block max-w-full"
    >
      {blocks.map((block, index) => {
        const owed = block.state === 'owed'
        return (
          <rect
            key={index}
            x={left(index)}
            y={2}
            width={widths[index]}
            height={HEIGHT - 4}
            fill={block.state === 'owed' ? 'var(--raised)' : stateFill(block.state, block.near)}
            stroke={owed ? 'var(--stake)' : 'var(--ink)'}
            strokeWidth={owed ? 1.6 : 0.8}
            strokeDasharray={owed ? '4 3' : undefined}
          />
        )
      })}
    </svg>
  )
}
