import { Controller, useFormContext, useWatch } from 'react-hook-form'
import { VOLUME_UNIT_LABEL } from '#shared/units/volume.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { CalculatedField } from '#web/components/ui/text-fields.tsx'
import { METHOD_WORDS } from '#web/features/tests/outcome-words.ts'
import { CalibrationChoice, CalibrationRow } from './calibration-choice.tsx'
import { holeParts } from './hole-parts.ts'
import { FieldGrid, ReadingField } from './reading-field.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'
import { UnitChoice } from './unit-choice.tsx'

const SIZES = [
  { value: 'stated', label: 'Volume known' },
  { value: 'measured', label: 'Diameter and height' },
] as const

export function CylinderFields() {
  const { control } = useFormContext<TestForm>()
  const { massUnit, volumeUnit, volumeBy, lengthUnit } = useWatch({ control, name: 'cylinder' })
  const { assessment } = useRecord()
  const [figure, unit] = holeParts(assessment.holeVolumeCm3, massUnit === 'lb')
  const aside = (
    <>
      {METHOD_WORDS['drive-cylinder'].standard}, <UnitChoice name="cylinder.massUnit" of="mass" label="Masses in" />{' '}
      {volumeBy === 'stated' ? <UnitChoice name="cylinder.volumeUnit" of="volume" label="Volume in" /> : <UnitChoice name="cylinder.lengthUnit" of="length" label="Diameter and height in" />}
    </>
  )
  return (
    <section>
      <SectionHead aside={aside}>Cylinder</SectionHead>
      <div className="mb-3">
        <Controller control={control} name="cylinder.volumeBy" render={({ field }) => <Segmented label="Size of the cylinder" options={SIZES} value={field.value} onChange={field.onChange} />} />
      </div>
      {volumeBy === 'stated' && (
        <CalibrationRow>
          <CalibrationChoice kind="cylinder" idField="cylinder.cylinderId" valueField="cylinder.volume" label="Cylinder" />
        </CalibrationRow>
      )}
      <FieldGrid>
        <ReadingField name="cylinder.cylinderAndSoil" label="Cylinder and soil" unit={massUnit} />
        <ReadingField name="cylinder.cylinder" label="Cylinder, empty" unit={massUnit} />
        {volumeBy === 'stated' ? (
          <ReadingField name="cylinder.volume" label="Volume" unit={VOLUME_UNIT_LABEL[volumeUnit]} />
        ) : (
          <>
            <ReadingField name="cylinder.diameter" label="Inner diameter" unit={lengthUnit} />
            <ReadingField name="cylinder.height" label="Height" unit={lengthUnit} />
            <CalculatedField label="Volume" value={figure} unit={unit} />
          </>
        )}
        <ReadingField name="cylinder.largestParticle" label="Largest particle, if seen" unit={volumeBy === 'stated' ? <UnitChoice name="cylinder.lengthUnit" of="length" label="Particle size in" /> : lengthUnit} />
      </FieldGrid>
      <p className="mt-2 mb-0 text-small text-ink-2">Not for gravel above 4.75 mm (No. 4), organic or very hard soil.</p>
    </section>
  )
}
