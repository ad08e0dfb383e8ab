import { useState } from 'react'
import { toast } from 'sonner'
import type { Order } from '#shared/schemas/rework.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { NumberField, TextArea } from '#web/components/ui/text-fields.tsx'
import { useStepOrder } from '#web/data/order/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { readReadyForm, readyFormOf, type ReadyErrors } from './ready-form.ts'

/** What was done to the ground, before it is reported ready for its retest. */
export function ReadyDialog({ order, now, onClose }: { order: Order; now: () => number; onClose: () => void }) {
  const { site, units } = useSite()
  const [id] = useState(() => crypto.randomUUID())
  const [form, setForm] = useState(() => readyFormOf(order, units))
  const [errors, setErrors] = useState<ReadyErrors>({})
  const step = useStepOrder(site.id, { saysOwnErrors: true })
  const report = () => {
    const read = readReadyForm(form, units)
    setErrors(read.ok ? {} : read.errors)
    if (!read.ok) return
    step.mutate(
      { orderId: order.id, step: { id, kind: 'ready', happenedAt: new Date(now()).toISOString(), ...read.done } },
      {
        onSuccess: () => {
          toast(`${order.number} is reported ready for retest.`)
          onClose()
        },
      },
    )
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Report ${order.number} ready for retest`}
      description="Earlier tests in these cells stop counting, and the places of the retests are drawn."
      actions={
        <>
          <Button kind="primary" busyLabel={step.isPending && 'Reporting'} onClick={report}>
            Report ready
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <div className="grid gap-3">
        <NumberField label="Passes" unit="passes" value={form.passes} error={errors.passes} onChange={(event) => setForm({ ...form, passes: event.target.value })} />
        <NumberField label="Water added" unit={units.marks.water} value={form.water} error={errors.water} onChange={(event) => setForm({ ...form, water: event.target.value })} />
        <NumberField label="Depth worked" unit={units.marks.thickness} value={form.depth} error={errors.depth} onChange={(event) => setForm({ ...form, depth: event.target.value })} />
        <TextArea label="Remarks" rows={2} maxLength={2_000} value={form.remarks} onChange={(event) => setForm({ ...form, remarks: event.target.value })} />
        {step.error !== null && <Banner tone="bad" title={step.error.message} />}
      </div>
    </Dialog>
  )
}
