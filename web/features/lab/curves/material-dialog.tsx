import { useState } from 'react'
import { unusualGravity } from '#shared/domain/typical-gravity.ts'
import { createMaterialSchema, type Material } from '#shared/schemas/lab.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { NumberField, SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { useRecordMaterial, useUpdateMaterial } from '#web/data/material/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { issuesOf } from '#web/features/lab/lab-words.ts'
import { TypicalGravities } from './typical-gravities.tsx'

type MaterialForm = { readonly name: string; readonly source: string; readonly classification: string; readonly swell: string; readonly shrink: string; readonly gs: string; readonly measured: string }

const BLANK: MaterialForm = { name: '', source: '', classification: '', swell: '', shrink: '', gs: '', measured: 'assumed' }

function formOf({ name, source, classification, swellPercent, shrinkPercent, gs, gsMeasured }: Material): MaterialForm {
  return { name, source, classification, swell: String(swellPercent), shrink: String(shrinkPercent), gs: gs === null ? '' : String(gs), measured: gsMeasured ? 'measured' : 'assumed' }
}

/** A borrow material: where it comes from, how its volume changes, its solids. */
export function MaterialDialog({ material, onClose }: { material?: Material | undefined; onClose: () => void }) {
  const { site, units } = useSite()
  const [id] = useState(() => material?.id ?? crypto.randomUUID())
  const [form, setForm] = useState<MaterialForm>(() => (material === undefined ? BLANK : formOf(material)))
  const [asked, setAsked] = useState(false)
  const record = useRecordMaterial(site.id, { saysOwnErrors: true })
  const update = useUpdateMaterial(site.id, { saysOwnErrors: true })
  const sending = material === undefined ? record : update
  const numberOf = (text: string) => {
    const parsed = units.parse.number(text)
    return parsed.ok ? parsed.value : Number.NaN
  }
  const parsed = createMaterialSchema.safeParse({ id, name: form.name, source: form.source, classification: form.classification, swellPercent: numberOf(form.swell), shrinkPercent: numberOf(form.shrink), gs: form.gs.trim() === '' ? null : numberOf(form.gs), gsMeasured: form.measured === 'measured' })
  const errorOf = (field: string) => (asked && !parsed.success ? parsed.error.issues.find((issue) => issue.path[0] === field)?.message : undefined)
  const save = () => {
    setAsked(true)
    if (!parsed.success) return
    if (material === undefined) record.mutate(parsed.data, { onSuccess: onClose })
    else update.mutate(parsed.data, { onSuccess: onClose })
  }
  const bind = (name: keyof MaterialForm) => ({ value: form[name], onChange: (event: { target: { value: string } }) => setForm({ ...form, [name]: event.target.value }) })
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={material === undefined ? 'New borrow material' : material.name}
      actions={
        <>
          <Button kind="primary" busyLabel={sending.isPending && 'Saving'} onClick={save}>
            Save the material
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid gap-3">
        <TextField label="Name" maxLength={80} error={errorOf('name')} {...bind('name')} />
        <TextField label="Source" maxLength={200} error={errorOf('source')} {...bind('source')} />
        <TextField label="Classification" maxLength={200} error={errorOf('classification')} {...bind('classification')} />
        <NumberField label="Swell, bank to loose" unit="%" error={errorOf('swellPercent')} {...bind('swell')} />
        <NumberField label="Shrink, bank to compacted" unit="%" hint="Negative where it grows when compacted." error={errorOf('shrinkPercent')} {...bind('shrink')} />
        <div className="grid grid-cols-2 items-start gap-3">
          <NumberField label="Specific gravity, if known" warning={form.measured === 'measured' ? undefined : (unusualGravity(numberOf(form.gs)) ?? undefined)} error={errorOf('gs')} {...bind('gs')} />
          <SelectField label="It is" {...bind('measured')}>
            <option value="assumed">Assumed</option>
            <option value="measured">Measured</option>
          </SelectField>
        </div>
        <TypicalGravities />
        {material !== undefined && <p className="m-0 text-small text-ink-2">Swell and shrink hold for fill placed from now on; what was placed keeps its volumes.</p>}
        {issuesOf(sending.error).map((message) => (
          <Banner key={message} tone="bad" title={message} />
        ))}
      </div>
    </Dialog>
  )
}
