import { zodResolver } from '@hookform/resolvers/zod'
import { useState, type ComponentProps } from 'react'
import { useForm } from 'react-hook-form'
import type { z } from 'zod'
import { createViewSchema, type SavedView, type ViewContent } from '#shared/schemas/saved-view.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextField } from '#web/components/ui/text-fields.tsx'
import { useChooseDefaultView, useCreateView } from '#web/data/view/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

const formSchema = createViewSchema.pick({ name: true, shared: true })

/** Keeps what is shown, filter, order and columns, under a name. */
export function SaveViewDialog({ content, onSaved, onClose }: { content: ViewContent; onSaved: (view: SavedView) => void; onClose: () => void }) {
  const { site, can } = useSite()
  const [id] = useState(() => crypto.randomUUID())
  const [first, setFirst] = useState(false)
  const creating = useCreateView(site.id, { saysOwnErrors: true })
  const choosing = useChooseDefaultView(site.id)
  const { register, handleSubmit, formState } = useForm<z.infer<typeof formSchema>>({ resolver: zodResolver(formSchema), defaultValues: { name: '', shared: false } })
  const handleSave = handleSubmit((values) =>
    creating.mutate(
      { id, ...values, content },
      {
        onSuccess: (view) => {
          if (first) choosing.mutate({ viewId: view.id })
          onSaved(view)
          onClose()
        },
      },
    ),
  )
  return (
    <Dialog open onOpenChange={(open) => !open && onClose()} title="Save as a view" description="Keeps the filter, the order and the columns, not the results: a view always shows the tests as they stand.">
      <form noValidate onSubmit={(event) => void handleSave(event)} className="grid gap-[14px]">
        {creating.error !== null && (
          <Banner tone="bad" title="Not saved.">
            {creating.error.message}
          </Banner>
        )}
        <TextField label="Name" maxLength={80} autoComplete="off" error={formState.errors.name?.message} {...register('name')} />
        {can('view.share') && <Tick label="Show it to everybody who sees the results" {...register('shared')} />}
        <Tick label="Open Results with it" checked={first} onChange={(event) => setFirst(event.target.checked)} />
        <div className="flex flex-wrap gap-2 pb-2">
          <Button type="submit" kind="primary" size="touch" busyLabel={creating.isPending && 'Saving'}>
            Save view
          </Button>
          <DialogClose>
            <Button size="touch">Cancel</Button>
          </DialogClose>
        </div>
      </form>
    </Dialog>
  )
}

function Tick({ label, ...rest }: ComponentProps<'input'> & { label: string }) {
  return (
    <label className="flex min-h-9 items-center gap-2 font-medium pointer-coarse:min-h-12">
      <input type="checkbox" {...rest} className="size-[18px] accent-ink" />
      {label}
    </label>
  )
}
