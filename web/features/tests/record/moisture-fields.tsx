import { Controller, useFormContext, useWatch } from 'react-hook-form'
import type { MoistureMethod } from '#shared/domain/field-sheets.ts'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { CalculatedField } from '#web/components/ui/text-fields.tsx'
import { MOISTURE_WORDS } from '#web/features/tests/outcome-words.ts'
import { useUnits } from '#web/lib/site-context.tsx'
import { CorrectionOffer } from './correction-offer.tsx'
import { DryingSteps } from './drying-steps.tsx'
import { GaugeChoice } from './gauge-choice.tsx'
import { MoistureCaution } from './method-caution.tsx'
import { FieldGrid, ReadingField } from './reading-field.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'
import { UnitChoice } from './unit-choice.tsx'
import { WallFields } from './wall-fields.tsx'

const METHODS: readonly MoistureMethod[] = ['oven', 'microwave', 'carbide', 'gauge', 'stated']

export function MoistureFields() {
  const { control } = useFormContext<TestForm>()
  const fieldMethod = useWatch({ control, name: 'method' })
  const { method } = useWatch({ control, name: 'moisture' })
  // a gauge reads water beside its own wet density, never beside a hole or a cylinder
  const options = METHODS.filter((each) => each !== 'gauge' || fieldMethod === 'nuclear-gauge' || fieldMethod === 'plain').map((value) => ({ value, label: MOISTURE_WORDS[value].name }))
  const { name, standard } = MOISTURE_WORDS[method]
  return (
    <section>
      <SectionHead
        aside={
          <>
            {name}, {standard}
            {(method === 'oven' || method === 'microwave') && (
              <>
                , <UnitChoice name="moisture.massUnit" of="mass" label="Masses of the tin in" />
              </>
            )}
            {method === 'gauge' && (
              <>
                , <UnitChoice name="moisture.densityUnit" of="density" label="Moisture density in" />
              </>
            )}
          </>
        }
      >
        Moisture
      </SectionHead>
      <div className="mb-3 grid gap-3">
        <Controller control={control} name="moisture.method" render={({ field }) => <Segmented wide label="Moisture by" options={options} value={field.value} onChange={field.onChange} />} />
        <MoistureCaution method={method} />
      </div>
      {method === 'gauge' && fieldMethod !== 'nuclear-gauge' && <GaugeChoice />}
      <FieldGrid>
        <MoistureReadings method={method} />
      </FieldGrid>
      {method === 'gauge' && <WallFields />}
    </section>
  )
}

function MoistureReadings({ method }: { method: MoistureMethod }) {
  const { control } = useFormContext<TestForm>()
  const { massUnit, densityUnit } = useWatch({ control, name: 'moisture' })
  const { assessment } = useRecord()
  const units = useUnits()
  const dryBasis = <CalculatedField label="Moisture of dry mass" value={assessment.reduced === null ? null : units.number(assessment.reduced.moisture, 1)} unit="%" />
  switch (method) {
    case 'oven':
    case 'microwave':
      return (
        <>
          <ReadingField name="moisture.wetAndTin" label="Wet soil and tin" unit={massUnit} />
          <ReadingField name="moisture.tin" label="Tin" unit={massUnit} />
          <ReadingField name="moisture.dryAndTin" label="Dry soil and tin" unit={massUnit} />
          {method === 'microwave' && <DryingSteps />}
        </>
      )
    case 'carbide':
      return (
        <>
          <ReadingField name="moisture.readingPercent" label="Dial, of wet mass" unit="%" />
          {dryBasis}
        </>
      )
    case 'gauge':
      return (
        <>
          <ReadingField name="moisture.moistureDensity" label="Moisture density" unit={DENSITY_UNIT_LABEL[densityUnit]} />
          <ReadingField name="moisture.correctionK" label="Site correction K" hint={<CorrectionOffer />} />
          {dryBasis}
        </>
      )
    case 'stated':
      return <ReadingField name="moisture.percent" label="Moisture of dry mass" unit="%" />
  }
}
