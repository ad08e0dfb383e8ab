import { useQuery } from '@tanstack/react-query'
import { useEffect, useRef, type ReactNode } from 'react'
import { useFormContext, useWatch, type FieldPathByValue } from 'react-hook-form'
import { calibratedReading } from '#shared/domain/calibrated-reading.ts'
import type { CalibrationKind } from '#shared/domain/calibration.ts'
import { SelectField } from '#web/components/ui/text-fields.tsx'
import { calibrationQueries } from '#web/data/calibration/queries.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { calibrationWords } from '#web/components/calibration/calibration-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { readSheet } from './read-sheet.ts'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'

type CalibrationChoiceProps = {
  kind: CalibrationKind
  label: string
  /** where the form keeps which one is used */
  idField: FieldPathByValue<TestForm, string>
  /** the reading it fills in; left out where it only vouches for the apparatus */
  valueField?: FieldPathByValue<TestForm, string>
}

/** Figures that a calibrated value is filled in with: a thousandth of its rounding tolerance. */
const DIGITS = 5

/** Which calibration the apparatus stands by: fills its value in, in the unit of the sheet, and again when that changes. The only apparatus there is, is offered at once. */
export function CalibrationChoice({ kind, label, idField, valueField }: CalibrationChoiceProps) {
  const { site, units } = useSite()
  const now = useSiteClock(site.id)
  const { control, register, setValue, getValues } = useFormContext<TestForm>()
  const { problemAt } = useRecord()
  const offered = useRef(false)
  const { data } = useQuery(calibrationQueries.list(site.id))
  const usable = data?.filter((each) => each.sheet.kind === kind && each.void === null && (each.validUntil === null || Date.parse(each.validUntil) >= now()))
  const chosen = useWatch({ control, name: idField })
  const calibration = usable?.find((each) => each.id === chosen)
  const sheet = useWatch({ control, compute: readSheet })
  const calibrated = calibration === undefined ? null : calibratedReading(sheet, { kind, value: calibration.value })
  const filled = calibrated?.field === null || calibrated === null ? undefined : String(Number(calibrated.value.toPrecision(DIGITS)))

  useEffect(() => {
    if (filled !== undefined && valueField !== undefined) setValue(valueField, filled)
  }, [filled, valueField, setValue])
  const gone = usable !== undefined && chosen !== '' && calibration === undefined
  useEffect(() => {
    if (gone && getValues(idField) === chosen) setValue(idField, '')
  }, [gone, chosen, idField, getValues, setValue])

  const only = usable !== undefined && usable.length > 0 && usable.every((each) => each.apparatus === usable[0]?.apparatus) ? usable[0]?.id : undefined
  useEffect(() => {
    // once: who then says "typed by hand" means it
    if (offered.current || usable === undefined) return
    offered.current = true
    if (only !== undefined && getValues(idField) === '' && (valueField === undefined || getValues(valueField) === '')) setValue(idField, only)
  }, [usable, only, idField, valueField, getValues, setValue])

  if (usable === undefined || usable.length === 0) return null
  const differs = calibrated?.differs === true && valueField !== undefined && getValues(valueField) !== ''
  return (
    <SelectField label={label} error={problemAt(idField)} warning={differs ? 'The sheet carries another value than this. You may save it, flagged.' : undefined} {...register(idField)}>
      <option value="">{valueField === undefined ? 'Not said' : 'Typed by hand'}</option>
      {usable.map((each) => (
        <option key={each.id} value={each.id}>
          {each.apparatus}, {calibrationWords(kind, each.value, units)}
        </option>
      ))}
    </SelectField>
  )
}

/** Calibrations side by side, over the readings they fill in. */
export function CalibrationRow({ children }: { children: ReactNode }) {
  return <div className="mb-3 grid gap-x-[14px] gap-y-3 empty:hidden sm:grid-cols-2">{children}</div>
}
