import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { toast } from 'sonner'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useCreateRelease } from '#web/data/release/mutations.ts'
import { releaseQueries } from '#web/data/release/queries.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf, liftWords } from '#web/features/ground/plan/ground-words.ts'
import { CellsChoice } from '#web/features/ground/tasks/cells-choice.tsx'
import { TaskFrame } from '#web/features/ground/tasks/task-frame.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { ReleaseChecklist, standingOf } from './release-checklist.tsx'

/** The lead releases cells of a lift; the superintendent asks for it. The checklist is the server's. */
export function ReleaseCells({ lift }: { lift: number }) {
  const { site, can } = useSite()
  const { plan, chosen, end } = useGroundView()
  const issues = can('release.issue')
  const create = useCreateRelease(site.id, { saysOwnErrors: true })
  const now = useSiteClock(site.id)
  const [id] = useState(() => crypto.randomUUID())
  const [reason, setReason] = useState('')
  const [remarks, setRemarks] = useState('')
  const zones = new Set(chosen.map((cell) => plan.zoneOf(cell)?.id))
  const [zoneId] = zones
  const oneZone = zones.size === 1 && zoneId !== undefined
  const check = useQuery(releaseQueries.check(site.id, oneZone ? { zoneId, lift, cells: [...chosen] } : null))
  const standing = standingOf(oneZone ? check.data : undefined)
  const reasoned = reason.trim().length >= 3
  const canSave = oneZone && (!issues || standing === 'free' || (standing === 'with-reason' && reasoned))
  const handleSave = (): void => {
    if (zoneId === undefined) return
    create.mutate(
      { id, zoneId, lift, cells: [...chosen], happenedAt: new Date(now()).toISOString(), overrideReason: issues && standing === 'with-reason' ? reason.trim() : null, remarks: remarks.trim() },
      {
        onSuccess: ({ number, cells }) => {
          const what = !issues ? 'asked for' : check.data?.hold === true ? 'released, waits for the owner’s acceptance' : 'released'
          toast(`${number ?? 'Release'} ${what}`, { description: `${countOf(cells, 'cell')} at ${liftWords(lift)}` })
          end()
        },
      },
    )
  }
  return (
    <TaskFrame
      title={`${issues ? 'Release' : 'Ask for release of'} ${liftWords(lift)}`}
      act={create}
      saveLabel={!issues ? 'Ask for release' : standing === 'with-reason' ? 'Release with reason' : 'Release'}
      saveKind={standing === 'with-reason' && issues ? 'danger' : 'primary'}
      canSave={canSave}
      onSave={handleSave}
    >
      <CellsChoice error={zones.size > 1 ? 'These cells lie in more than one zone. Release one zone at a time.' : undefined} />
      {oneZone && check.data !== undefined && <ReleaseChecklist check={check.data} cells={chosen.length} mayLeaveOut />}
      {check.error !== null && <p className="m-0 text-bad">{check.error.message}</p>}
      {issues && standing === 'with-reason' && (
        <TextArea label="Why it is released all the same" hint="It goes to the owner" value={reason} maxLength={2000} onChange={(event) => setReason(event.target.value)} />
      )}
      <TextArea label="Remarks" rows={2} value={remarks} maxLength={2000} onChange={(event) => setRemarks(event.target.value)} />
    </TaskFrame>
  )
}
