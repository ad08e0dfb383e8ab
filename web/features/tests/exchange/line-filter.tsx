import { classNames } from '#web/lib/class-names.ts'
import type { LineState } from './import-lines.ts'

export const STATE_WORDS: Readonly<Record<LineState, string>> = { ready: 'Ready', attention: 'Needs attention', differs: 'Differs from the record', recorded: 'Already recorded', aside: 'Set aside', waiting: 'To be checked' }
const ORDER = ['attention', 'differs', 'ready', 'recorded', 'aside'] as const

type LineFilterProps = { shown: LineState | 'all'; count: (state: LineState) => number; total: number; onShow: (state: LineState | 'all') => void }

/** How many rows stand how; pressing a figure shows those. */
export function LineFilter({ shown, count, total, onShow }: LineFilterProps) {
  const choices = [{ state: 'all' as const, label: 'All rows', n: total }, ...ORDER.map((state) => ({ state, label: STATE_WORDS[state], n: count(state) })).filter(({ n, state }) => n > 0 || state === shown)]
  return (
    <div role="group" aria-label="Rows shown" className="my-3 flex flex-wrap gap-x-4 gap-y-1 border-b border-ink">
      {choices.map(({ state, label, n }) => (
        <button
          key={state}
          type="button"
          aria-pressed={shown === state}
          onClick={() => onShow(state)}
          className={classNames('-mb-px min-h-10 border-b-[3px] px-1 font-semibold pointer-coarse:min-h-12', shown === state ? 'border-ink text-ink' : 'border-transparent text-ink-2 hover:text-ink')}
        >
          {label} <span className="num">{n.toLocaleString('en-US')}</span>
        </button>
      ))}
    </div>
  )
}
