import { useQuery } from '@tanstack/react-query'
import { useEffect, useMemo, useState } from 'react'
import { FormProvider, useForm, useWatch } from 'react-hook-form'
import { useLocation, useNavigate } from 'react-router-dom'
import type { CreateTest, TestDetail } from '#shared/schemas/field-test.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import { paths } from '#web/app/paths.ts'
import { FilesToSend } from '#web/components/files/files-to-send.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { uploads } from '#web/data/attachment/uploads.ts'
import { gaugeQueries } from '#web/data/gauge/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { assessTest } from './assess-test.ts'
import { FormNotices } from './form-notices.tsx'
import { keepDraft } from './keep.ts'
import { LiftQuestion } from './lift-question.tsx'
import { textAt } from './read-sheet.ts'
import { RecordProvider, type RecordState } from './record-context.tsx'
import { SheetFields } from './sheet-fields.tsx'
import type { TestForm } from './test-form.ts'
import { usePreview } from './use-preview.ts'
import { useSaving } from './use-saving.ts'
import { useSheetDefaults } from './use-sheet-defaults.ts'
import { VerdictSide, VerdictStrip } from './verdict-side.tsx'

type RecordFormProps = {
  userId: string
  draft: string
  start: TestForm
  restored: boolean
  onStartAfresh: () => void
  stakes: readonly Stake[]
  curves: readonly Curve[]
  follows: CreateTest['follows']
  followed: TestDetail | null
}

/** What the sheet is about, in its head: "New test at stake N1, Building pad, lift 10, cell N4". */
function useHeadWords({ place, lift }: RecordState['assessment'], followed: TestDetail | null, follows: CreateTest['follows']): string {
  const { label } = useSite()
  const what = followed === null ? 'New test' : `${follows?.kind === 'rerun' ? 'Re-run' : 'Retest'} of ${followed.number}`
  if (place === null) return what
  const stake = place.stake === null ? '' : ` at stake ${place.stake.label}`
  return `${what}${stake}, ${place.zone.name}${lift === null ? '' : `, lift ${lift}`}, cell ${label(place.cell)}`
}

export function RecordForm({ userId, draft, start, restored, onStartAfresh, stakes, curves, follows, followed }: RecordFormProps) {
  const context = useSite()
  const { site } = context
  const navigate = useNavigate()
  const location = useLocation()
  const form = useForm<TestForm>({ defaultValues: start, mode: 'onTouched' })
  const values = useWatch({ control: form.control, compute: (all: TestForm) => all })
  const registered = (useQuery(gaugeQueries.list(site.id)).data?.length ?? 0) > 0
  const assessment = useMemo(() => assessTest(values, { context, stakes, curves, follows, registered }), [values, context, stakes, curves, follows, registered])
  const saving = useSaving({ siteId: site.id, userId, draft, form, assessment })
  const lotVersion = useSheetDefaults(site.id, form, assessment.place, assessment.lift, curves)
  const previewed = usePreview(site.id, values, assessment, follows)
  const words = useHeadWords(assessment, followed, follows)
  const [placedAtStart] = useState(assessment.place !== null)
  const { touchedFields, dirtyFields, isDirty } = form.formState

  useEffect(() => {
    if (isDirty && !saving.saved) keepDraft(draft, values)
  }, [values, isDirty, draft, saving.saved])

  const touched = (field: string): boolean => isSet(touchedFields, field)
  const state: RecordState = {
    assessment,
    stakes,
    curves,
    attempted: saving.attempted,
    problemAt: (field) => {
      const said = saving.server?.fields.get(field)
      if (said !== undefined && saving.server !== null && textAt(saving.server.sent, field) === textAt(values, field)) return said
      const problem = assessment.problems.get(field)
      if (problem === undefined) return undefined
      return saving.attempted || (!problem.missing && (touched(field) || restored)) ? problem.message : undefined
    },
    flagAt: (field) => assessment.flags.get(field),
  }

  const record = { subject: 'test', subjectId: start.id } as const
  const focusFirst = (): void => {
    const [first] = assessment.problems.keys()
    if (first === 'purpose') document.querySelector<HTMLInputElement>('#purpose-choice input')?.focus()
    else if (first !== undefined) form.setFocus(first as Parameters<typeof form.setFocus>[0])
  }
  const handleCancel = (): void => {
    keepDraft(draft, null)
    uploads.dropAll(record)
    // opened by its address alone there is nothing to go back to
    if (location.key === 'default') void navigate(paths.tests(site.id))
    else void navigate(-1)
  }
  const handleStartAfresh = (): void => {
    uploads.dropAll(record)
    onStartAfresh()
  }
  const leave = (
    <Button onClick={handleCancel} className="max-lg:min-h-12 max-lg:px-5">
      Cancel
    </Button>
  )
  const save = (
    <Button type="submit" kind="primary" busyLabel={saving.busy && 'Saving'} className="max-lg:min-h-12 max-lg:flex-1">
      Save result
    </Button>
  )

  return (
    <FormProvider {...form}>
      <RecordProvider value={state}>
        <form
          noValidate
          className="flex min-h-0 flex-1 flex-col"
          onSubmit={(event) => {
            event.preventDefault()
            saving.save(focusFirst)
          }}
        >
          <header className="flex shrink-0 flex-wrap items-center gap-x-[18px] gap-y-0 border-b sm:min-h-14 border-rule-2 bg-raised px-4 py-2 sm:px-[26px] lg:border-b-2 lg:border-ink">
            <h1 className="m-0 text-[18px] font-bold max-sm:sr-only">Record a field test</h1>
            <span className="text-ink-2 max-sm:font-semibold max-sm:text-ink">{words}</span>
            <span className="ml-auto flex gap-[10px] max-lg:hidden">
              {leave}
              {save}
            </span>
          </header>
          <div className="min-h-0 flex-1 overflow-y-auto lg:grid lg:grid-cols-[minmax(0,1fr)_minmax(400px,42%)] lg:overflow-hidden">
            <VerdictStrip previewed={previewed} />
            <div className="bg-raised px-4 pt-4 pb-6 sm:px-[26px] lg:overflow-y-auto lg:border-r lg:border-rule-2 lg:pt-5">
              <FormNotices saving={saving} restored={restored} onStartAfresh={handleStartAfresh} lotVersion={lotVersion} followed={followed} follows={follows} />
              <SheetFields placed={placedAtStart} unmoved={!isSet(dirtyFields, 'placeBy')} />
              <FilesToSend of={record} />
            </div>
            <div className="bg-sheet px-4 pt-[22px] pb-8 sm:px-[26px] max-lg:border-t max-lg:border-rule-2 lg:overflow-y-auto">
              <VerdictSide previewed={previewed} />
            </div>
          </div>
          <div className="flex shrink-0 gap-[10px] border-t-2 border-ink bg-raised px-4 py-2 lg:hidden">
            {leave}
            {save}
          </div>
        </form>
        <LiftQuestion saving={saving} lift={assessment.lift ?? 0} />
      </RecordProvider>
    </FormProvider>
  )
}

function isSet(marks: object, path: string): boolean {
  let value: unknown = marks
  for (const step of path.split('.')) value = typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[step] : undefined
  return value === true
}
