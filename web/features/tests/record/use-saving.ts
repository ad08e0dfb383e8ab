import { useState } from 'react'
import { useNavigate } from 'react-router-dom'
import type { UseFormReturn } from 'react-hook-form'
import { paths } from '#web/app/paths.ts'
import { uploads } from '#web/data/attachment/uploads.ts'
import { useRecordTest } from '#web/data/test/mutations.ts'
import type { Assessment } from './assess-test.ts'
import { differingLift, serverProblems } from './server-problems.ts'
import { habitsOf, type TestForm } from './test-form.ts'
import { keepDraft, keepHabits } from './keep.ts'

interface SavingInput {
  readonly siteId: string
  readonly userId: string
  readonly draft: string
  readonly form: UseFormReturn<TestForm>
  readonly assessment: Assessment
}

/** Sends the sheet, asks about the lift where the server does, and keeps everything typed until it is saved. */
export function useSaving({ siteId, userId, draft, form, assessment }: SavingInput) {
  const navigate = useNavigate()
  const record = useRecordTest(siteId, { saysOwnErrors: true })
  const [attempted, setAttempted] = useState(false)
  const [sent, setSent] = useState<TestForm | null>(null)
  const [question, setQuestion] = useState<{ readonly lift: number | null } | null>(null)

  const send = (change: { readonly lift?: number; readonly liftConfirmed?: boolean } = {}): void => {
    const { input } = assessment
    if (input === null) return
    const values = structuredClone(form.getValues())
    setSent(values)
    setQuestion(null)
    const lift = change.lift ?? input.lift
    record.mutate(
      { ...input, lift, stakeId: lift === input.lift ? input.stakeId : null, liftConfirmed: change.liftConfirmed ?? false },
      {
        onSuccess: (answer) => {
          keepHabits(userId, values.method, habitsOf(values))
          keepDraft(draft, null)
          uploads.start({ subject: 'test', subjectId: answer.id })
          void navigate(paths.test(siteId, answer.id), { replace: true, state: { saved: answer } })
        },
        onError: (error) => setQuestion(differingLift(error) ?? null),
      },
    )
  }

  return {
    attempted,
    busy: record.isPending,
    saved: record.isSuccess,
    question,
    closeQuestion: () => setQuestion(null),
    /** what the server said, until the field it is about is typed in again */
    server: record.error === null || sent === null || differingLift(record.error) !== undefined ? null : { ...serverProblems(record.error, sent), sent },
    save: (focusFirst: () => void) => {
      setAttempted(true)
      if (assessment.input === null) focusFirst()
      else send()
    },
    useLift: (lift: number) => {
      form.setValue('lift', String(lift), { shouldDirty: true })
      send({ lift })
    },
    keepLift: () => send({ liftConfirmed: true }),
  }
}

export type Saving = ReturnType<typeof useSaving>
