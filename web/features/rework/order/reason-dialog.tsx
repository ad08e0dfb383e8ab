import { useState } from 'react'
import { toast } from 'sonner'
import type { Order } from '#shared/schemas/rework.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useStepOrder, useWithdrawOrder } from '#web/data/order/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

const WORDS = {
  help: {
    title: (number: string) => `Call the lead to ${number}?`,
    description: 'It stands on the order with the time. In an emergency do as the site safety plan says.',
    field: 'What about (may stay empty)',
    act: 'Call the lead',
    busy: 'Calling',
  },
  withdraw: {
    title: (number: string) => `Withdraw ${number}?`,
    description: 'The order ends without rework, and your reason stays on it. A test that still fails keeps its order.',
    field: 'Reason',
    act: 'Withdraw the order',
    busy: 'Withdrawing',
  },
} as const

type ReasonDialogProps = { order: Order; act: keyof typeof WORDS; now: () => number; onClose: () => void }

/** Asks for a word before the lead is called, or before an order is taken back. */
export function ReasonDialog({ order, act, now, onClose }: ReasonDialogProps) {
  const { site } = useSite()
  const words = WORDS[act]
  const [id] = useState(() => crypto.randomUUID())
  const [text, setText] = useState('')
  const [asked, setAsked] = useState(false)
  const step = useStepOrder(site.id, { saysOwnErrors: true })
  const withdraw = useWithdrawOrder(site.id, { saysOwnErrors: true })
  const missing = act === 'withdraw' && text.trim().length < 3
  const send = () => {
    setAsked(true)
    if (missing) return
    if (act === 'withdraw') {
      withdraw.mutate({ orderId: order.id, reason: text.trim() }, { onSuccess: onClose })
      return
    }
    step.mutate(
      { orderId: order.id, step: { id, kind: 'help', happenedAt: new Date(now()).toISOString(), remarks: text.trim() } },
      {
        onSuccess: () => {
          toast(`The lead is asked to come to ${order.number}.`)
          onClose()
        },
      },
    )
  }
  const error = step.error ?? withdraw.error
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={words.title(order.number)}
      description={words.description}
      actions={
        <>
          <Button kind={act === 'withdraw' ? 'danger' : 'primary'} busyLabel={(step.isPending || withdraw.isPending) && words.busy} onClick={send}>
            {words.act}
          </Button>
          <DialogClose>
            <Button kind="quiet">Leave it as it is</Button>
          </DialogClose>
        </>
      }
    >
      <TextArea label={words.field} rows={2} maxLength={2_000} value={text} error={asked && missing ? 'Say why, in a few words' : undefined} onChange={(event) => setText(event.target.value)} />
      {error !== null && <Banner tone="bad" className="mt-3" title={error.message} />}
    </Dialog>
  )
}
