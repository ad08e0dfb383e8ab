import { useFormContext, type FieldPathByValue } from 'react-hook-form'
import type { ReactNode } from 'react'
import { NumberField } from '#web/components/ui/text-fields.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'

type ReadingFieldProps = {
  name: FieldPathByValue<TestForm, string>
  label: string
  unit?: ReactNode
  hint?: ReactNode
  placeholder?: string | undefined
}

/** A figure of the sheet, with what is wrong or unlikely about it beneath. */
export function ReadingField({ name, label, unit, hint, placeholder }: ReadingFieldProps) {
  const { register } = useFormContext<TestForm>()
  const { problemAt, flagAt } = useRecord()
  return <NumberField label={label} unit={unit} hint={hint} placeholder={placeholder} error={problemAt(name)} warning={flagAt(name)} {...register(name)} />
}

/** Fields three to a line, two on a phone. */
export function FieldGrid({ children }: { children: ReactNode }) {
  return <div className="grid grid-cols-2 items-start gap-x-[14px] gap-y-3 sm:grid-cols-3">{children}</div>
}
