import { useState } from 'react'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { columnsOf, type EntryColumn, type EntryForm, type EntryRow } from './entry-columns.ts'
import { guessColumns, readGrid, rowsOf } from './paste-grid.ts'
import { readEntry } from './read-entry.ts'

/** A sheet of specimens is a few kilobytes; what is far beyond it is no such sheet. */
const MOST_BYTES = 512 * 1024

type PasteDialogProps = { form: EntryForm; onTake: (rows: readonly EntryRow[]) => void; onClose: () => void }

/** A pasted block or a CSV file, its columns named and each row marked, before anything enters the sheet. */
export function PasteDialog({ form, onTake, onClose }: PasteDialogProps) {
  const [text, setText] = useState('')
  const [chosen, setChosen] = useState<readonly (EntryColumn | null)[] | null>(null)
  const [refused, setRefused] = useState<string | null>(null)
  const grid = readGrid(text)
  const columns = chosen ?? guessColumns(grid, form)
  const rows = rowsOf(grid, columns)
  const { errors } = readEntry({ ...form, rows })
  const marks = rows.map((row, i) => errors[i]?.message ?? (Object.values(row).every((each) => each === '') ? 'Nothing of this sheet’s columns stands here.' : null))
  const good = rows.filter((_, i) => marks[i] === null)
  const take = (next: string): void => {
    setText(next)
    setChosen(null)
  }
  const handleFile = async (file: File | undefined): Promise<void> => {
    if (file === undefined) return
    const tooLarge = file.size > MOST_BYTES
    const content = tooLarge ? '' : await file.text()
    const binary = content.includes('\u0000') || content.includes('\uFFFD')
    setRefused(tooLarge ? `${file.name} is too large for a sheet of specimens. Nothing was read.` : binary ? `${file.name} is not plain text. Save it as CSV (UTF-8) and choose it again.` : null)
    take(binary ? '' : content)
  }
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => !open && onClose()}
      title="Paste or read a file"
      description="A block from a spreadsheet, or a CSV file. Name its columns; nothing enters the sheet before you take it over."
      actions={
        <>
          <Button kind="primary" disabled={good.length === 0} onClick={() => onTake(good)}>
            {good.length === 0 ? 'Take over' : `Take over ${good.length} ${good.length === 1 ? 'specimen' : 'specimens'}${good.length < rows.length ? `, set ${rows.length - good.length} aside` : ''}`}
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid gap-3">
        <TextArea label="Block" rows={5} value={text} onChange={(event) => take(event.target.value)} />
        <label className="flex flex-wrap items-center gap-3 font-semibold">
          Or a CSV file
          <input type="file" accept=".csv,.txt,text/csv,text/plain" className="min-h-11 font-normal" onChange={(event) => void handleFile(event.target.files?.[0])} />
        </label>
        {refused !== null && <Banner tone="bad" title={refused} />}
        {rows.length > 0 && <Preview form={form} grid={grid} columns={columns} marks={marks} onColumns={setChosen} />}
      </div>
    </Dialog>
  )
}

type PreviewProps = { form: EntryForm; grid: ReturnType<typeof readGrid>; columns: readonly (EntryColumn | null)[]; marks: readonly (string | null)[]; onColumns: (columns: readonly (EntryColumn | null)[]) => void }

function Preview({ form, grid, columns, marks, onColumns }: PreviewProps) {
  const words = columnsOf(form)
  const choose = (place: number, key: string) => onColumns(columns.map((column, at) => (at === place ? (words.find((each) => each.key === key)?.key ?? null) : column === key ? null : column)))
  return (
    <div className="overflow-x-auto" role="region" aria-label="Preview" tabIndex={0}>
      <table className="w-full border-collapse text-small">
        <thead>
          <tr>
            {columns.map((column, place) => (
              <th key={place} scope="col" className="border-b border-ink p-1 text-left align-bottom">
                {grid.heads !== null && <span className="block font-medium text-ink-2">{grid.heads[place]}</span>}
                <select aria-label={`Column ${place + 1} is`} className="min-h-9 w-full border border-ink bg-raised font-semibold pointer-coarse:min-h-12" value={column ?? ''} onChange={(event) => choose(place, event.target.value)}>
                  <option value="">Leave out</option>
                  {words.map(({ key, head, unit }) => (
                    <option key={key} value={key}>
                      {head}, {unit}
                    </option>
                  ))}
                </select>
              </th>
            ))}
            <th scope="col" className="border-b border-ink p-1 text-left font-semibold">
              Row
            </th>
          </tr>
        </thead>
        <tbody>
          {grid.lines.map((line, i) => (
            <tr key={i} className="border-b border-rule align-top">
              {columns.map((column, place) => (
                <td key={place} className={`num p-[6px] ${column === null ? 'text-ink-3' : ''}`}>
                  {line[place]}
                </td>
              ))}
              <td className={`p-[6px] font-medium ${marks[i] === null ? '' : 'text-bad'}`}>{marks[i] ?? 'ready'}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
