import { Controller, useFormContext, useWatch } from 'react-hook-form'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { FieldGrid, ReadingField } from './reading-field.tsx'
import type { TestForm } from './test-form.ts'
import { UnitChoice } from './unit-choice.tsx'

const KINDS = [
  { value: 'dry', label: 'Dry' },
  { value: 'wet', label: 'Wet' },
] as const

export function PlainFields() {
  const { control } = useFormContext<TestForm>()
  const { densityUnit, densityIs } = useWatch({ control, name: 'plain' })
  return (
    <section>
      <SectionHead
        aside={
          <>
            as the report states it, <UnitChoice name="plain.densityUnit" of="density" label="Density in" />
          </>
        }
      >
        Density
      </SectionHead>
      <div className="mb-3">
        <Controller control={control} name="plain.densityIs" render={({ field }) => <Segmented label="The density is" options={KINDS} value={field.value} onChange={field.onChange} />} />
      </div>
      <FieldGrid>
        <ReadingField name="plain.density" label={densityIs === 'dry' ? 'Dry density' : 'Wet density'} unit={DENSITY_UNIT_LABEL[densityUnit]} />
      </FieldGrid>
    </section>
  )
}
