import { useState } from 'react'
import { Button } from '#web/components/ui/button.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import type { Order } from '#shared/schemas/rework.ts'

/** One more tap before the lead is called, with a word about why if there is one. */
export function CabHelp({ order, onCall, onBack }: { order: Order; onCall: (remarks: string) => void; onBack: () => void }) {
  const [remarks, setRemarks] = useState('')
  return (
    <>
      <div className="min-h-0 flex-1 overflow-y-auto px-[18px] pt-4 pb-2">
        <h2 className="m-0 mb-2 text-verdict font-extrabold">Call the lead to {order.number}?</h2>
        <p className="m-0 mb-4 text-[15px] text-ink-2">The QC lead sees it on the order with the time. In an emergency do as the site safety plan says.</p>
        <TextArea label="What about (may stay empty)" value={remarks} maxLength={2_000} onChange={(event) => setRemarks(event.target.value)} />
      </div>
      <div className="grid gap-[10px] px-[18px] pt-[14px] pb-5">
        <Button kind="act" size="cab" onClick={() => onCall(remarks.trim())}>
          Call the lead
        </Button>
        <Button size="touch" className="w-full bg-transparent!" onClick={onBack}>
          Back to the work
        </Button>
      </div>
    </>
  )
}
