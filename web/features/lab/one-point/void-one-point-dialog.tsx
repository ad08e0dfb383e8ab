import { useState } from 'react'
import type { OnePointCheck } from '#shared/schemas/one-point.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useVoidOnePoint } from '#web/data/one-point/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** Takes a check out of force, with a reason; it stays on record. */
export function VoidOnePointDialog({ check, onClose }: { check: OnePointCheck; onClose: () => void }) {
  const { site } = useSite()
  const [reason, setReason] = useState('')
  const [asked, setAsked] = useState(false)
  const voiding = useVoidOnePoint(site.id, { saysOwnErrors: true })
  const missing = reason.trim().length < 3
  const send = () => {
    setAsked(true)
    if (!missing) voiding.mutate({ id: check.id, reason: reason.trim() }, { onSuccess: onClose })
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Void ${check.number}?`}
      description={`It stays on record with your reason.${check.test !== null && check.result.off?.off === true ? ` The flag it set on ${check.test.number} falls.` : ''}`}
      actions={
        <>
          <DialogClose>
            <Button kind="primary" size="touch">
              Keep it
            </Button>
          </DialogClose>
          <Button kind="danger" size="touch" busyLabel={voiding.isPending && 'Voiding'} onClick={send}>
            Void with reason
          </Button>
        </>
      }
    >
      <TextArea label="Reason" rows={2} maxLength={2_000} value={reason} error={asked && missing ? 'Say why, in a few words' : undefined} onChange={(event) => setReason(event.target.value)} />
      {voiding.error !== null && (
        <Banner tone="bad" className="mt-3" title="Not voided.">
          {voiding.error.message}
        </Banner>
      )}
    </Dialog>
  )
}
