import { useState } from 'react'
import { toast } from 'sonner'
import type { CreateInspection } from '#shared/schemas/placement.ts'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { TextArea, TextField } from '#web/components/ui/text-fields.tsx'
import { useRecordInspection } from '#web/data/inspection/mutations.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CellsChoice } from './cells-choice.tsx'
import { TaskFrame } from './task-frame.tsx'

const METHODS = [
  { value: 'proof-roll', label: 'Proof roll' },
  { value: 'visual', label: 'Visual' },
] as const
const OUTCOMES = [
  { value: 'accepted', label: 'Accepted' },
  { value: 'not-accepted', label: 'Not accepted' },
] as const

/** The foundation looked at before the first lift: proof rolled or seen, accepted or not. */
export function Inspection() {
  const { site, units } = useSite()
  const { plan, chosen, end } = useGroundView()
  const record = useRecordInspection(site.id, { saysOwnErrors: true })
  const [id] = useState(() => crypto.randomUUID())
  const now = useSiteClock(site.id)
  const [happenedAt, setHappenedAt] = useState(() => units.field.instant(now()))
  const [method, setMethod] = useState<CreateInspection['method']>('proof-roll')
  const [outcome, setOutcome] = useState<CreateInspection['outcome']>('accepted')
  const [remarks, setRemarks] = useState('')
  const instant = units.parse.instant(happenedAt)
  const outside = chosen.filter((cell) => plan.zoneOf(cell) === undefined)
  const handleSave = (): void => {
    if (instant === null) return
    record.mutate(
      { id, cells: [...chosen], happenedAt: instant, method, outcome, remarks: remarks.trim() },
      {
        onSuccess: () => {
          toast(`Inspection saved`, { description: `${countOf(chosen.length, 'cell')}: foundation ${outcome === 'accepted' ? 'accepted' : 'not accepted'}` })
          end()
        },
      },
    )
  }
  return (
    <TaskFrame
      title="Inspect the foundation"
      act={record}
      saveLabel="Save inspection"
      canSave={chosen.length > 0 && outside.length === 0 && instant !== null}
      onSave={handleSave}
    >
      <CellsChoice error={outside.length > 0 ? `${plan.range(outside)} lies outside every zone. Leave it out.` : undefined} />
      <Segmented label="Method" wide options={METHODS} value={method} onChange={setMethod} />
      <Segmented label="Outcome" wide options={OUTCOMES} value={outcome} onChange={setOutcome} />
      {outcome === 'not-accepted' && <p className="m-0 text-small text-ink-2">What was released on these cells’ foundation is revoked, and people are told.</p>}
      <TextField label="Inspected at" type="datetime-local" value={happenedAt} error={instant === null ? 'Give a date and time' : undefined} onChange={(event) => setHappenedAt(event.target.value)} />
      <TextArea label="Remarks" value={remarks} maxLength={2000} onChange={(event) => setRemarks(event.target.value)} />
    </TaskFrame>
  )
}
