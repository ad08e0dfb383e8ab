import { Controller, useFormContext } from 'react-hook-form'
import type { Verb } from '#shared/policies/policy.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { PURPOSE_WORDS } from '#web/features/tests/outcome-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'

const PURPOSES: readonly Purpose[] = ['required', 'judgement', 'verification', 'referee']

/** The purposes a role may record: the contractor's two, the owner's one, and a referee's either. */
export function purposesFor(can: (verb: Verb) => boolean): Purpose[] {
  return PURPOSES.filter((purpose) => {
    if (purpose === 'referee') return can('test.record-qc') || can('test.record-qa')
    return can(purpose === 'verification' ? 'test.record-qa' : 'test.record-qc')
  })
}

/** What the test is for, chosen before any reading: nobody may choose by the result. */
export function PurposeFields() {
  const { control } = useFormContext<TestForm>()
  const { can } = useSite()
  const { problemAt } = useRecord()
  const options = purposesFor(can).map((value) => ({ value, label: PURPOSE_WORDS[value].name }))
  const problem = problemAt('purpose')
  return (
    <Controller
      control={control}
      name="purpose"
      render={({ field }) => (
        <div id="purpose-choice">
          <Segmented wide label="Purpose" options={options} value={field.value as Purpose} onChange={field.onChange} />
          <p role={problem === undefined ? undefined : 'alert'} className={problem === undefined ? 'mt-2 mb-0 text-small text-ink-2' : 'mt-2 mb-0 text-small font-medium text-bad'}>
            {problem ?? (field.value === '' ? 'Choose the purpose first: the readings open then, and it cannot follow from the result.' : PURPOSE_WORDS[field.value].meaning)}
          </p>
        </div>
      )}
    />
  )
}
