import type { ClipboardEvent, KeyboardEvent } from 'react'
import { Button } from '#web/components/ui/button.tsx'
import { columnsOf, type EntryColumn, type EntryForm } from './entry-columns.ts'
import { guessColumns, pasteInto, readGrid, rowsOf } from './paste-grid.ts'
import { EMPTY_ROW, type RowProblem } from './read-entry.ts'

export const MOST_ROWS = 40
const INPUT = 'num w-full min-w-[5.5rem] bg-transparent px-[10px] pt-[9px] pb-[7px] text-right text-entry text-ink min-h-10 pointer-coarse:min-h-12'

type PointsTableProps = { form: EntryForm; errors: readonly (RowProblem | undefined)[]; onChange: (rows: EntryForm['rows']) => void }

/** Enter and the arrows go to the same column of the next row or the one before. */
function handleKeys(event: KeyboardEvent<HTMLInputElement>): void {
  const step = event.key === 'Enter' || event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0
  if (step === 0) return
  event.preventDefault()
  const cell = event.currentTarget.closest('td')
  const row = cell?.parentElement
  const next = step === 1 ? row?.nextElementSibling : row?.previousElementSibling
  next?.children[[...(row?.children ?? [])].indexOf(cell as Element)]?.querySelector('input')?.focus()
}

/** The laboratory's specimens; a block copied from a spreadsheet can be pasted into any place. */
export function PointsTable({ form, errors, onChange }: PointsTableProps) {
  const { rows } = form
  const columns = columnsOf(form)
  const set = (index: number, column: EntryColumn, text: string) => onChange(rows.map((row, at) => (at === index ? { ...row, [column]: text } : row)))
  const handlePaste = (index: number, column: EntryColumn) => (event: ClipboardEvent<HTMLInputElement>) => {
    const grid = readGrid(event.clipboardData.getData('text'))
    if (grid.lines.length === 0 || (grid.lines.length === 1 && grid.lines[0]?.length === 1 && grid.heads === null)) return
    event.preventDefault()
    onChange(pasteInto(rows, index, rowsOf(grid, guessColumns(grid, form, column))).slice(0, MOST_ROWS))
  }
  return (
    <div>
      <div className="overflow-x-auto" role="region" aria-label="Specimens" tabIndex={0}>
        <table className="w-full border-collapse">
          <caption className="pb-1 text-left text-small font-medium text-ink-2">Specimens. A block can be pasted from a spreadsheet, heads and all.</caption>
          <thead>
            <tr className="text-small text-ink-2">
              <th scope="col" className="border-b border-ink py-1 text-left font-medium">
                No.
              </th>
              {columns.map(({ key, head, unit }) => (
                <th key={key} scope="col" className="border-b border-ink py-1 pr-[10px] pl-2 text-right font-medium">
                  {head}, {unit}
                </th>
              ))}
              <th scope="col" className="border-b border-ink">
                <span className="sr-only">Remove</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row, index) => {
              const error = errors[index]
              const words = error === undefined ? undefined : `point-${index}-error`
              return (
                <tr key={index} className="border-b border-rule align-top">
                  <th scope="row" className="num w-8 py-[9px] text-left font-medium text-ink-2">
                    {index + 1}
                  </th>
                  {columns.map(({ key, name, unit }, at) => (
                    <td key={key} className={`frame-focus ${at > 0 ? 'border-l border-rule' : ''}`}>
                      <input
                        inputMode="decimal"
                        autoComplete="off"
                        aria-label={`Point ${index + 1}, ${name}, ${unit === '%' ? 'percent' : unit}`}
                        aria-invalid={error?.column === key || undefined}
                        aria-describedby={words}
                        className={INPUT}
                        value={row[key] ?? ''}
                        onKeyDown={handleKeys}
                        onPaste={handlePaste(index, key)}
                        onChange={(event) => set(index, key, event.target.value)}
                      />
                      {error !== undefined && (error.column === key || (error.column === null && at === 0)) && (
                        <p id={words} className="m-0 px-[10px] pb-1 text-small font-medium text-bad">
                          {error.message}
                        </p>
                      )}
                    </td>
                  ))}
                  <td className="w-16 border-l border-rule text-center">
                    <button type="button" aria-label={`Remove point ${index + 1}`} className="link-ink py-[9px] text-small pointer-coarse:min-h-12" onClick={() => onChange(rows.filter((_, each) => each !== index))}>
                      Remove
                    </button>
                  </td>
                </tr>
              )
            })}
          </tbody>
        </table>
      </div>
      <Button kind="quiet" disabled={rows.length >= MOST_ROWS} onClick={() => onChange([...rows, EMPTY_ROW])}>
        Add a point
      </Button>
    </div>
  )
}
