import { useState } from 'react'
import { Button } from '#web/components/ui/button.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CellFixes } from './cell-fixes.tsx'
import { STATE_WORDS } from './line-filter.tsx'
import type { LookedLine } from './line-list.tsx'
import { placeWords, verdictWords } from './line-words.ts'
import type { Importing } from './use-import.ts'

type LineItemProps = { looked: LookedLine; importing: Importing }

const QUIET = 'min-h-8 font-semibold underline decoration-1 underline-offset-3 hover:decoration-2 pointer-coarse:min-h-12'

/** One row: what it is, how it stands, and its cells to correct. */
export function LineItem({ looked, importing }: LineItemProps) {
  const { units, label } = useSite()
  const { line, previewed, state, problems } = looked
  const [opened, setOpened] = useState(false)
  const needs = state === 'attention' || state === 'differs'
  const result = previewed?.verdict ?? null
  return (
    <li className="border-b border-rule py-2">
      <div className="grid grid-cols-1 items-baseline gap-x-4 gap-y-[2px] md:grid-cols-[150px_minmax(0,1.3fr)_minmax(0,1.7fr)_148px]">
        <span className="font-semibold">
          Line <span className="num">{line.line}</span>
          {line.reference !== '' && <span className="font-medium text-ink-2">, {line.reference}</span>}
        </span>
        <span className="min-w-0 text-ink-2">{placeWords(line, previewed, label, units)}</span>
        <span className={classNames('min-w-0', line.aside !== null && 'text-ink-2')}>
          <b className={classNames('font-semibold', needs && 'text-bad', state === 'waiting' && 'text-ink-2')}>{STATE_WORDS[state]}</b>
          {state === 'recorded' && typeof previewed?.number === 'string' && ` as ${previewed.number}`}
          {result !== null && state === 'ready' && `. ${verdictWords(result, units)}`}
          {line.aside !== null && `: ${line.aside}`}
        </span>
        <span className="flex flex-wrap gap-x-4 md:justify-end">
          {line.aside === null && state !== 'recorded' && (
            <button type="button" className={QUIET} aria-expanded={opened || needs} onClick={() => setOpened(!opened)} hidden={needs}>
              {opened ? 'Close' : 'Correct'}
            </button>
          )}
          {state !== 'recorded' && (
            <button type="button" className={QUIET} onClick={() => importing.setAside([line.line], line.aside === null ? (problems[0]?.message ?? 'Set aside by hand') : null)}>
              {line.aside === null ? 'Set aside' : 'Take back'}
            </button>
          )}
        </span>
      </div>
      {state === 'ready' && previewed !== undefined && previewed.flags.length > 0 && <p className="m-0 mt-1 text-small font-medium text-warn">{previewed.flags.join(' ')}</p>}
      {line.aside === null && (needs || opened) && <CellFixes key={problems.map(({ column }) => column).join()} line={line} problems={problems} onEdit={(key, text) => importing.edit(line.line, key, text)} />}
      {previewed?.twin === true && needs && (
        <Button onClick={() => importing.sayAnother(line.line)} className="mt-2 pointer-coarse:min-h-12">
          It is another test
        </Button>
      )}
    </li>
  )
}
