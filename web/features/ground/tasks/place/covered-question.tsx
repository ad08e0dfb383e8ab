import { useState } from 'react'
import { Button } from '#web/components/ui/button.tsx'
import { Question } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'

const SHORTEST_REASON = 3

type CoveredQuestionProps = {
  title: string
  consequence: string
  saving: boolean
  onLeaveOut: () => void
  onPlaceAnyway: (reason: string) => void
  onClose: () => void
}

/** Fill on ground that is not released: leave those cells out, or say why it goes there. */
export function CoveredQuestion({ title, consequence, saving, onLeaveOut, onPlaceAnyway, onClose }: CoveredQuestionProps) {
  const [reason, setReason] = useState<string | null>(null)
  const tooShort = (reason ?? '').trim().length < SHORTEST_REASON
  return (
    <Question
      open
      onOpenChange={(open) => {
        if (!open) onClose()
      }}
      title={title}
      consequence={<p className="m-0">{consequence}</p>}
      actions={
        <>
          <Button kind="primary" onClick={onLeaveOut}>
            Leave them out
          </Button>
          {reason === null ? (
            <Button kind="danger" onClick={() => setReason('')}>
              Place anyway, with reason
            </Button>
          ) : (
            <Button kind="danger" disabled={tooShort} busyLabel={saving && 'Saving'} onClick={() => onPlaceAnyway(reason.trim())}>
              Place anyway
            </Button>
          )}
        </>
      }
    >
      {reason !== null && (
        <TextArea
          label="Why fill goes there now"
          hint="It stays on record and goes to the owner"
          value={reason}
          autoFocus
          maxLength={2000}
          onChange={(event) => setReason(event.target.value)}
        />
      )}
    </Question>
  )
}
