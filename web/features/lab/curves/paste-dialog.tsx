import { useState } from 'react'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import type { EntryColumn, EntryForm, EntryRow } from './entry-columns.ts'
import { EntryChoices } from './entry-fields.tsx'
import { guessColumns, MOST_LINES, readGrid, rowsOf } from './paste-grid.ts'
import { PastePreview } from './paste-preview.tsx'
import { isBlank, MOST_ROWS, readEntry } from './read-entry.ts'
import { suitEntry } from './suit-entry.ts'

/** A sheet of specimens is a few kilobytes; what is far beyond it is no such sheet. */
const MOST_BYTES = 512 * 1024

type PasteDialogProps = { form: EntryForm; onTake: (choices: Pick<EntryForm, 'kind' | 'moistureBy' | 'densityUnit' | 'massUnit' | 'tinUnit' | 'volumeUnit'>, rows: readonly EntryRow[]) => void; onClose: () => void }

/** What keeps each row from entering the sheet, null where nothing does. */
function marksOf(rows: readonly EntryRow[], form: EntryForm, room: number): (string | null)[] {
  const { errors } = readEntry({ ...form, rows })
  let left = room
  return rows.map((row, i) => {
    if (isBlank(row)) return 'Nothing of this sheet’s columns stands here.'
    const message = errors[i]?.message
    if (message !== undefined) return message
    left -= 1
    return left < 0 ? `A curve takes ${MOST_ROWS} specimens at most.` : null
  })
}

function takeWords(good: number, aside: number): string {
  if (good === 0) return 'Take over'
  return `Take over ${good} ${good === 1 ? 'specimen' : 'specimens'}${aside > 0 ? `, set ${aside} aside` : ''}`
}

/** A pasted block or a CSV file, its columns named and each row marked, before anything enters the sheet. */
export function PasteDialog({ form: sheet, onTake, onClose }: PasteDialogProps) {
  const [text, setText] = useState('')
  const [form, setForm] = useState(sheet)
  const [chosen, setChosen] = useState<readonly (EntryColumn | null)[] | null>(null)
  const [refused, setRefused] = useState<string | null>(null)
  const grid = readGrid(text)
  const columns = chosen ?? guessColumns(grid, form)
  const rows = rowsOf(grid, columns)
  const marks = marksOf(rows, form, MOST_ROWS - sheet.rows.filter((row) => !isBlank(row)).length)
  const good = rows.filter((_, i) => marks[i] === null)
  const take = (next: string): void => {
    setText(next)
    setChosen(null)
    setForm(suitEntry(readGrid(next), form))
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
      description="A block from a spreadsheet, or a CSV file. Nothing enters the sheet before you take it over."
      actions={
        <>
          <Button kind="primary" disabled={good.length === 0} onClick={() => onTake(form, good)}>
            {takeWords(good.length, rows.length - good.length)}
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid grid-cols-[minmax(0,1fr)] gap-3">
        <TextArea label="Block" rows={5} value={text} onChange={(event) => take(event.target.value)} />
        <label className="flex flex-wrap items-center gap-x-3 font-semibold">
          Or a CSV file
          <input type="file" accept=".csv,.txt,text/csv,text/plain" className="max-w-full py-1 font-normal file:mr-3 file:min-h-9 file:cursor-pointer file:rounded-ctl file:border-[1.5px] file:border-solid file:border-ink file:bg-raised file:px-4 file:font-semibold file:text-ink pointer-coarse:file:min-h-11" onChange={(event) => void handleFile(event.target.files?.[0])} />
        </label>
        {refused !== null && <Banner tone="bad" title={refused} />}
        {grid.more && <Banner title={`Only the first ${MOST_LINES} lines were read.`} />}
        {rows.length > 0 && (
          <>
            <EntryChoices
              form={form}
              onChange={(change) => {
                setForm({ ...form, ...change })
                if (change.kind !== undefined || change.moistureBy !== undefined) setChosen(null)
              }}
            />
            <PastePreview form={form} grid={grid} columns={columns} marks={marks} onColumns={setChosen} />
          </>
        )}
      </div>
    </Dialog>
  )
}
