import { useFormContext, useWatch } from 'react-hook-form'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { CalculatedField } from '#web/components/ui/text-fields.tsx'
import { METHOD_WORDS } from '#web/features/tests/outcome-words.ts'
import { CalibrationChoice, CalibrationRow } from './calibration-choice.tsx'
import { FieldGrid, ReadingField } from './reading-field.tsx'
import { holeParts } from './hole-parts.ts'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'
import { UnitChoice } from './unit-choice.tsx'

export function SandConeFields() {
  const { control } = useFormContext<TestForm>()
  const { massUnit, densityUnit } = useWatch({ control, name: 'sandCone' })
  const { assessment, flagAt } = useRecord()
  const [value, unit] = holeParts(assessment.holeVolumeCm3, massUnit === 'lb')
  const aside = (
    <>
      {METHOD_WORDS['sand-cone'].standard}, <UnitChoice name="sandCone.massUnit" of="mass" label="Masses at the hole in" /> <UnitChoice name="sandCone.densityUnit" of="density" label="Density of sand in" />
    </>
  )
  return (
    <section>
      <SectionHead aside={aside}>Sand and hole</SectionHead>
      <CalibrationRow>
        <CalibrationChoice kind="sand-density" idField="sandCone.sandId" valueField="sandCone.sandDensity" label="Sand" />
        <CalibrationChoice kind="cone" idField="sandCone.coneId" valueField="sandCone.coneAndPlate" label="Cone and plate" />
      </CalibrationRow>
      <FieldGrid>
        <ReadingField name="sandCone.apparatusBefore" label="Apparatus and sand before" unit={massUnit} />
        <ReadingField name="sandCone.apparatusAfter" label="Apparatus and sand after" unit={massUnit} />
        <ReadingField name="sandCone.coneAndPlate" label="Sand in cone and plate" unit={massUnit} />
        <ReadingField name="sandCone.sandDensity" label="Bulk density of sand" unit={DENSITY_UNIT_LABEL[densityUnit]} />
        <CalculatedField label="Hole volume" value={value} unit={unit} warning={flagAt('sandCone.hole')} />
        <ReadingField name="sandCone.moistSoil" label="Moist soil from hole" unit={massUnit} />
        <ReadingField name="sandCone.largestParticle" label="Largest particle, if seen" unit={<UnitChoice name="sandCone.lengthUnit" of="length" label="Particle size in" />} />
      </FieldGrid>
    </section>
  )
}
