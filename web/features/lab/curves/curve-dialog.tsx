import { useMemo, useState } from 'react'
import { toast } from 'sonner'
import { methodLetters } from '#shared/domain/compaction-method.ts'
import type { Curve, Material } from '#shared/schemas/lab.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { NumberField, SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { useCorrectCurve, useRecordCurve } from '#web/data/curve/mutations.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { issuesOf, METHODS } from '#web/features/lab/lab-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { ApparatusFields } from './apparatus-fields.tsx'
import { checkMethod, emptyCurveForm, formOfCurve, gravityOf, readCurveForm, type CurveForm } from './curve-form.ts'
import { EntryFields } from './entry-fields.tsx'
import { LiveFit } from './live-fit.tsx'
import { PasteDialog } from './paste-dialog.tsx'
import { pasteInto } from './paste-grid.ts'
import { MOST_ROWS, PointsTable } from './points-table.tsx'
import { readEntry } from './read-entry.ts'
import { ReferenceChoices } from './reference-choices.tsx'
import { useCurveDraft } from './use-curve-draft.ts'

type CurveDialogProps = { materials: readonly Material[]; /** a draft to be put right */ curve?: Curve | undefined; onClose: () => void; onSaved: (curve: Curve) => void }

/** A laboratory curve: its specimens with the fit shown while they are typed, and the pair that waits for approval. */
export function CurveDialog({ materials, curve, onClose, onSaved }: CurveDialogProps) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  const only = materials.length === 1 ? materials[0] : undefined
  const draft = useCurveDraft(site.id, curve?.id ?? 'new', () => (curve === undefined ? emptyCurveForm(only, units.field.instant(now()), site.unitSystem === 'us') : formOfCurve(curve, units)))
  const { id, form, setForm } = draft
  const [asked, setAsked] = useState(false)
  const [pasting, setPasting] = useState(false)
  const record = useRecordCurve(site.id, { saysOwnErrors: true })
  const correct = useCorrectCurve(site.id, { saysOwnErrors: true })
  const sending = curve === undefined ? record : correct
  const entry = useMemo(() => readEntry(form.entry), [form.entry])
  const read = readCurveForm(id, form, units)
  const errorOf = (path: string) => (asked && !read.ok ? read.errors[path] : undefined)
  const set = (change: Partial<CurveForm>) => setForm((last) => ({ ...last, ...change }))
  const setEntry = (change: Partial<CurveForm['entry']>) => setForm((last) => ({ ...last, entry: { ...last.entry, ...change } }))
  const numberOf = (text: string) => {
    const typed = units.parse.number(text)
    return typed.ok ? typed.value : Number.NaN
  }
  const gs = numberOf(form.gs)
  const reportedDensity = units.parse.densityKgM3(form.reportedDensity)
  const reportedMoisture = units.parse.number(form.reportedMoisture)
  const reported = form.withReported && reportedDensity.ok && reportedMoisture.ok ? { maxDryDensity: reportedDensity.value, optimumMoisture: reportedMoisture.value, reason: form.reportedReason } : null
  const save = () => {
    setAsked(true)
    if (!read.ok) return
    const onSuccess = (saved: Curve) => {
      draft.forget()
      toast(`${saved.code} is recorded and waits for the lead’s approval.`)
      onSaved(saved)
    }
    if (curve === undefined) record.mutate(read.curve, { onSuccess })
    else correct.mutate({ ...read.curve, id: curve.id }, { onSuccess })
  }
  const letters = methodLetters(form.method)
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => !open && onClose()}
      title={curve === undefined ? 'New reference curve' : `Correct ${curve.code}`}
      description="It waits for the lead’s approval before it is in force. What you type is kept on this device until it is saved."
      actions={
        <>
          <Button kind="primary" busyLabel={sending.isPending && 'Saving'} onClick={save}>
            Save the curve
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      {draft.restored && (
        <Banner tone="off" className="mb-3" title="What you typed before is here again." action={<button type="button" onClick={draft.startAfresh}>Start afresh</button>}>
          It was kept on this device.
        </Banner>
      )}
      <div className="grid items-start gap-3 sm:grid-cols-2">
        <TextField label="Code" hint="Such as RB-3" maxLength={80} value={form.code} error={errorOf('code')} onChange={(event) => set({ code: event.target.value })} />
        <SelectField
          label="Material"
          value={form.materialId}
          error={errorOf('materialId')}
          onChange={(event) => {
            const material = materials.find((each) => each.id === event.target.value)
            set({ materialId: event.target.value, ...(form.gs === '' ? gravityOf(material) : {}) })
          }}
        >
          <option value="">Choose a material</option>
          {materials.map((material) => (
            <option key={material.id} value={material.id}>
              {material.name}
            </option>
          ))}
        </SelectField>
        <div className="grid grid-cols-2 gap-3">
          <SelectField label="Method" value={form.method} onChange={(event) => set({ method: METHODS.find((method) => method === event.target.value) ?? 'D698', procedure: 'A' })}>
            {METHODS.map((method) => (
              <option key={method}>{method}</option>
            ))}
          </SelectField>
          <SelectField label="Letter" value={form.procedure} error={errorOf('procedure')} onChange={(event) => set({ procedure: letters.find((letter) => letter === event.target.value) ?? 'A' })}>
            {letters.map((letter) => (
              <option key={letter}>{letter}</option>
            ))}
          </SelectField>
        </div>
        <TextField label="Sampled" type="datetime-local" value={form.sampledAt} error={errorOf('sampledAt')} onChange={(event) => set({ sampledAt: event.target.value })} />
        <NumberField label="Specific gravity of solids, Gs" hint="2.60 to 2.80 for most inorganic soils, quartz sand 2.65" value={form.gs} error={errorOf('gs')} onChange={(event) => set({ gs: event.target.value })} />
        <SelectField label="Gs is" value={form.gsMeasured ? 'measured' : 'assumed'} onChange={(event) => set({ gsMeasured: event.target.value === 'measured' })}>
          <option value="assumed">Assumed</option>
          <option value="measured">Measured</option>
        </SelectField>
      </div>
      <ApparatusFields form={form} check={checkMethod(form, numberOf)} errorOf={errorOf} onChange={set} />
      <div className="mt-5 grid gap-3">
        <EntryFields form={form.entry} mouldError={asked ? entry.mouldError : undefined} mouldVolumeError={asked ? entry.mouldVolumeError : undefined} onChange={setEntry} />
        <div>
          <Button onClick={() => setPasting(true)}>Paste or read a file</Button>
        </div>
        <PointsTable form={form.entry} errors={entry.errors} onChange={(rows) => setEntry({ rows })} />
        {errorOf('points') !== undefined && <p className="m-0 text-small font-medium text-bad">{errorOf('points')}</p>}
        {entry.flags.map((flag) => (
          <p key={flag} className="m-0 font-medium text-warn">
            {flag}
          </p>
        ))}
      </div>
      <div className="mt-3">
        <LiveFit points={[...entry.points]} gs={gs} gsMeasured={form.gsMeasured} reported={reported} />
      </div>
      <ReferenceChoices form={form} errorOf={errorOf} onChange={set} />
      {issuesOf(sending.error).map((message) => (
        <Banner key={message} tone="bad" className="mt-3" title={message} />
      ))}
      {pasting && (
        <PasteDialog
          form={form.entry}
          onClose={() => setPasting(false)}
          onTake={(rows) => {
            const blank = form.entry.rows.findIndex((row) => Object.values(row).every((text) => text.trim() === ''))
            setEntry({ rows: pasteInto(form.entry.rows, blank === -1 ? form.entry.rows.length : blank, rows).slice(0, MOST_ROWS) })
            setPasting(false)
          }}
        />
      )}
    </Dialog>
  )
}
