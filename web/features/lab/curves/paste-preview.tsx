import { columnsOf, type EntryColumn, type EntryForm } from './entry-columns.ts'
import type { Grid } from './paste-grid.ts'

type PastePreviewProps = { form: EntryForm; grid: Grid; columns: readonly (EntryColumn | null)[]; /** what keeps a row out */ marks: readonly (string | null)[]; onColumns: (columns: readonly (EntryColumn | null)[]) => void }

/** The block as it was read: which column each place is, and whether each row is ready. */
export function PastePreview({ form, grid, columns, marks, onColumns }: PastePreviewProps) {
  const words = columnsOf(form)
  const choose = (place: number, key: string) => onColumns(columns.map((column, at) => (at === place ? (words.find((each) => each.key === key)?.key ?? null) : column === key ? null : column)))
  return (
    <div className="relative overflow-x-auto" role="region" aria-label="Preview" tabIndex={0}>
      <table className="w-full border-collapse text-small">
        <thead>
          <tr>
            <th scope="col" className="sticky left-0 min-w-24 border-b border-ink bg-raised p-1 pl-0 text-left align-bottom font-semibold">
              Row
            </th>
            {columns.map((column, place) => (
              <th key={place} scope="col" className="min-w-32 border-b border-ink p-1 text-left align-bottom">
                {grid.heads !== null && <span className="block font-medium text-ink-2">{grid.heads[place]}</span>}
                <select aria-label={`Column ${place + 1} is`} className="min-h-9 w-full rounded-ctl border-[1.5px] border-rule-2 bg-raised px-1 font-semibold pointer-coarse:min-h-12" value={column ?? ''} onChange={(event) => choose(place, event.target.value)}>
                  <option value="">Leave out</option>
                  {words.map(({ key, head, unit }) => (
                    <option key={key} value={key}>
                      {head}, {unit}
                    </option>
                  ))}
                </select>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {grid.lines.map((line, i) => (
            <tr key={i} className="border-b border-rule align-top">
              <td className={`sticky left-0 w-40 max-w-40 bg-raised py-[6px] pr-2 font-medium ${marks[i] === null ? 'text-good' : 'text-bad'}`}>{marks[i] ?? 'ready'}</td>
              {columns.map((column, place) => (
                <td key={place} className={`num p-[6px] ${column === null ? 'text-ink-3' : ''}`}>
                  {line[place]}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
