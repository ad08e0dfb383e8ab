import { useState } from 'react'
import { toast } from 'sonner'
import { addCalibrationSchema, createGaugeSchema, type Gauge } from '#shared/schemas/gauge.ts'
import { figure } from '#web/components/gauge/count-form.ts'
import { NumberField, TextField } from '#web/components/ui/text-fields.tsx'
import { useAddCalibration, useEditGauge, useRecordGauge } from '#web/data/gauge/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { GaugeDialog } from './gauge-dialog.tsx'

type Calibrating = { readonly calibratedOn: string; readonly dueOn: string; readonly density: string; readonly moisture: string }
const UNCALIBRATED: Calibrating = { calibratedOn: '', dueOn: '', density: '', moisture: '' }

function useCalibration() {
  const { units } = useSite()
  const [id] = useState(() => crypto.randomUUID())
  const [form, setForm] = useState(UNCALIBRATED)
  const input = { id, calibratedOn: form.calibratedOn, dueOn: form.dueOn === '' ? null : form.dueOn, density: figure(form.density, units), moisture: figure(form.moisture, units) }
  return { form, setForm, input }
}

type CalibrationFieldsProps = { form: Calibrating; onChange: (form: Calibrating) => void; errorOf: (field: string) => string | undefined }

function CalibrationFields({ form, onChange, errorOf }: CalibrationFieldsProps) {
  const bind = (name: keyof Calibrating) => ({ value: form[name], error: errorOf(name), onChange: (event: { target: { value: string } }) => onChange({ ...form, [name]: event.target.value }) })
  return (
    <div className="grid grid-cols-2 items-start gap-3">
      <TextField label="Calibrated on" type="date" {...bind('calibratedOn')} />
      <TextField label="Due, if set" type="date" {...bind('dueOn')} />
      <NumberField label="Density count then" {...bind('density')} />
      <NumberField label="Moisture count then" {...bind('moisture')} />
    </div>
  )
}

/** A gauge for the register, with the calibration it comes with. */
export function NewGaugeDialog({ onClose, onSaved }: { onClose: () => void; onSaved: (gauge: Gauge) => void }) {
  const { site } = useSite()
  const [id] = useState(() => crypto.randomUUID())
  const [form, setForm] = useState({ serial: '', model: '', leakTestedOn: '' })
  const [asked, setAsked] = useState(false)
  const calibration = useCalibration()
  const record = useRecordGauge(site.id, { saysOwnErrors: true })
  const parsed = createGaugeSchema.safeParse({ id, serial: form.serial, model: form.model, leakTestedOn: form.leakTestedOn === '' ? null : form.leakTestedOn, calibration: calibration.input })
  const errorOf = (path: string) => (asked && !parsed.success ? parsed.error.issues.find((issue) => issue.path.join('.') === path)?.message : undefined)
  const bind = (name: keyof typeof form) => ({ value: form[name], error: errorOf(name), onChange: (event: { target: { value: string } }) => setForm({ ...form, [name]: event.target.value }) })
  const save = () => {
    setAsked(true)
    if (parsed.success) record.mutate(parsed.data, { onSuccess: onSaved })
  }
  return (
    <GaugeDialog title="New gauge" description="Figures of its calibration certificate: the standard counts it was calibrated at." act="Save the gauge" busy={record.isPending} error={record.error} onSave={save} onClose={onClose}>
      <TextField label="Serial number or name" maxLength={80} {...bind('serial')} />
      <TextField label="Model, as you call it" maxLength={200} {...bind('model')} />
      <CalibrationFields form={calibration.form} onChange={calibration.setForm} errorOf={(field) => errorOf(`calibration.${field}`)} />
      <TextField label="Last leak test, if known" type="date" {...bind('leakTestedOn')} />
    </GaugeDialog>
  )
}

/** A new calibration of a gauge. */
export function CalibrationDialog({ gauge, onClose }: { gauge: Gauge; onClose: () => void }) {
  const { site } = useSite()
  const [asked, setAsked] = useState(false)
  const { form, setForm, input } = useCalibration()
  const add = useAddCalibration(site.id, { saysOwnErrors: true })
  const parsed = addCalibrationSchema.safeParse(input)
  const errorOf = (path: string) => (asked && !parsed.success ? parsed.error.issues.find((issue) => issue.path.join('.') === path)?.message : undefined)
  const save = () => {
    setAsked(true)
    if (parsed.success) add.mutate({ gaugeId: gauge.id, ...parsed.data }, { onSuccess: onClose })
  }
  return (
    <GaugeDialog title={`New calibration, gauge ${gauge.serial}`} description="From its day on its counts are the reference, until four days are good." act="Save the calibration" busy={add.isPending} error={add.error} onSave={save} onClose={onClose}>
      <CalibrationFields form={form} onChange={setForm} errorOf={errorOf} />
    </GaugeDialog>
  )
}

/** The day of the last leak test, and the words for the model. */
export function EditGaugeDialog({ gauge, onClose }: { gauge: Gauge; onClose: () => void }) {
  const { site } = useSite()
  const [model, setModel] = useState(gauge.model)
  const [leakTestedOn, setLeakTestedOn] = useState(gauge.leakTestedOn ?? '')
  const edit = useEditGauge(site.id, { saysOwnErrors: true })
  const save = () =>
    edit.mutate(
      { gaugeId: gauge.id, model, leakTestedOn: leakTestedOn === '' ? null : leakTestedOn },
      {
        onSuccess: () => {
          toast(`Gauge ${gauge.serial} is saved.`)
          onClose()
        },
      },
    )
  return (
    <GaugeDialog title={`Gauge ${gauge.serial}`} act="Save" busy={edit.isPending} error={edit.error} onSave={save} onClose={onClose}>
      <TextField label="Last leak test" type="date" value={leakTestedOn} onChange={(event) => setLeakTestedOn(event.target.value)} />
      <TextField label="Model, as you call it" maxLength={200} value={model} onChange={(event) => setModel(event.target.value)} />
    </GaugeDialog>
  )
}
