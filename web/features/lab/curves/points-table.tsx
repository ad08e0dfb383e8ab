import type { ClipboardEvent } from 'react'
import { Button } from '#web/components/ui/button.tsx'
import { useUnits } from '#web/lib/site-context.tsx'
import { EMPTY_ROW, pasteInto, rowsFromPaste, type PointRow } from './curve-form.ts'

const MOST = 40
const INPUT = 'num w-full min-w-0 bg-transparent px-[10px] pt-[9px] pb-[7px] text-right text-entry text-ink min-h-10 pointer-coarse:min-h-12'

type PointsTableProps = { rows: readonly PointRow[]; errors: readonly (string | undefined)[]; onChange: (rows: readonly PointRow[]) => void }

/** The laboratory's points; two columns copied from a spreadsheet can be pasted into any row. */
export function PointsTable({ rows, errors, onChange }: PointsTableProps) {
  const units = useUnits()
  const set = (index: number, change: Partial<PointRow>) => onChange(rows.map((row, at) => (at === index ? { ...row, ...change } : row)))
  const handlePaste = (index: number) => (event: ClipboardEvent<HTMLInputElement>) => {
    const pasted = rowsFromPaste(event.clipboardData.getData('text'))
    if (pasted.length === 0) return
    event.preventDefault()
    onChange(pasteInto(rows, index, pasted).slice(0, MOST))
  }
  return (
    <div>
      <table className="w-full border-collapse">
        <caption className="pb-1 text-left text-small font-medium text-ink-2">Points. Two columns can be pasted from a spreadsheet.</caption>
        <thead>
          <tr className="text-small text-ink-2">
            <th scope="col" className="border-b border-ink py-1 text-left font-medium">
              No.
            </th>
            <th scope="col" className="border-b border-ink py-1 pr-[10px] text-right font-medium">
              Moisture, %
            </th>
            <th scope="col" className="border-b border-ink py-1 pr-[10px] text-right font-medium">
              Dry, {units.marks.density}
            </th>
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
              <tr key={index} className="border-b border-rule">
                <th scope="row" className="num w-8 text-left font-medium text-ink-2">
                  {index + 1}
                </th>
                <td className="frame-focus">
                  <input inputMode="decimal" autoComplete="off" aria-label={`Point ${index + 1}, moisture, percent`} aria-invalid={error !== undefined || undefined} aria-describedby={words} className={INPUT} value={row.moisture} onPaste={handlePaste(index)} onChange={(event) => set(index, { moisture: event.target.value })} />
                </td>
                <td className="frame-focus border-l border-rule">
                  <input inputMode="decimal" autoComplete="off" aria-label={`Point ${index + 1}, dry unit weight, ${units.marks.density}`} aria-invalid={error !== undefined || undefined} aria-describedby={words} className={INPUT} value={row.density} onPaste={handlePaste(index)} onChange={(event) => set(index, { density: event.target.value })} />
                  {error !== undefined && (
                    <p id={words} className="m-0 px-[10px] pb-1 text-small font-medium text-bad">
                      {error}
                    </p>
                  )}
                </td>
                <td className="w-16 border-l border-rule text-center">
                  <button type="button" aria-label={`Remove point ${index + 1}`} className="link-ink text-small pointer-coarse:min-h-12" onClick={() => onChange(rows.filter((_, at) => at !== index))}>
                    Remove
                  </button>
                </td>
              </tr>
            )
          })}
        </tbody>
      </table>
      <Button kind="quiet" disabled={rows.length >= MOST} onClick={() => onChange([...rows, EMPTY_ROW])}>
        Add a point
      </Button>
    </div>
  )
}
