import type { ClipboardEvent, KeyboardEvent } from 'react'
import type { ColumnWords, EntryColumn, EntryRow } from './entry-columns.ts'
import type { RowProblem } from './read-entry.ts'

const INPUT = 'num w-full min-w-[5.5rem] bg-transparent px-[10px] pt-[9px] pb-[7px] text-right text-entry text-ink min-h-10 pointer-coarse:min-h-12'
/** As high as the inputs beside it. */
const LINE = 'flex min-h-10 items-center pt-[2px] pointer-coarse:min-h-12'

type PointRowProps = {
  number: number
  row: EntryRow
  columns: readonly ColumnWords[]
  /** what the row comes to, blank where it cannot be worked out yet */
  results: readonly string[]
  error: RowProblem | undefined
  onKeys: (event: KeyboardEvent<HTMLInputElement>) => void
  onPaste: (column: EntryColumn) => (event: ClipboardEvent<HTMLInputElement>) => void
  onType: (column: EntryColumn, text: string) => void
  onRemove: () => void
}

/** One specimen as typed, what it comes to, and what keeps it from being a point. */
export function PointRow({ number, row, columns, results, error, onKeys, onPaste, onType, onRemove }: PointRowProps) {
  const words = error === undefined ? undefined : `point-${number}-error`
  return (
    <tr className="border-b border-rule align-top">
      <th scope="row" className="num sticky left-0 z-[1] w-8 bg-raised text-left font-medium text-ink-2">
        <span className={LINE}>{number}</span>
      </th>
      {columns.map(({ key, name, unit }, at) => (
        <td key={key} className={`frame-focus ${at > 0 ? 'border-l border-rule' : ''}`}>
          <input
            inputMode="decimal"
            autoComplete="off"
            aria-label={`Point ${number}, ${name}, ${unit === '%' ? 'percent' : unit}`}
            aria-invalid={error?.column === key || undefined}
            aria-describedby={words}
            className={INPUT}
            value={row[key] ?? ''}
            onKeyDown={onKeys}
            onPaste={onPaste(key)}
            onChange={(event) => onType(key, event.target.value)}
          />
          {error !== undefined && (error.column === key || (error.column === null && at === 0)) && (
            <p id={words} className="m-0 px-[10px] pb-1 text-small font-medium text-bad">
              {error.message}
            </p>
          )}
        </td>
      ))}
      {results.map((result, at) => (
        <td key={at} className="num min-w-[4.5rem] border-l border-rule bg-film px-[10px] text-entry">
          <span className={`${LINE} justify-end`}>{result}</span>
        </td>
      ))}
      <td className="w-16 border-l border-rule text-center">
        <button type="button" aria-label={`Remove point ${number}`} className="link-ink min-h-10 px-2 text-small pointer-coarse:min-h-12" onClick={onRemove}>
          Remove
        </button>
      </td>
    </tr>
  )
}
