import { useState } from 'react'
import { createMaterialSchema } from '#shared/schemas/lab.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { NumberField, TextField } from '#web/components/ui/text-fields.tsx'
import { useRecordMaterial } from '#web/data/material/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { issuesOf } from '#web/features/lab/lab-words.ts'

type MaterialForm = { readonly name: string; readonly source: string; readonly classification: string; readonly swell: string; readonly shrink: string }

/** A borrow material: where it comes from and how its volume changes. */
export function MaterialDialog({ onClose }: { onClose: () => void }) {
  const { site, units } = useSite()
  const [id] = useState(() => crypto.randomUUID())
  const [form, setForm] = useState<MaterialForm>({ name: '', source: '', classification: '', swell: '', shrink: '' })
  const [asked, setAsked] = useState(false)
  const record = useRecordMaterial(site.id, { saysOwnErrors: true })
  const numberOf = (text: string) => {
    const parsed = units.parse.number(text)
    return parsed.ok ? parsed.value : Number.NaN
  }
  const parsed = createMaterialSchema.safeParse({ id, name: form.name, source: form.source, classification: form.classification, swellPercent: numberOf(form.swell), shrinkPercent: numberOf(form.shrink) })
  const errorOf = (field: string) => (asked && !parsed.success ? parsed.error.issues.find((issue) => issue.path[0] === field)?.message : undefined)
  const save = () => {
    setAsked(true)
    if (parsed.success) record.mutate(parsed.data, { onSuccess: onClose })
  }
  const bind = (name: keyof MaterialForm) => ({ value: form[name], onChange: (event: { target: { value: string } }) => setForm({ ...form, [name]: event.target.value }) })
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="New borrow material"
      actions={
        <>
          <Button kind="primary" busyLabel={record.isPending && 'Saving'} onClick={save}>
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
        {issuesOf(record.error).map((message) => (
          <Banner key={message} tone="bad" title={message} />
        ))}
      </div>
    </Dialog>
  )
}
