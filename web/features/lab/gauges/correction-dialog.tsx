import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { toast } from 'sonner'
import { moistureCorrection } from '#shared/domain/moisture-correction.ts'
import { recordCorrectionSchema, type Gauge } from '#shared/schemas/gauge.ts'
import { figure } from '#web/components/gauge/count-form.ts'
import { Button } from '#web/components/ui/button.tsx'
import { NumberField, SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { useRecordCorrection } from '#web/data/gauge/mutations.ts'
import { materialQueries } from '#web/data/material/queries.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { GaugeDialog } from './gauge-dialog.tsx'

const BLANK = { oven: '', gauge: '' }
const MOST_PAIRS = 40

/** The moisture correction of a gauge for a material, worked out while the pairs are typed. */
export function CorrectionDialog({ gauge, onClose }: { gauge: Gauge; onClose: () => void }) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  const materials = useQuery(materialQueries.list(site.id))
  const [id] = useState(() => crypto.randomUUID())
  const [form, setForm] = useState(() => ({ materialId: '', from: units.field.instant(now()), remarks: '' }))
  const [pairs, setPairs] = useState([BLANK, BLANK, BLANK])
  const [asked, setAsked] = useState(false)
  const record = useRecordCorrection(site.id, { saysOwnErrors: true })
  const typed = pairs.filter((pair) => pair.oven.trim() !== '' || pair.gauge.trim() !== '').map((pair) => ({ oven: figure(pair.oven, units), gauge: figure(pair.gauge, units) }))
  const correction = moistureCorrection(typed)
  const parsed = recordCorrectionSchema.safeParse({ id, materialId: form.materialId, pairs: typed, inForceFrom: units.parse.instant(form.from) ?? '', remarks: form.remarks })
  const errorOf = (field: string) => (asked && !parsed.success ? parsed.error.issues.find((issue) => issue.path[0] === field)?.message : undefined)
  const setPair = (index: number, name: keyof typeof BLANK, text: string) => setPairs(pairs.map((pair, at) => (at === index ? { ...pair, [name]: text } : pair)))
  const save = () => {
    setAsked(true)
    if (!parsed.success) return
    record.mutate(
      { gaugeId: gauge.id, ...parsed.data },
      {
        onSuccess: () => {
          toast(`The correction of gauge ${gauge.serial} is in force.`)
          onClose()
        },
      },
    )
  }
  return (
    <GaugeDialog
      title={`Moisture correction, gauge ${gauge.serial}`}
      description="Oven moisture of the soil beneath the gauge, and what the gauge read there without a correction."
      act="Save the correction"
      busy={record.isPending}
      error={record.error}
      onSave={save}
      onClose={onClose}
    >
      <SelectField label="Material" value={form.materialId} error={asked && form.materialId === '' ? 'Choose the material' : undefined} onChange={(event) => setForm({ ...form, materialId: event.target.value })}>
        <option value="">Choose a material</option>
        {materials.data?.map((material) => (
          <option key={material.id} value={material.id}>
            {material.name}
          </option>
        ))}
      </SelectField>
      <div className="grid grid-cols-2 items-start gap-x-3 gap-y-2">
        {pairs.map((pair, index) => [
          <NumberField key={`oven ${index}`} label={`Oven ${index + 1}`} unit="%" value={pair.oven} onChange={(event) => setPair(index, 'oven', event.target.value)} />,
          <NumberField key={`gauge ${index}`} label={`Gauge ${index + 1}`} unit="%" value={pair.gauge} onChange={(event) => setPair(index, 'gauge', event.target.value)} />,
        ])}
      </div>
      {pairs.length < MOST_PAIRS && (
        <div>
          <Button kind="quiet" className="pointer-coarse:min-h-11" onClick={() => setPairs([...pairs, BLANK])}>
            Add a pair
          </Button>
        </div>
      )}
      <p role="status" aria-label="Correction" className="m-0 bg-film px-3 pt-[9px] pb-[7px]">
        {correction.ok ? `K ${units.number(correction.value.k, 2)}, mean of ${typed.length} ${typed.length === 1 ? 'pair' : 'pairs'}, from ${units.number(correction.value.least, 2)} to ${units.number(correction.value.greatest, 2)}.` : correction.reason.message}
      </p>
      {errorOf('pairs') !== undefined && (
        <p role="alert" className="m-0 text-small font-medium text-bad">
          {errorOf('pairs')}
        </p>
      )}
      <TextField label="In force from" type="datetime-local" value={form.from} error={errorOf('inForceFrom')} onChange={(event) => setForm({ ...form, from: event.target.value })} />
      <TextField label="Remarks, may stay empty" maxLength={2_000} value={form.remarks} onChange={(event) => setForm({ ...form, remarks: event.target.value })} />
    </GaugeDialog>
  )
}
