import { useFormContext, useWatch } from 'react-hook-form'
import { oversizeSieve } from '#shared/domain/oversize.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { CalculatedField, SelectField } from '#web/components/ui/text-fields.tsx'
import { CheckCurveLink } from '#web/features/tests/check-curve-link.tsx'
import { useUnits } from '#web/lib/site-context.tsx'
import { FieldGrid, ReadingField } from './reading-field.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'

const SIEVE_WORDS = { 'no-4': 'No. 4', '3/8-in': '⅜ in', '3/4-in': '¾ in' } as const

const optionWords = ({ code, method, procedure, status }: Curve): string => `${code}, ${method} ${procedure}${status === 'approved' ? '' : ` (${status})`}`

/** The curve the test is judged by: approved ones first, a draft named as one. */
export function ReferenceFields() {
  const { register } = useFormContext<TestForm>()
  const { assessment, curves, problemAt } = useRecord()
  const units = useUnits()
  const { curve } = assessment
  const shown = curves.filter((each) => each.status !== 'superseded' || each.id === curve?.id)
  const draft = curve?.status === 'draft' ? 'A draft: the lead has not approved it yet. You may save the test, flagged.' : undefined
  const superseded = curve?.superseded ? `Superseded by ${curve.superseded.by.code}. You may save the test, flagged.` : undefined
  return (
    <section>
      <SectionHead aside={curve?.materialName}>Reference</SectionHead>
      <FieldGrid>
        <div className="max-sm:col-span-2">
          <SelectField label="Curve" error={problemAt('curveId')} warning={draft ?? superseded} {...register('curveId')}>
            <option value="">Choose a curve</option>
            {shown.map((each) => (
              <option key={each.id} value={each.id}>
                {optionWords(each)}
              </option>
            ))}
          </SelectField>
          {curve !== null && <CheckCurveLink curveId={curve.id} />}
        </div>
        <CalculatedField label="Max dry unit weight" value={curve?.pair ? units.densityNumber(curve.pair.maxDryDensity) : null} unit={units.marks.density} />
        <CalculatedField label="Optimum moisture" value={curve?.pair ? units.number(curve.pair.optimumMoisture, 1) : null} unit="%" />
      </FieldGrid>
    </section>
  )
}

export function OversizeAndDepth() {
  const { control } = useFormContext<TestForm>()
  const { assessment } = useRecord()
  const units = useUnits()
  const gauge = useWatch({ control, name: 'gauge' })
  const method = useWatch({ control, name: 'method' })
  const { curve } = assessment
  const sieve = curve === null ? 'No. 4' : SIEVE_WORDS[oversizeSieve(curve.method, curve.procedure)]
  const asRod = method === 'nuclear-gauge' && gauge.mode === 'direct-transmission'
  return (
    <section>
      <SectionHead>Oversize and depth</SectionHead>
      <FieldGrid>
        <ReadingField name="oversize" label={`Retained on ${sieve}`} unit="%" />
        <ReadingField name="depth" label="Depth below surface" unit={units.marks.thickness} placeholder={asRod ? 'as the rod' : undefined} />
        <ReadingField name="elevation" label="Ground elevation" unit={units.marks.elevation} />
      </FieldGrid>
    </section>
  )
}
