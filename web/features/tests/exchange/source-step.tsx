import { useState, type DragEvent } from 'react'
import { EXCHANGE_LIMITS } from '#shared/schemas/test-exchange.ts'
import { PickFiles } from '#web/components/files/add-files.tsx'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { classNames } from '#web/lib/class-names.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { readBeside } from './read/read-beside.ts'
import { TEST_COLUMNS, INPUT_KEYS } from '#shared/exchange/test-columns.ts'
import { csvLine } from '#shared/exchange/csv-cell.ts'
import { headOfColumn } from '#shared/exchange/write-row.ts'
import { saveText } from './save-file.ts'
import type { Importing } from './use-import.ts'

const TYPES = '.csv,.tsv,.txt,.xlsx,text/csv,text/tab-separated-values'

/** The file to read, or a block copied out of a spreadsheet. */
export function SourceStep({ importing }: { importing: Importing }) {
  const { site } = useSite()
  const { kept, start, resume, forget } = importing
  const [pasted, setPasted] = useState('')
  const [busy, setBusy] = useState(false)
  const [over, setOver] = useState(false)
  const [problem, setProblem] = useState<string | null>(null)

  const read = async (bytes: () => Promise<Uint8Array>, size: number, name: string): Promise<void> => {
    setProblem(null)
    if (size > EXCHANGE_LIMITS.fileBytes) {
      setProblem(`This is larger than ${EXCHANGE_LIMITS.fileBytes / 1024 / 1024} MB. Split it and take the parts in one after another.`)
      return
    }
    setBusy(true)
    const table = await readBeside(await bytes(), name)
    setBusy(false)
    if (table.ok) await start(table)
    else setProblem(table.message)
  }
  const readFile = (file: File): void => void read(async () => new Uint8Array(await file.arrayBuffer()), file.size, file.name.slice(0, 200))
  const handlePasted = (): void => {
    const bytes = new TextEncoder().encode(pasted)
    void read(() => Promise.resolve(bytes), bytes.length, 'Pasted block')
  }
  const handleDrop = (event: DragEvent): void => {
    event.preventDefault()
    setOver(false)
    const [file] = event.dataTransfer.files
    if (file !== undefined) readFile(file)
  }
  const handleTemplate = (): void => {
    const form = { timeZone: site.timeZone, system: site.unitSystem, planUnit: site.grid.unit }
    const keys = INPUT_KEYS.filter((key) => key !== 'record' && key !== 'followsRecord' && key in TEST_COLUMNS)
    saveText('tests.csv', csvLine([TEST_COLUMNS.number.label, ...keys.map((key) => headOfColumn(key, form, 'as-entered'))]))
  }

  return (
    <div className="max-w-[760px] pb-10" aria-busy={busy}>
      {problem !== null && (
        <Banner tone="bad" title="This could not be read." className="mb-4">
          {problem} Nothing was stored.
        </Banner>
      )}
      {kept !== null && (
        <Banner
          title={`The import of ${kept.name} was not finished.`}
          className="mb-4"
          action={
            <span className="flex gap-3">
              {kept.rows !== null && <button type="button" className="pointer-coarse:min-h-12" onClick={() => void resume()}>Go on</button>}
              <button type="button" className="pointer-coarse:min-h-12" onClick={forget}>Drop it</button>
            </span>
          }
        >
          {kept.rows === null ? 'Choose the same file again: what you corrected is kept.' : 'Its rows and what you corrected are kept on this device.'}
        </Banner>
      )}
      <SectionHead>Choose a file</SectionHead>
      <div
        onDragOver={(event) => {
          event.preventDefault()
          setOver(true)
        }}
        onDragLeave={() => setOver(false)}
        onDrop={handleDrop}
        className={classNames('mb-7 flex flex-wrap items-center gap-x-4 gap-y-3 border-[1.5px] border-dashed px-4 py-5', over ? 'border-ink bg-film' : 'border-rule-2')}
      >
        <PickFiles label={busy ? 'Reading' : 'Choose a file'} accept={TYPES} onPick={([file]) => file !== undefined && readFile(file)} />
        <span className="text-ink-2">CSV or workbook (.xlsx), at most 5 MB and 5,000 rows. Or drop it here.</span>
      </div>
      <SectionHead>Or paste rows</SectionHead>
      <TextArea label="Rows copied from a spreadsheet, with the line that heads their columns" rows={8} value={pasted} onChange={(event) => setPasted(event.target.value)} spellCheck={false} className="mb-3" />
      <div className="flex flex-wrap gap-[10px]">
        <Button kind="primary" disabled={pasted.trim() === ''} busyLabel={busy && 'Reading'} onClick={handlePasted} className="pointer-coarse:min-h-12">
          Read the rows
        </Button>
        <Button kind="quiet" onClick={handleTemplate} className="pointer-coarse:min-h-12">
          Save an empty table with all columns
        </Button>
      </div>
    </div>
  )
}
