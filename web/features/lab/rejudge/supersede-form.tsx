import { useState } from 'react'
import { toast } from 'sonner'
import type { Curve } from '#shared/schemas/lab.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { SelectField, TextArea } from '#web/components/ui/text-fields.tsx'
import { useSupersedeCurve } from '#web/data/rejudge/mutations.ts'
import { issuesOf, pairWords } from '#web/features/lab/lab-words.ts'
import { useSite } from '#web/lib/site-context.tsx'

type SupersedeFormProps = { curve: Curve; choices: readonly Curve[]; chosen: string; onChoose: (id: string) => void }

/** Puts another curve in a curve's place, with a reason; the table beneath already shows what judging again would change. */
export function SupersedeForm({ curve, choices, chosen, onChoose }: SupersedeFormProps) {
  const { site, can, units } = useSite()
  const [reason, setReason] = useState('')
  const [asked, setAsked] = useState(false)
  const supersede = useSupersedeCurve(site.id, { saysOwnErrors: true })
  const missing = { successor: chosen === '', reason: reason.trim().length < 3 }
  if (choices.length === 0) {
    return (
      <EmptyState title={`Nothing can take the place of ${curve.code} yet`}>
        Its successor is an approved curve of {curve.materialName}. Record one, and have the lead approve it.
      </EmptyState>
    )
  }
  const send = () => {
    setAsked(true)
    if (missing.successor || missing.reason) return
    supersede.mutate(
      { curveId: curve.id, successorId: chosen, reason: reason.trim() },
      { onSuccess: (answer) => toast(`${answer.code} is superseded by ${answer.superseded?.by.code ?? 'its successor'}. No verdict has changed.`) },
    )
  }
  return (
    <section className="mb-7 max-w-[760px] print:hidden">
      <SectionHead aside={pairWords(curve.pair, units)}>{can('curve.supersede') ? `Supersede ${curve.code}` : `Compare ${curve.code}`}</SectionHead>
      <p className="mt-0 mb-3 text-ink-2">New tests take its successor. Tests judged by {curve.code} keep their verdicts until they are judged again.</p>
      <SelectField className="max-w-[420px]" label="By" value={chosen} error={asked && missing.successor ? 'Choose the curve that takes its place' : undefined} onChange={(event) => onChoose(event.target.value)}>
        <option value="">Choose an approved curve</option>
        {choices.map((choice) => (
          <option key={choice.id} value={choice.id}>
            {choice.code}, {pairWords(choice.pair, units)}
          </option>
        ))}
      </SelectField>
      {can('curve.supersede') && (
        <>
          <TextArea className="mt-3" label="Why" rows={2} maxLength={2_000} value={reason} error={asked && missing.reason ? 'Say why, in a few words' : undefined} onChange={(event) => setReason(event.target.value)} />
          {issuesOf(supersede.error).map((message) => (
            <Banner key={message} tone="bad" className="mt-3" title={message} />
          ))}
          <Button kind="primary" className="mt-3 pointer-coarse:min-h-11" busyLabel={supersede.isPending && 'Superseding'} onClick={send}>
            Supersede {curve.code}
          </Button>
        </>
      )}
    </section>
  )
}
