import { useQuery } from '@tanstack/react-query'
import { useMemo, useState } from 'react'
import type { Curve } from '#shared/schemas/lab.ts'
import type { CurveBrief, RejudgeAnswer, RejudgedTest } from '#shared/schemas/rejudge.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useRejudgeTests } from '#web/data/rejudge/mutations.ts'
import { rejudgeQueries } from '#web/data/rejudge/queries.ts'
import { issuesOf } from '#web/features/lab/lab-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { RejudgeEffects } from './rejudge-effects.tsx'
import { countOf } from './rejudge-words.ts'

type RejudgeDialogProps = {
  curve: Curve
  by: CurveBrief
  tests: readonly RejudgedTest[]
  onClose: () => void
  onDone: (answer: RejudgeAnswer) => void
}

/** Says what judging the chosen tests again would do to the ground, rehearsed by the server, and asks why. */
export function RejudgeDialog({ curve, by, tests, onClose, onDone }: RejudgeDialogProps) {
  const { site } = useSite()
  const [id] = useState(() => crypto.randomUUID())
  const [reason, setReason] = useState('')
  const [asked, setAsked] = useState(false)
  const ids = useMemo(() => tests.map((test) => test.id), [tests])
  const rehearsal = useQuery(rejudgeQueries.rehearsal(site.id, curve.id, by.id, ids))
  const rejudge = useRejudgeTests(site.id, { saysOwnErrors: true })
  const missing = reason.trim().length < 3
  const send = () => {
    setAsked(true)
    if (missing) return
    rejudge.mutate({ id, curveId: curve.id, by: by.id, tests: ids, reason: reason.trim() }, { onSuccess: onDone })
  }
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Judge ${countOf(tests.length, 'test')} again by ${by.code}?`}
      description={`The new verdicts are in force at once. Those by ${curve.code} are kept on each test’s sheet.`}
      actions={
        <>
          <DialogClose>
            <Button size="touch">Leave them</Button>
          </DialogClose>
          <Button kind="primary" size="touch" disabled={rehearsal.data === undefined} busyLabel={rejudge.isPending && 'Judging'} onClick={send}>
            Judge again
          </Button>
        </>
      }
    >
      <SectionHead level={3}>What it does to the ground</SectionHead>
      {rehearsal.isPending && <Skeleton label="It is being rehearsed" lines={[70, 60]} />}
      {rehearsal.error !== null && (
        <Banner tone="bad" title="It could not be rehearsed." action={<button type="button" onClick={() => void rehearsal.refetch()}>Try again</button>}>
          {rehearsal.error.message}
        </Banner>
      )}
      {rehearsal.data !== undefined && <RejudgeEffects answer={rehearsal.data} />}
      <TextArea className="mt-4" label="Why" rows={2} maxLength={2_000} value={reason} error={asked && missing ? 'Say why, in a few words' : undefined} onChange={(event) => setReason(event.target.value)} />
      {issuesOf(rejudge.error).map((message) => (
        <Banner key={message} tone="bad" className="mt-3" title={message} />
      ))}
    </Dialog>
  )
}
