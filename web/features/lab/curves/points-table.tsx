import type { ClipboardEvent, KeyboardEvent } from 'react'
import { Button } from '#web/components/ui/button.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { columnsOf, type EntryColumn, type EntryForm } from './entry-columns.ts'
import { guessColumns, pasteInto, readGrid, rowsOf } from './paste-grid.ts'
import { PointRow } from './point-row.tsx'
import { EMPTY_ROW, MOST_ROWS, type ReadEntry } from './read-entry.ts'

type PointsTableProps = { form: EntryForm; read: ReadEntry; onChange: (rows: EntryForm['rows']) => void; onAskPaste: () => void }

const STEPS: Readonly<Record<string, 1 | -1>> = { Enter: 1, ArrowDown: 1, ArrowUp: -1 }

/** Enter and the arrows go to the same column of the next row or the one before. */
function handleKeys(event: KeyboardEvent<HTMLInputElement>): void {
  const step = STEPS[event.key]
  if (step === undefined) return
  event.preventDefault()
  const cell = event.currentTarget.closest('td')
  const row = cell?.parentElement
  const next = step === 1 ? row?.nextElementSibling : row?.previousElementSibling
  const target = next?.children[[...(row?.children ?? [])].indexOf(cell as Element)]?.querySelector('input')
  target?.focus()
  target?.select()
}

/** The laboratory's specimens; a block copied from a spreadsheet can be pasted into any place. What each row comes to stands at its end. */
export function PointsTable({ form, read, onChange, onAskPaste }: PointsTableProps) {
  const { units } = useSite()
  const { rows } = form
  const columns = columnsOf(form)
  const calculated = [...(form.moistureBy === 'stated' ? [] : ['Moisture, %']), ...(form.kind === 'dry' && form.moistureBy === 'stated' ? [] : [`Dry, ${units.marks.density}`])]
  const resultsOf = (index: number): string[] => {
    const point = read.worked[index]
    if (point === undefined) return calculated.map(() => '')
    return [...(form.moistureBy === 'stated' ? [] : [units.number(point.moisture, 1)]), units.densityNumber(point.dryDensity)].slice(0, calculated.length)
  }
  const handlePaste = (index: number, column: EntryColumn) => (event: ClipboardEvent<HTMLInputElement>) => {
    const grid = readGrid(event.clipboardData.getData('text'))
    if (grid.lines.length === 0 || (grid.lines.length === 1 && grid.lines[0]?.length === 1 && grid.heads === null)) return
    event.preventDefault()
    onChange(pasteInto(rows, index, rowsOf(grid, guessColumns(grid, form, column))).slice(0, MOST_ROWS))
  }
  return (
    <div>
      <div className="relative overflow-x-auto" role="region" aria-label="Specimens" tabIndex={0}>
        <table className="w-full border-collapse">
          <caption className="pb-1 text-left text-small font-medium text-ink-2">Paste a block from a spreadsheet into any place. Enter and the arrows move down and up.</caption>
          <thead>
            <tr className="text-small text-ink-2">
              <th scope="col" className="sticky left-0 z-[1] border-b border-ink bg-raised py-1 text-left font-medium">
                No.
              </th>
              {columns.map(({ key, head, unit }) => (
                <th key={key} scope="col" className="border-b border-ink py-1 pr-[10px] pl-2 text-right align-bottom font-medium">
                  {head}, {unit}
                </th>
              ))}
              {calculated.map((head) => (
                <th key={head} scope="col" className="border-b border-ink bg-film py-1 pr-[10px] pl-2 text-right align-bottom font-medium">
                  {head}
                </th>
              ))}
              <th scope="col" className="border-b border-ink">
                <span className="sr-only">Remove</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row, index) => (
              <PointRow
                key={index}
                number={index + 1}
                row={row}
                columns={columns}
                results={resultsOf(index)}
                error={read.errors[index]}
                onKeys={handleKeys}
                onPaste={(column) => handlePaste(index, column)}
                onType={(column, text) => onChange(rows.map((each, at) => (at === index ? { ...each, [column]: text } : each)))}
                onRemove={() => onChange(rows.filter((_, each) => each !== index))}
              />
            ))}
          </tbody>
        </table>
      </div>
      <div className="mt-2 flex flex-wrap gap-2">
        <Button className="pointer-coarse:min-h-11" disabled={rows.length >= MOST_ROWS} onClick={() => onChange([...rows, EMPTY_ROW])}>
          Add a specimen
        </Button>
        <Button className="pointer-coarse:min-h-11" onClick={onAskPaste}>Paste or read a file</Button>
      </div>
    </div>
  )
}
