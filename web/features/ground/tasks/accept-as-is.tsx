import { useState } from 'react'
import { toast } from 'sonner'
import { createDispositionSchema } from '#shared/schemas/placement.ts'
import { TextArea, TextField } from '#web/components/ui/text-fields.tsx'
import { useAcceptAsIs } from '#web/data/disposition/mutations.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf, liftWords } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CellsChoice } from './cells-choice.tsx'
import { TaskFrame } from './task-frame.tsx'

/** The owner's representative accepts ground that does not meet specification, on an engineer's disposition. */
export function AcceptAsIs({ lift }: { lift: number }) {
  const { site } = useSite()
  const { chosen, end } = useGroundView()
  const accept = useAcceptAsIs(site.id, { saysOwnErrors: true })
  const [id] = useState(() => crypto.randomUUID())
  const [engineer, setEngineer] = useState('')
  const [document, setDocument] = useState('')
  const [reason, setReason] = useState('')
  const read = createDispositionSchema.safeParse({ id, lift, cells: [...chosen], engineer, document, reason })
  const handleSave = (): void => {
    if (!read.success) return
    accept.mutate(read.data, {
      onSuccess: () => {
        toast('Accepted as is', { description: `${countOf(chosen.length, 'cell')} at ${liftWords(lift)}` })
        end()
      },
    })
  }
  return (
    <TaskFrame title={`Accept ${liftWords(lift)} as is`} act={accept} saveLabel="Accept as is" canSave={read.success} onSave={handleSave}>
      <CellsChoice />
      <TextField label="Engineer" hint="The licensed engineer who disposes of it" value={engineer} maxLength={80} onChange={(event) => setEngineer(event.target.value)} />
      <TextField label="Document" hint="Letter, memo or report, with its date" value={document} maxLength={200} onChange={(event) => setDocument(event.target.value)} />
      <TextArea label="Reason" value={reason} maxLength={2000} onChange={(event) => setReason(event.target.value)} />
    </TaskFrame>
  )
}
