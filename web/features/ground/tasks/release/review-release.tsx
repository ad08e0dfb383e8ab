import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { toast } from 'sonner'
import type { Release } from '#shared/schemas/release.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useAcceptRelease, useDeclineRelease, useIssueRelease } from '#web/data/release/mutations.ts'
import { releaseQueries } from '#web/data/release/queries.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { countOf, liftWords } from '#web/features/ground/plan/ground-words.ts'
import { TaskFrame } from '#web/features/ground/tasks/task-frame.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { ReleaseChecklist, standingOf } from './release-checklist.tsx'

function ReleaseFacts({ release }: { release: Release }) {
  const { units } = useSite()
  const { plan } = useGroundView()
  const lines = [
    `${plan.zone(release.zoneId)?.name ?? ''}, ${liftWords(release.lift)}: ${plan.range(release.cells.map(({ cell }) => cell))}`,
    release.askedBy === null ? null : `Asked for by ${release.askedBy.name}`,
    release.issuedBy === null || release.issuedAt === null ? null : `Released by ${release.issuedBy.name}, ${units.dateTime(release.issuedAt)}`,
    release.remarks === '' ? null : release.remarks,
  ].filter((line) => line !== null)
  return (
    <>
      {lines.map((line) => (
        <p key={line} className="m-0">
          {line}
        </p>
      ))}
      {release.overrideReason !== null && (
        <Banner tone="off" title="Released with the frequency short.">
          {release.overrideReason}
        </Banner>
      )}
    </>
  )
}

/** The lead's answer to what was asked for, or the owner's at a hold point. */
function ReviewForm({ release }: { release: Release }) {
  const { site } = useSite()
  const { end } = useGroundView()
  const asked = release.status === 'asked'
  const words = { saysOwnErrors: true }
  const issue = useIssueRelease(site.id, words)
  const accept = useAcceptRelease(site.id, words)
  const decline = useDeclineRelease(site.id, words)
  const [reason, setReason] = useState('')
  const [declining, setDeclining] = useState(false)
  const cells = release.cells.filter((cell) => cell.revoked === null).map(({ cell }) => cell)
  const check = useQuery(releaseQueries.check(site.id, asked ? { zoneId: release.zoneId, lift: release.lift, cells } : null))
  const standing = asked ? standingOf(check.data) : 'free'
  const reasoned = reason.trim().length >= 3
  const done = (what: string) => () => {
    toast(`${release.number} ${what}`, { description: countOf(cells.length, 'cell') })
    end()
  }
  const handleSave = (): void => {
    if (declining) decline.mutate({ id: release.id, reason: reason.trim() }, { onSuccess: done('declined') })
    else if (asked) issue.mutate({ id: release.id, overrideReason: standing === 'with-reason' ? reason.trim() : null }, { onSuccess: done('released') })
    else accept.mutate({ id: release.id }, { onSuccess: done('accepted') })
  }
  const yes = asked ? (standing === 'with-reason' ? 'Release with reason' : 'Release') : 'Accept'
  const canSave = declining || standing === 'with-reason' ? reasoned : standing === 'free'
  return (
    <TaskFrame
      title={`Review ${release.number}`}
      act={declining ? decline : asked ? issue : accept}
      saveLabel={declining ? 'Decline' : yes}
      saveKind={declining || standing === 'with-reason' ? 'danger' : 'primary'}
      canSave={canSave}
      onSave={handleSave}
      more={
        <Button onClick={() => setDeclining(!declining)} className="pointer-coarse:min-h-12">
          {declining ? 'Back' : 'Decline, with reason'}
        </Button>
      }
    >
      <ReleaseFacts release={release} />
      {asked && check.data !== undefined && <ReleaseChecklist check={check.data} cells={cells.length} mayLeaveOut={false} />}
      {(declining || standing === 'with-reason') && (
        <TextArea
          label={declining ? 'Why it is declined' : 'Why it is released all the same'}
          hint={declining ? 'The person who asked reads it' : 'It goes to the owner'}
          value={reason}
          maxLength={2000}
          onChange={(event) => setReason(event.target.value)}
        />
      )}
    </TaskFrame>
  )
}

export function ReviewRelease({ releaseId }: { releaseId: string }) {
  const { site } = useSite()
  const { end } = useGroundView()
  const releases = useQuery(releaseQueries.list(site.id))
  const release = releases.data?.find((each) => each.id === releaseId)
  if (release !== undefined && (release.status === 'asked' || release.status === 'awaiting-acceptance')) return <ReviewForm key={release.id} release={release} />
  if (releases.data === undefined) return <Skeleton label="The release is on its way" />
  return (
    <Banner title={`${release?.number ?? 'This release'} needs no answer any more.`} className="m-[22px]" action={<button type="button" onClick={end}>Close</button>}>
      Somebody answered it meanwhile.
    </Banner>
  )
}
