import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { toast } from 'sonner'
import type { Gauge } from '#shared/schemas/gauge.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { NumberField, TextField } from '#web/components/ui/text-fields.tsx'
import { useRecordCount } from '#web/data/gauge/mutations.ts'
import { gaugeQueries } from '#web/data/gauge/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { emptyCount, figure, readCount, type CountForm } from './count-form.ts'
import { CountJudgement, StabilityWords } from './count-judgement.tsx'

type CountDialogProps = {
  gauge: Pick<Gauge, 'id' | 'serial'>
  /** when it is taken to have been counted, epoch milliseconds or an ISO text */
  at: number | string
  onClose: () => void
}

/** A standard count: two figures, judged while they are typed. A bad one is kept too, and counted again. */
export function CountDialog({ gauge, at, onClose }: CountDialogProps) {
  const { site, units } = useSite()
  const [id] = useState(() => crypto.randomUUID())
  const [form, setForm] = useState<CountForm>(() => emptyCount(units.field.instant(at)))
  const [asked, setAsked] = useState(false)
  const record = useRecordCount(site.id, { saysOwnErrors: true })
  const countedAt = units.parse.instant(form.countedAt)
  const register = useQuery({ ...gaugeQueries.list(site.id, countedAt), enabled: countedAt !== null })
  const reference = register.data?.find((each) => each.id === gauge.id)?.check.reference ?? null
  const read = readCount(id, form, units)
  const errorOf = (path: string) => (asked && !read.ok ? read.errors[path] : undefined)
  const set = (change: Partial<CountForm>) => setForm((last) => ({ ...last, ...change }))
  const pairOf = (pair: { density: string; moisture: string }) => ({ density: figure(pair.density, units), moisture: figure(pair.moisture, units) })
  const save = () => {
    setAsked(true)
    if (!read.ok) return
    record.mutate(
      { gaugeId: gauge.id, ...read.count },
      {
        onSuccess: () => {
          toast(`The count of gauge ${gauge.serial} is kept.`)
          onClose()
        },
      },
    )
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Standard count, gauge ${gauge.serial}`}
      description="Gauge warmed up, on its block, as its manual says."
      actions={
        <>
          <Button kind="primary" className="pointer-coarse:min-h-12 max-sm:flex-1" busyLabel={record.isPending && 'Saving'} onClick={save}>
            Save the count
          </Button>
          <DialogClose>
            <Button kind="quiet" className="pointer-coarse:min-h-12">
              Cancel
            </Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid gap-3">
        <div className="grid grid-cols-2 items-start gap-3">
          <NumberField autoFocus label="Density count" value={form.density} error={errorOf('density')} onChange={(event) => set({ density: event.target.value })} />
          <NumberField label="Moisture count" value={form.moisture} error={errorOf('moisture')} onChange={(event) => set({ moisture: event.target.value })} />
        </div>
        <CountJudgement count={pairOf(form)} reference={reference} reading={register.isPending && countedAt !== null} />
        <TextField label="Counted" type="datetime-local" value={form.countedAt} error={errorOf('countedAt')} onChange={(event) => set({ countedAt: event.target.value })} />
        <label className="flex min-h-11 cursor-pointer items-center gap-3 font-semibold">
          <input type="checkbox" className="size-5 accent-ink" checked={form.withStability} onChange={(event) => set({ withStability: event.target.checked })} />
          A stability check of five counts was made
        </label>
        {form.withStability && <FiveCounts form={form} onChange={set} errorOf={errorOf} />}
        {form.withStability && <StabilityWords five={form.five.map(pairOf)} />}
        <TextField label="Remarks, may stay empty" maxLength={2_000} value={form.remarks} onChange={(event) => set({ remarks: event.target.value })} />
        {register.error !== null && <Banner tone="bad" title="The reference could not be read." action={<button type="button" onClick={() => void register.refetch()}>Try again</button>}>The count can be saved all the same.</Banner>}
        {record.error !== null && <Banner tone="bad" title={record.error.message} />}
      </div>
    </Dialog>
  )
}

function FiveCounts({ form, onChange, errorOf }: { form: CountForm; onChange: (change: Partial<CountForm>) => void; errorOf: (path: string) => string | undefined }) {
  const setAt = (index: number, name: 'density' | 'moisture', text: string) => onChange({ five: form.five.map((pair, at) => (at === index ? { ...pair, [name]: text } : pair)) })
  return (
    <div className="grid grid-cols-2 items-start gap-x-3 gap-y-2">
      {form.five.map((pair, index) =>
        (['density', 'moisture'] as const).map((name) => (
          <NumberField key={`${index} ${name}`} label={`${name === 'density' ? 'Density' : 'Moisture'} ${index + 1}`} value={pair[name]} error={errorOf(`five.${index}.${name}`)} onChange={(event) => setAt(index, name, event.target.value)} />
        )),
      )}
    </div>
  )
}
