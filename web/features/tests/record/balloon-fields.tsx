import { useFormContext, useWatch } from 'react-hook-form'
import { VOLUME_UNIT_LABEL } from '#shared/units/volume.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { CalculatedField } from '#web/components/ui/text-fields.tsx'
import { METHOD_WORDS } from '#web/features/tests/outcome-words.ts'
import { CalibrationChoice, CalibrationRow } from './calibration-choice.tsx'
import { holeParts } from './hole-parts.ts'
import { FieldGrid, ReadingField } from './reading-field.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'
import { UnitChoice } from './unit-choice.tsx'

export function BalloonFields() {
  const { control } = useFormContext<TestForm>()
  const { massUnit, volumeUnit } = useWatch({ control, name: 'balloon' })
  const { assessment, flagAt } = useRecord()
  const [figure, unit] = holeParts(assessment.holeVolumeCm3, volumeUnit !== 'cm3')
  const aside = (
    <>
      {METHOD_WORDS['rubber-balloon'].standard}, <UnitChoice name="balloon.volumeUnit" of="volume" label="Indicator in" /> <UnitChoice name="balloon.massUnit" of="mass" label="Mass of soil in" />
    </>
  )
  return (
    <section>
      <SectionHead aside={aside}>Balloon and hole</SectionHead>
      <CalibrationRow>
        <CalibrationChoice kind="balloon" idField="balloon.balloonId" label="Apparatus" />
      </CalibrationRow>
      <FieldGrid>
        <ReadingField name="balloon.volumeBefore" label="Indicator on the plate" unit={VOLUME_UNIT_LABEL[volumeUnit]} />
        <ReadingField name="balloon.volumeAfter" label="Indicator in the hole" unit={VOLUME_UNIT_LABEL[volumeUnit]} />
        <CalculatedField label="Hole volume" value={figure} unit={unit} warning={flagAt('balloon.hole')} />
        <ReadingField name="balloon.moistSoil" label="Moist soil from hole" unit={massUnit} />
        <ReadingField name="balloon.largestParticle" label="Largest particle, if seen" unit={<UnitChoice name="balloon.lengthUnit" of="length" label="Particle size in" />} />
      </FieldGrid>
    </section>
  )
}
