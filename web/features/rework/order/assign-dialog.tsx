import { useQuery } from '@tanstack/react-query'
import { useId, useState } from 'react'
import { ROLE_LABELS } from '#shared/policies/role.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextField } from '#web/components/ui/text-fields.tsx'
import { memberQueries } from '#web/data/member/queries.ts'
import { useStepOrder } from '#web/data/order/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** Names who does the work: somebody of the site, or a crew written by hand. */
export function AssignDialog({ order, onClose }: { order: Order; onClose: () => void }) {
  const { site } = useSite()
  const listId = useId()
  const [id] = useState(() => crypto.randomUUID())
  const [to, setTo] = useState(order.assignedTo ?? '')
  const [missing, setMissing] = useState(false)
  const { data: members = [] } = useQuery(memberQueries.list(site.id))
  const step = useStepOrder(site.id, { saysOwnErrors: true })
  const assign = () => {
    const name = to.trim()
    setMissing(name === '')
    if (name !== '') step.mutate({ orderId: order.id, step: { id, kind: 'assigned', to: name } }, { onSuccess: onClose })
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Who works on ${order.number}?`}
      description="An operator whose name stands here finds the order on their own sheet."
      actions={
        <>
          <Button kind="primary" busyLabel={step.isPending && 'Assigning'} onClick={assign}>
            Assign
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <TextField label="Person or crew" list={listId} maxLength={80} value={to} error={missing ? 'Say who' : undefined} onChange={(event) => setTo(event.target.value)} />
      <datalist id={listId}>
        {members.map((member) => (
          <option key={member.userId} value={member.name}>
            {ROLE_LABELS[member.role]}
          </option>
        ))}
      </datalist>
      {step.error !== null && <Banner tone="bad" className="mt-3" title={step.error.message} />}
    </Dialog>
  )
}
