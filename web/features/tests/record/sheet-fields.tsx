import { Controller, useFormContext, useWatch } from 'react-hook-form'
import type { FieldMethod } from '#shared/domain/field-sheets.ts'
import { fieldMethodSchema } from '#shared/schemas/field-sheet.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useMe } from '#web/data/session/use-me.ts'
import { METHOD_WORDS } from '#web/features/tests/outcome-words.ts'
import { BalloonFields } from './balloon-fields.tsx'
import { CylinderFields } from './cylinder-fields.tsx'
import { GaugeFields } from './gauge-fields.tsx'
import { readHabits } from './keep.ts'
import { MethodCaution } from './method-caution.tsx'
import { MoistureFields } from './moisture-fields.tsx'
import { PlaceSection } from './place-section.tsx'
import { PlainFields } from './plain-fields.tsx'
import { useRecord } from './record-context.tsx'
import { OversizeAndDepth, ReferenceFields } from './reference-fields.tsx'
import { SandConeFields } from './sand-cone-fields.tsx'
import { moistureHabits, type TestForm } from './test-form.ts'

const OPTIONS = fieldMethodSchema.options.map((value) => ({ value, label: METHOD_WORDS[value].name }))

/** The sheet, top to bottom. Readings stay shut until the purpose is chosen. */
export function SheetFields({ placed, unmoved }: { placed: boolean; unmoved: boolean }) {
  const { control, register, setValue } = useFormContext<TestForm>()
  const { problemAt } = useRecord()
  const me = useMe()
  const method = useWatch({ control, name: 'method' })
  const purpose = useWatch({ control, name: 'purpose' })
  const chooseMethod = (next: FieldMethod): void => {
    const { method: moisture, massUnit } = moistureHabits(next, readHabits(me?.id ?? ''))
    setValue('method', next, { shouldDirty: true })
    setValue('moisture.method', moisture)
    setValue('moisture.massUnit', massUnit)
  }
  return (
    <div className="grid gap-[22px] pointer-coarse:[&_[role=radiogroup]_label]:min-h-12">
      <PlaceSection placed={placed} unmoved={unmoved} />
      <fieldset disabled={purpose === ''} className="m-0 grid min-w-0 gap-[22px] border-0 p-0 disabled:opacity-55">
        <legend className="sr-only">Readings</legend>
        <Controller control={control} name="method" render={({ field }) => <Segmented wide label="Method" options={OPTIONS} value={field.value} onChange={chooseMethod} />} />
        <MethodCaution method={method} />
        {method === 'sand-cone' && <SandConeFields />}
        {method === 'rubber-balloon' && <BalloonFields />}
        {method === 'drive-cylinder' && <CylinderFields />}
        {method === 'nuclear-gauge' && <GaugeFields />}
        {method === 'plain' && <PlainFields />}
        <MoistureFields />
        <ReferenceFields />
        <OversizeAndDepth />
        <section>
          <SectionHead aside="may be left out">Remarks</SectionHead>
          <TextArea label="Soil, weather, what was seen" rows={2} maxLength={2_000} error={problemAt('remarks')} {...register('remarks')} />
        </section>
      </fieldset>
    </div>
  )
}
