import { columnOf, READABLE_KEYS, type ColumnKey } from '#shared/exchange/test-columns.ts'
import { matchHeads } from '#shared/exchange/match-heads.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { classNames } from '#web/lib/class-names.ts'
import type { OpenImport } from './use-import.ts'

const SAMPLES = 3
const CHOICES = READABLE_KEYS.map((key) => ({ key, label: columnOf(key).label }))

/** Every column of the file with what it is; a meaning given twice is taken from the column that had it. */
export function ColumnMap({ open, onChange }: { open: OpenImport; onChange: (columns: readonly (ColumnKey | null)[]) => void }) {
  const { table, settings } = open
  const { headLine, columns } = settings
  const heads = table.rows[headLine] ?? []
  const results = matchHeads(heads)
  const choose = (index: number, key: ColumnKey | null): void => onChange(columns.map((own, at) => (at === index ? key : own === key ? null : own)))
  return (
    <section className="mb-7">
      <SectionHead>Columns of the file</SectionHead>
      <ul className="m-0 list-none p-0">
        {heads.map((head, index) => {
          const key = columns[index] ?? null
          const samples = table.rows.slice(headLine + 1).flatMap((row) => ((row[index] ?? '').trim() === '' ? [] : [row[index] ?? ''])).slice(0, SAMPLES)
          return (
            <li key={index} className="grid grid-cols-1 items-center gap-x-4 gap-y-1 border-b border-rule py-[6px] sm:grid-cols-[minmax(0,1fr)_260px_minmax(0,1.2fr)]">
              <span id={`head-${index}`} className="min-w-0 font-semibold break-words">
                {head.trim() || `Column ${index + 1}`}
              </span>
              <span className="frame-focus relative flex min-h-9 items-center rounded-ctl border-[1.5px] border-rule-2 pointer-coarse:min-h-12">
                <select
                  aria-labelledby={`head-${index}`}
                  value={key ?? ''}
                  onChange={(event) => choose(index, CHOICES.find((choice) => choice.key === event.target.value)?.key ?? null)}
                  className={classNames('w-full min-w-0 appearance-none border-0 bg-transparent py-[6px] pr-8 pl-[10px] text-body [&>option]:bg-raised', key === null ? 'text-ink-2' : 'text-ink')}
                >
                  <option value="">{results[index]?.isResult === true ? 'A result, not read' : 'Not read'}</option>
                  {CHOICES.map((choice) => (
                    <option key={choice.key} value={choice.key}>
                      {choice.label}
                    </option>
                  ))}
                </select>
                <svg aria-hidden width="12" height="8" viewBox="0 0 12 8" className="pointer-events-none absolute top-1/2 right-[11px] -translate-y-1/2">
                  <path d="M1 1.5l5 5 5-5" fill="none" stroke="currentColor" strokeWidth="1.6" />
                </svg>
              </span>
              <span className="num min-w-0 truncate text-small text-ink-2">{samples.join(' · ') || 'empty'}</span>
            </li>
          )
        })}
      </ul>
    </section>
  )
}
