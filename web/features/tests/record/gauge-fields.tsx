import { Controller, useFormContext, useWatch } from 'react-hook-form'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { METHOD_WORDS } from '#web/features/tests/outcome-words.ts'
import { GaugeChoice, useChosenGauge } from './gauge-choice.tsx'
import { FieldGrid, ReadingField } from './reading-field.tsx'
import type { TestForm } from './test-form.ts'
import { UnitChoice } from './unit-choice.tsx'

const MODES = [
  { value: 'direct-transmission', label: 'Direct transmission' },
  { value: 'backscatter', label: 'Backscatter' },
] as const

export function GaugeFields() {
  const { control } = useFormContext<TestForm>()
  const { gaugeId, densityUnit, lengthUnit, mode } = useWatch({ control, name: 'gauge' })
  const purpose = useWatch({ control, name: 'purpose' })
  const { gauges } = useChosenGauge()
  // a gauge of the register has its counts there
  const typed = gaugeId === '' && (gauges?.length === 0 || purpose === 'verification')
  const density = DENSITY_UNIT_LABEL[densityUnit]
  const aside = (
    <>
      {METHOD_WORDS['nuclear-gauge'].standard}, <UnitChoice name="gauge.densityUnit" of="density" label="Gauge densities in" /> <UnitChoice name="gauge.lengthUnit" of="length" label="Rod depth in" />
    </>
  )
  return (
    <>
      <section>
        <SectionHead aside={aside}>Gauge readings</SectionHead>
        <GaugeChoice />
        <div className="mb-3">
          <Controller control={control} name="gauge.mode" render={({ field }) => <Segmented label="Mode" options={MODES} value={field.value} onChange={field.onChange} />} />
        </div>
        <FieldGrid>
          {mode === 'direct-transmission' && <ReadingField name="gauge.rodDepth" label="Rod depth" unit={lengthUnit} />}
          <ReadingField name="gauge.wetDensity" label="Wet density" unit={density} />
          <ReadingField name="gauge.secondWetDensity" label="Turned, if read again" unit={density} />
        </FieldGrid>
      </section>
      {typed && (
        <section>
          <SectionHead aside="may be left out">Standard counts today</SectionHead>
          <FieldGrid>
            <ReadingField name="gauge.standardCounts.density" label="Density count" />
            <ReadingField name="gauge.standardCounts.referenceDensity" label="Its reference" />
            <span className="max-sm:hidden" />
            <ReadingField name="gauge.standardCounts.moisture" label="Moisture count" />
            <ReadingField name="gauge.standardCounts.referenceMoisture" label="Its reference" />
          </FieldGrid>
        </section>
      )}
    </>
  )
}
