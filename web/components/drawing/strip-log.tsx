import type { ReactNode } from 'react'
import { hasFlag, type GroundState } from '#shared/domain/ground-state.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'

export type StripLogRow = {
  readonly lift: number
  readonly state: GroundState
  /** Overlay bits of GROUND_FLAGS. */
  readonly flags: number
  /** The state's word where it is not the usual one: a foundation awaits its inspection. */
  readonly word?: string | undefined
  /** The result in a few words: "97.2 %", "Awaiting test"; or a link over the row that says them. */
  readonly title: ReactNode
  readonly note?: string | undefined
}

function stateWords({ state, flags, word = stateLook(state).word }: StripLogRow): string {
  const words = [word]
  if (hasFlag(flags, 'near')) words.push('near a limit')
  if (hasFlag(flags, 'covered')) words.push('covered too early')
  if (hasFlag(flags, 'hold')) words.push('on hold')
  return words.join(', ')
}

/** The lifts of one cell, top down, each block in its state with its result beside it. */
export function StripLog({ label, rows }: { label: string; rows: readonly StripLogRow[] }) {
  return (
    <ol aria-label={label} className="m-0 list-none p-0">
      {rows.map((row) => (
        <li key={row.lift} className="relative mb-[2px] grid min-h-[32px] grid-cols-[16px_34px_1fr] items-start gap-x-2 leading-[1.2]">
          <span className="num pt-[8px] text-right text-cap text-ink-2">{row.lift}</span>
          <StateSwatch
            state={row.state}
            near={hasFlag(row.flags, 'near')}
            covered={hasFlag(row.flags, 'covered')}
            size={33}
            label={stateWords(row)}
          />
          <span className="min-w-0 pt-[2px]">
            <b className="block text-small font-semibold">{row.title}</b>
            {row.note !== undefined && <span className="block text-cap text-ink-2">{row.note}</span>}
          </span>
        </li>
      ))}
    </ol>
  )
}
