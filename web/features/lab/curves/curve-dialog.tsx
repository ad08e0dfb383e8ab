import { useMemo, useState } from 'react'
import { toast } from 'sonner'
import type { Curve, Material } from '#shared/schemas/lab.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { NumberField, SelectField, TextArea, TextField } from '#web/components/ui/text-fields.tsx'
import { useRecordCurve } from '#web/data/curve/mutations.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { emptyCurveForm, readCurveForm, readRows, type CurveForm } from './curve-form.ts'
import { issuesOf, LETTERS, METHODS, sieveWords } from '#web/features/lab/lab-words.ts'
import { LiveFit } from './live-fit.tsx'
import { PointsTable } from './points-table.tsx'

type CurveDialogProps = { materials: readonly Material[]; onClose: () => void; onSaved: (curve: Curve) => void }

/** A laboratory curve: its points with the fit shown while they are typed, and the pair that waits for approval. */
export function CurveDialog({ materials, onClose, onSaved }: CurveDialogProps) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  const [id] = useState(() => crypto.randomUUID())
  const [form, setForm] = useState(() => emptyCurveForm(materials.length === 1 ? (materials[0]?.id ?? '') : '', units.field.instant(now())))
  const [asked, setAsked] = useState(false)
  const record = useRecordCurve(site.id, { saysOwnErrors: true })
  const rows = useMemo(() => readRows(form.rows, units), [form.rows, units])
  const read = readCurveForm(id, form, units)
  const errorOf = (path: string) => (asked && !read.ok ? read.errors[path] : undefined)
  const set = (change: Partial<CurveForm>) => setForm((last) => ({ ...last, ...change }))
  const gs = units.parse.number(form.gs)
  const reportedDensity = units.parse.densityKgM3(form.reportedDensity)
  const reportedMoisture = units.parse.number(form.reportedMoisture)
  const reported =
    form.withReported && reportedDensity.ok && reportedMoisture.ok ? { maxDryDensity: reportedDensity.value, optimumMoisture: reportedMoisture.value, reason: form.reportedReason } : null
  const save = () => {
    setAsked(true)
    if (!read.ok) return
    record.mutate(read.curve, {
      onSuccess: (curve) => {
        toast(`${curve.code} is recorded and waits for the lead’s approval.`)
        onSaved(curve)
      },
    })
  }
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => !open && onClose()}
      title="New reference curve"
      description="It waits for the lead’s approval before it is in force."
      actions={
        <>
          <Button kind="primary" busyLabel={record.isPending && 'Saving'} onClick={save}>
            Save the curve
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid gap-3 sm:grid-cols-2">
        <TextField label="Code" hint="Such as RB-3" maxLength={80} value={form.code} error={errorOf('code')} onChange={(event) => set({ code: event.target.value })} />
        <SelectField label="Material" value={form.materialId} error={errorOf('materialId')} onChange={(event) => set({ materialId: event.target.value })}>
          <option value="">Choose a material</option>
          {materials.map((material) => (
            <option key={material.id} value={material.id}>
              {material.name}
            </option>
          ))}
        </SelectField>
        <div className="grid grid-cols-2 gap-3">
          <SelectField label="Method" value={form.method} onChange={(event) => set({ method: METHODS.find((method) => method === event.target.value) ?? 'D698' })}>
            {METHODS.map((method) => (
              <option key={method}>{method}</option>
            ))}
          </SelectField>
          <SelectField label="Letter" value={form.procedure} onChange={(event) => set({ procedure: LETTERS.find((letter) => letter === event.target.value) ?? 'A' })}>
            {LETTERS.map((letter) => (
              <option key={letter}>{letter}</option>
            ))}
          </SelectField>
        </div>
        <TextField label="Sampled" type="datetime-local" value={form.sampledAt} error={errorOf('sampledAt')} onChange={(event) => set({ sampledAt: event.target.value })} />
        <NumberField label="Specific gravity of solids, Gs" value={form.gs} error={errorOf('gs')} onChange={(event) => set({ gs: event.target.value })} />
        <SelectField label="Gs is" value={form.gsMeasured ? 'measured' : 'assumed'} onChange={(event) => set({ gsMeasured: event.target.value === 'measured' })}>
          <option value="assumed">Assumed</option>
          <option value="measured">Measured</option>
        </SelectField>
      </div>
      <div className="mt-5">
        <PointsTable rows={form.rows} errors={rows.errors} onChange={(next) => set({ rows: next })} />
        {errorOf('points') !== undefined && <p className="m-0 text-small font-medium text-bad">{errorOf('points')}</p>}
      </div>
      <div className="mt-3">
        <LiveFit points={rows.points} gs={gs.ok ? gs.value : Number.NaN} gsMeasured={form.gsMeasured} reported={reported} />
      </div>
      <label className="mt-4 flex min-h-11 cursor-pointer items-center gap-3 font-semibold">
        <input type="checkbox" className="size-5 accent-ink" checked={form.withReported} onChange={(event) => set({ withReported: event.target.checked })} />
        Use the pair the laboratory reported
      </label>
      {form.withReported && (
        <div className="grid gap-3 sm:grid-cols-2">
          <NumberField label="Maximum dry unit weight" unit={units.marks.density} value={form.reportedDensity} error={errorOf('reported.maxDryDensity')} onChange={(event) => set({ reportedDensity: event.target.value })} />
          <NumberField label="Optimum moisture" unit="%" value={form.reportedMoisture} error={errorOf('reported.optimumMoisture')} onChange={(event) => set({ reportedMoisture: event.target.value })} />
          <TextArea className="sm:col-span-2" label="Why this pair" rows={2} maxLength={2_000} value={form.reportedReason} error={errorOf('reported.reason')} onChange={(event) => set({ reportedReason: event.target.value })} />
        </div>
      )}
      <label className="mt-2 flex min-h-11 cursor-pointer items-center gap-3 font-semibold">
        <input type="checkbox" className="size-5 accent-ink" checked={form.withCoarse} onChange={(event) => set({ withCoarse: event.target.checked })} />
        The stones kept on the {sieveWords(form.method, form.procedure)} are known
      </label>
      {form.withCoarse && (
        <div className="grid gap-3 sm:grid-cols-2">
          <NumberField label="Bulk specific gravity of the stones" value={form.coarseGravity} error={errorOf('coarse.bulkGravity')} onChange={(event) => set({ coarseGravity: event.target.value })} />
          <NumberField label="Moisture of the stones" unit="%" hint="0 where it is not known" value={form.coarseMoisture} error={errorOf('coarse.moisture')} onChange={(event) => set({ coarseMoisture: event.target.value })} />
        </div>
      )}
      {issuesOf(record.error).map((message) => (
        <Banner key={message} tone="bad" className="mt-3" title={message} />
      ))}
    </Dialog>
  )
}
