import { useState } from 'react'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { EntryFields } from './entry-fields.tsx'
import { PasteDialog } from './paste-dialog.tsx'
import { pasteInto } from './paste-grid.ts'
import { PointsTable } from './points-table.tsx'
import { isBlank } from './read-entry.ts'
import type { CurveEntryState } from './use-curve-entry.ts'

/** How the specimens were written down, and the table they are typed in or pasted to. */
export function SpecimensSection({ state }: { state: CurveEntryState }) {
  const [pasting, setPasting] = useState(false)
  const { form, entry, setEntry, errorOf } = state
  const { rows } = form.entry
  return (
    <section>
      <SectionHead>Specimens</SectionHead>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-3">
        <EntryFields form={form.entry} method={form} mouldError={errorOf('mould')} mouldVolumeError={errorOf('mouldVolume')} onChange={setEntry} />
        <PointsTable form={form.entry} read={entry} onChange={(next) => setEntry({ rows: next })} onAskPaste={() => setPasting(true)} />
        {errorOf('points') !== undefined && <p className="m-0 text-small font-medium text-bad">{errorOf('points')}</p>}
        {entry.flags.map((flag) => (
          <p key={flag} className="m-0 font-medium text-warn">
            {flag}
          </p>
        ))}
      </div>
      {pasting && (
        <PasteDialog
          form={form.entry}
          onClose={() => setPasting(false)}
          onTake={(form, taken) => {
            const kept = rows.filter((row) => !isBlank(row))
            setEntry({ ...form, rows: pasteInto(kept, kept.length, taken) })
            setPasting(false)
          }}
        />
      )}
    </section>
  )
}
