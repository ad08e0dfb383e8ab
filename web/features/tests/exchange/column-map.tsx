import { columnOf, READABLE_KEYS, type ColumnKey } from '#shared/exchange/test-columns.ts'
import { matchHeads } from '#shared/exchange/match-heads.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { headUnitsOf } from './file-settings.ts'
import type { OpenImport } from './use-import.ts'

const SAMPLES = 3
const CHOICES = READABLE_KEYS.map((key) => ({ key, label: columnOf(key).label }))

/** Every column of the file with what it is; a meaning given twice is taken from the column that had it. */
export function ColumnMap({ open, onChange }: { open: OpenImport; onChange: (columns: readonly (ColumnKey | null)[]) => void }) {
  const { table, settings } = open
  const { headLine, columns } = settings
  const heads = table.rows[headLine] ?? []
  const units = headUnitsOf(table.rows, settings)
  const results = matchHeads(heads)
  const choose = (index: number, key: ColumnKey | null): void => onChange(columns.map((own, at) => (at === index ? key : own === key ? null : own)))
  return (
    <section className="mb-7">
      <SectionHead>Columns of the file</SectionHead>
      <ul className="m-0 list-none p-0">
        {heads.map((head, index) => {
          const key = columns[index] ?? null
          const unit = key === null ? undefined : (units[key] ?? columnOf(key).unit)
          const samples = table.rows.slice(headLine + 1).flatMap((row) => ((row[index] ?? '').trim() === '' ? [] : [row[index] ?? ''])).slice(0, SAMPLES)
          return (
            <li key={index} className="grid grid-cols-1 items-center gap-x-4 gap-y-1 border-b border-rule py-[6px] sm:grid-cols-[minmax(0,1fr)_260px_minmax(0,1.2fr)]">
              <span id={`head-${index}`} className="min-w-0 font-semibold break-words">
                {head.trim() || `Column ${index + 1}`}
              </span>
              <span className="frame-focus flex min-h-9 items-center rounded-ctl border-[1.5px] border-rule-2 pointer-coarse:min-h-12">
                <select
                  aria-labelledby={`head-${index}`}
                  value={key ?? ''}
                  onChange={(event) => choose(index, CHOICES.find((choice) => choice.key === event.target.value)?.key ?? null)}
                  className={classNames('w-full min-w-0 border-0 bg-transparent px-[10px] py-[6px] text-body [&>option]:bg-raised', key === null ? 'text-ink-2' : 'text-ink')}
                >
                  <option value="">{results[index]?.isResult === true ? 'A result, not read' : 'Not read'}</option>
                  {CHOICES.map((choice) => (
                    <option key={choice.key} value={choice.key}>
                      {choice.label}
                    </option>
                  ))}
                </select>
                {unit !== undefined && <span className="shrink-0 pr-[10px] text-small font-medium text-ink-2">{unit}</span>}
              </span>
              <span className="num min-w-0 truncate text-small text-ink-2">{samples.join(' · ') || 'empty'}</span>
            </li>
          )
        })}
      </ul>
    </section>
  )
}
