import { useState } from 'react'
import { toast } from 'sonner'
import type { Order } from '#shared/schemas/rework.ts'
import { Button } from '#web/components/ui/button.tsx'
import { useStepOrder } from '#web/data/order/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { AssignDialog } from './assign-dialog.tsx'
import { EditCellsDialog } from './edit-cells-dialog.tsx'
import { ReadyDialog } from './ready-dialog.tsx'
import { ReasonDialog } from './reason-dialog.tsx'

type Asked = 'ready' | 'help' | 'assign' | 'edit' | 'withdraw'

/** What this person may do with the order now; for others nothing stands here. */
export function OrderActs({ order, now }: { order: Order; now: () => number }) {
  const { site, can } = useSite()
  const [asked, setAsked] = useState<Asked | null>(null)
  const step = useStepOrder(site.id)
  const close = () => setAsked(null)
  const start = () =>
    step.mutate(
      { orderId: order.id, step: { id: crypto.randomUUID(), kind: 'started', happenedAt: new Date(now()).toISOString() } },
      { onSuccess: () => toast(`${order.number} is being worked on.`) },
    )
  if (!can('rework.work') && !can('rework.assign')) return null
  return (
    <section aria-label="What you can do" className="flex flex-wrap gap-2">
      {can('rework.work') && order.state === 'issued' && (
        <Button kind="primary" busyLabel={step.isPending && 'Starting'} onClick={start}>
          Start
        </Button>
      )}
      {can('rework.work') && order.state !== 'ready' && (
        <Button kind={order.state === 'working' ? 'primary' : 'plain'} onClick={() => setAsked('ready')}>
          Ready for retest
        </Button>
      )}
      {can('rework.assign') && <Button onClick={() => setAsked('assign')}>Assign</Button>}
      {can('rework.edit') && <Button onClick={() => setAsked('edit')}>Edit cells</Button>}
      {can('rework.work') && <Button onClick={() => setAsked('help')}>I need the lead here</Button>}
      {can('rework.close') && (
        <Button kind="danger" onClick={() => setAsked('withdraw')}>
          Withdraw with reason
        </Button>
      )}
      {asked === 'ready' && <ReadyDialog order={order} now={now} onClose={close} />}
      {asked === 'assign' && <AssignDialog order={order} onClose={close} />}
      {asked === 'edit' && <EditCellsDialog order={order} onClose={close} />}
      {(asked === 'help' || asked === 'withdraw') && <ReasonDialog order={order} act={asked} now={now} onClose={close} />}
    </section>
  )
}
