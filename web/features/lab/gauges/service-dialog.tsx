import { useState } from 'react'
import { toast } from 'sonner'
import type { Gauge } from '#shared/schemas/gauge.ts'
import { TextArea, TextField } from '#web/components/ui/text-fields.tsx'
import { usePutBack, useTakeOut, useVoidCount, useWithdrawCorrection } from '#web/data/gauge/mutations.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { GaugeDialog } from './gauge-dialog.tsx'

const WHY = 'Say why, in a few words'
const WHEN = 'Give the date and time'

/** Takes a gauge out of service, or puts it back. */
export function ServiceDialog({ gauge, back, onClose }: { gauge: Gauge; back: boolean; onClose: () => void }) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  const [id] = useState(() => crypto.randomUUID())
  const [at, setAt] = useState(() => units.field.instant(now()))
  const [text, setText] = useState('')
  const [asked, setAsked] = useState(false)
  const takeOut = useTakeOut(site.id, { saysOwnErrors: true })
  const putBack = usePutBack(site.id, { saysOwnErrors: true })
  const happenedAt = units.parse.instant(at)
  const missing = !back && text.trim().length < 3
  const done = {
    onSuccess: () => {
      toast(`Gauge ${gauge.serial} is ${back ? 'back in service' : 'out of service'}.`)
      onClose()
    },
  }
  const save = () => {
    setAsked(true)
    if (happenedAt === null || missing) return
    if (back) putBack.mutate({ gaugeId: gauge.id, happenedAt, remarks: text.trim() }, done)
    else takeOut.mutate({ gaugeId: gauge.id, id, happenedAt, reason: text.trim() }, done)
  }
  return (
    <GaugeDialog
      title={back ? `Put gauge ${gauge.serial} back in service?` : `Take gauge ${gauge.serial} out of service?`}
      description={back ? 'It still needs a good count on the day it is used.' : 'Results read with it from then on hold their release.'}
      act={back ? 'Put it back' : 'Take it out'}
      danger={!back}
      busy={takeOut.isPending || putBack.isPending}
      error={takeOut.error ?? putBack.error}
      onSave={save}
      onClose={onClose}
    >
      <TextField label={back ? 'Back since' : 'Out since'} type="datetime-local" value={at} error={asked && happenedAt === null ? WHEN : undefined} onChange={(event) => setAt(event.target.value)} />
      <TextArea label={back ? 'What was done, may stay empty' : 'Why'} rows={2} maxLength={2_000} value={text} error={asked && missing ? WHY : undefined} onChange={(event) => setText(event.target.value)} />
    </GaugeDialog>
  )
}

type WithReasonProps = { gauge: Gauge; part: { readonly kind: 'count' | 'correction'; readonly id: string; readonly name: string }; onClose: () => void }

/** Voids a count or withdraws a correction; both stay in the log with the reason. */
export function WithReasonDialog({ gauge, part, onClose }: WithReasonProps) {
  const { site } = useSite()
  const [reason, setReason] = useState('')
  const [asked, setAsked] = useState(false)
  const voidCount = useVoidCount(site.id, { saysOwnErrors: true })
  const withdraw = useWithdrawCorrection(site.id, { saysOwnErrors: true })
  const missing = reason.trim().length < 3
  const isCount = part.kind === 'count'
  const save = () => {
    setAsked(true)
    if (missing) return
    const sent = { gaugeId: gauge.id, partId: part.id, reason: reason.trim() }
    if (isCount) voidCount.mutate(sent, { onSuccess: onClose })
    else withdraw.mutate(sent, { onSuccess: onClose })
  }
  return (
    <GaugeDialog
      title={isCount ? `Void the count of ${part.name}?` : `Withdraw the correction for ${part.name}?`}
      description={isCount ? 'It stays in the log, struck out. If no other count of that day is good, results read with the gauge that day hold their release.' : 'It is offered no more. Tests keep the K they were recorded with.'}
      act={isCount ? 'Void the count' : 'Withdraw it'}
      danger
      busy={voidCount.isPending || withdraw.isPending}
      error={voidCount.error ?? withdraw.error}
      onSave={save}
      onClose={onClose}
    >
      <TextArea label="Reason" rows={2} maxLength={2_000} value={reason} error={asked && missing ? WHY : undefined} onChange={(event) => setReason(event.target.value)} />
    </GaugeDialog>
  )
}
