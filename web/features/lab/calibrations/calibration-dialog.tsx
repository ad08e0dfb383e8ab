import { useState } from 'react'
import { createCalibrationSchema } from '#shared/schemas/calibration.ts'
import { VOLUME_UNIT_LABEL } from '#shared/units/volume.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { FactsRow } from '#web/components/ui/figure.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { NumberField, SelectField, TextArea, TextField } from '#web/components/ui/text-fields.tsx'
import { useRecordCalibration } from '#web/data/calibration/mutations.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { calibrationWords } from '#web/components/calibration/calibration-words.ts'
import { issuesOf } from '#web/features/lab/lab-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { assessCalibration, emptyCalibrationForm, KIND_WORDS, type CalibrationForm } from './calibration-form.ts'
import { TrialsTable } from './trials-table.tsx'

const KINDS = (['sand-density', 'cone', 'cylinder', 'balloon'] as const).map((value) => ({ value, label: KIND_WORDS[value].name }))
const MASSES = ['g', 'kg', 'lb'] as const
const VOLUMES = ['cm3', 'in3', 'ft3'] as const
const LENGTHS = ['mm', 'cm', 'in'] as const

/** A calibration from its trials, worked out while they are typed. */
export function CalibrationDialog({ onClose }: { onClose: () => void }) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  const [id] = useState(() => crypto.randomUUID())
  const [form, setForm] = useState(() => emptyCalibrationForm('sand-density', site.unitSystem === 'us'))
  const [about, setAbout] = useState(() => ({ apparatus: '', performedAt: units.field.instant(now()), validUntil: '', remarks: '' }))
  const [asked, setAsked] = useState(false)
  const record = useRecordCalibration(site.id, { saysOwnErrors: true })
  const { sheet, result, problems } = assessCalibration(form)
  const set = (change: Partial<CalibrationForm>) => setForm((last) => ({ ...last, ...change }))
  const parsed = createCalibrationSchema.safeParse({
    id,
    apparatus: about.apparatus,
    sheet: result.ok ? sheet : undefined,
    performedAt: units.parse.instant(about.performedAt) ?? '',
    // a day is meant to its end
    validUntil: about.validUntil === '' ? null : (units.parse.instant(`${about.validUntil}T23:59`) ?? ''),
    remarks: about.remarks,
  })
  const errorOf = (field: string) => (asked && !parsed.success ? parsed.error.issues.find((issue) => issue.path[0] === field)?.message : undefined)
  const errorAt = (place: string) => (asked ? problems.get(place) : undefined)
  const bind = (name: keyof typeof about) => ({ value: about[name], error: errorOf(name), onChange: (event: { target: { value: string } }) => setAbout({ ...about, [name]: event.target.value }) })
  const save = () => {
    setAsked(true)
    if (parsed.success) record.mutate(parsed.data, { onSuccess: onClose })
  }
  const massive = form.kind === 'sand-density' || form.kind === 'cone'
  const unit = massive ? form.massUnit : form.kind === 'cylinder' ? form.lengthUnit : VOLUME_UNIT_LABEL[form.volumeUnit]
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => !open && onClose()}
      title="New calibration"
      description="Field sheets that use it carry its value, and name it."
      actions={
        <>
          <Button kind="primary" busyLabel={record.isPending && 'Saving'} onClick={save}>
            Save the calibration
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid gap-4">
        <Segmented wide label="Calibration of" options={KINDS} value={form.kind} onChange={(kind) => setForm(emptyCalibrationForm(kind, site.unitSystem === 'us'))} />
        <div className="grid items-start gap-3 sm:grid-cols-[minmax(0,1fr)_240px_160px]">
          <TextField label="Apparatus, cylinder or batch" placeholder={KIND_WORDS[form.kind].example} maxLength={80} {...bind('apparatus')} />
          <TextField label="Performed" type="datetime-local" {...bind('performedAt')} />
          <TextField label="In use until, if set" type="date" {...bind('validUntil')} />
        </div>
        <div className={`grid grid-cols-2 items-start gap-3 ${form.kind === 'sand-density' ? 'sm:grid-cols-4' : 'sm:grid-cols-3'}`}>
          {massive && <UnitSelect label="Masses in" units={MASSES} value={form.massUnit} onChange={(massUnit) => set({ massUnit })} />}
          {form.kind === 'cylinder' && <UnitSelect label="Lengths in" units={LENGTHS} value={form.lengthUnit} onChange={(lengthUnit) => set({ lengthUnit })} />}
          {(form.kind === 'balloon' || form.kind === 'sand-density') && <UnitSelect label="Volumes in" units={VOLUMES} value={form.volumeUnit} onChange={(volumeUnit) => set({ volumeUnit })} />}
          {form.kind === 'sand-density' && (
            <>
              <NumberField label="Volume of the container" unit={VOLUME_UNIT_LABEL[form.volumeUnit]} value={form.containerVolume} error={errorAt('containerVolume')} onChange={(event) => set({ containerVolume: event.target.value })} />
              <NumberField label="Container, empty" unit={form.massUnit} value={form.container} error={errorAt('container')} onChange={(event) => set({ container: event.target.value })} />
            </>
          )}
        </div>
        <TrialsTable form={form} unit={unit} errorAt={errorAt} onChange={(trials) => set({ trials })} />
        <FactsRow
          facts={[
            { label: KIND_WORDS[form.kind].gives, value: result.ok ? calibrationWords(form.kind, result.value, units) : '–' },
            { label: form.kind === 'balloon' ? 'Largest error' : 'Farthest from the mean', value: result.ok ? units.percent(result.spreadPercent) : '–' },
          ]}
        />
        {result.ok && result.flags.map(({ code, message }) => <p key={code} className="m-0 font-medium text-warn">{message}</p>)}
        <TextArea label="Remarks" rows={2} maxLength={2_000} {...bind('remarks')} />
        {issuesOf(record.error).map((message) => (
          <Banner key={message} tone="bad" title={message} />
        ))}
      </div>
    </Dialog>
  )
}

function UnitSelect<T extends string>({ label, units, value, onChange }: { label: string; units: readonly T[]; value: string; onChange: (unit: T) => void }) {
  return (
    <SelectField label={label} value={value} onChange={(event) => onChange(units.find((unit) => unit === event.target.value) ?? (units[0] as T))}>
      {units.map((unit) => (
        <option key={unit} value={unit}>
          {unit in VOLUME_UNIT_LABEL ? VOLUME_UNIT_LABEL[unit as keyof typeof VOLUME_UNIT_LABEL] : unit}
        </option>
      ))}
    </SelectField>
  )
}
