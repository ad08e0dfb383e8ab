import { useState } from 'react'
import type { ExportUnits } from '#shared/schemas/test-exchange.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { siteAddress } from '#web/data/site/queries.ts'
import type { TestFilter } from '#web/data/test/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'

type ExportDialogProps = { query: TestFilter; total: number | undefined; onClose: () => void }

const FORMATS = [{ value: 'csv', label: 'CSV' }, { value: 'xlsx', label: 'Workbook' }] as const
const UNITS = [{ value: 'as-entered', label: 'As entered' }, { value: 'us', label: 'US' }, { value: 'si', label: 'SI' }] as const satisfies readonly { value: ExportUnits; label: string }[]
const UNIT_WORDS: Readonly<Record<ExportUnits, string>> = {
  'as-entered': 'Readings stand as they were typed, their units beside. This form can be imported again unchanged.',
  us: 'Readings are converted to lb, pcf, ft³ and in, for reading.',
  si: 'Readings are converted to g, kg/m³, cm³ and mm, for reading.',
}

/** The register as it is filtered, as a file. */
export function ExportDialog({ query, total, onClose }: ExportDialogProps) {
  const { site } = useSite()
  const [format, setFormat] = useState<(typeof FORMATS)[number]['value']>('csv')
  const [units, setUnits] = useState<ExportUnits>('as-entered')
  const { offset: _offset, limit: _limit, ...filter } = query
  const search = new URLSearchParams(Object.entries({ ...filter, format, units }).flatMap(([name, value]) => (value === undefined ? [] : [[name, String(value)]])))
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Export results"
      description={`${total === undefined ? 'The tests' : total === 1 ? 'The one test' : `The ${total.toLocaleString('en-US')} tests`} of this choice, with every reading and result.`}
      actions={
        <>
          <a href={`${siteAddress(site.id)}/tests/export?${search.toString()}`} download className={buttonClasses('primary', 'regular', 'pointer-coarse:min-h-12')} onClick={onClose}>
            Save the file
          </a>
          <DialogClose>
            <Button className="pointer-coarse:min-h-12">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <p className="mt-0 mb-1 text-small font-medium text-ink-2">File</p>
      <Segmented label="File" options={FORMATS} value={format} onChange={setFormat} size="touch" />
      <p className="mt-4 mb-1 text-small font-medium text-ink-2">Units of the readings</p>
      <Segmented label="Units of the readings" options={UNITS} value={units} onChange={setUnits} size="touch" />
      <p className="mt-2 mb-0 text-small text-ink-2">{UNIT_WORDS[units]}</p>
    </Dialog>
  )
}
