import type { MoistureMethod } from '#shared/domain/field-sheets.ts'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { MoistureCaution } from '#web/components/ui/moisture-caution.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { NumberField, SelectField } from '#web/components/ui/text-fields.tsx'
import { DENSITY_UNITS, MASS_UNITS, MOISTURE_METHODS, VOLUME_UNITS, type OnePointForm } from './one-point-form.ts'

type FieldsProps = {
  form: OnePointForm
  set: (change: Partial<OnePointForm>) => void
  /** what is wrong with a reading, by the path beneath `sheet` */
  errorOf: (path: string) => string | undefined
}

const MOISTURE_WORDS: Readonly<Record<(typeof MOISTURE_METHODS)[number], string>> = { oven: 'Oven', microwave: 'Microwave', carbide: 'Carbide', stated: 'Stated' }
const VOLUME_LABEL = { ft3: 'ft³', cm3: 'cm³' } as const
const GRID = 'grid grid-cols-2 items-start gap-x-[14px] gap-y-3 sm:grid-cols-3'

/** The specimen in its mould, or its wet density where that was worked out elsewhere. */
export function SpecimenFields({ form, set, errorOf }: FieldsProps) {
  return (
    <section className="mt-6">
      <SectionHead>Specimen</SectionHead>
      <div className="mb-3">
        <Segmented
          label="Given as"
          options={[{ value: 'mould', label: 'Mould and soil' }, { value: 'density', label: 'Wet density' }]}
          value={form.kind}
          onChange={(kind) => set({ kind })}
        />
      </div>
      {form.kind === 'mould' ? (
        <div className={GRID}>
          <NumberField label="Mould and wet soil" unit={form.massUnit} value={form.mouldAndSoil} error={errorOf('mouldAndSoil')} onChange={(event) => set({ mouldAndSoil: event.target.value })} />
          <NumberField label="Empty mould" unit={form.massUnit} value={form.mould} error={errorOf('mould')} onChange={(event) => set({ mould: event.target.value })} />
          <SelectField label="Masses in" value={form.massUnit} onChange={(event) => set({ massUnit: MASS_UNITS.find((unit) => unit === event.target.value) ?? 'g' })}>
            {MASS_UNITS.map((unit) => (
              <option key={unit}>{unit}</option>
            ))}
          </SelectField>
          <NumberField
            label="Volume of the mould"
            unit={VOLUME_LABEL[form.volumeUnit]}
            hint={form.volumeUnit === 'ft3' ? '4 in mould 0.0333, 6 in 0.0750' : '4 in mould 944, 6 in 2,124'}
            value={form.mouldVolume}
            error={errorOf('mouldVolume')}
            onChange={(event) => set({ mouldVolume: event.target.value })}
          />
          <SelectField label="Volume in" value={form.volumeUnit} onChange={(event) => set({ volumeUnit: VOLUME_UNITS.find((unit) => unit === event.target.value) ?? 'cm3' })}>
            {VOLUME_UNITS.map((unit) => (
              <option key={unit} value={unit}>
                {VOLUME_LABEL[unit]}
              </option>
            ))}
          </SelectField>
        </div>
      ) : (
        <div className={GRID}>
          <NumberField label="Wet density" unit={DENSITY_UNIT_LABEL[form.densityUnit]} value={form.wetDensity} error={errorOf('wetDensity')} onChange={(event) => set({ wetDensity: event.target.value })} />
          <SelectField label="Density in" value={form.densityUnit} onChange={(event) => set({ densityUnit: DENSITY_UNITS.find((unit) => unit === event.target.value) ?? 'pcf' })}>
            {DENSITY_UNITS.map((unit) => (
              <option key={unit} value={unit}>
                {DENSITY_UNIT_LABEL[unit]}
              </option>
            ))}
          </SelectField>
        </div>
      )}
    </section>
  )
}

/** Moisture of the specimen. */
export function SpecimenMoisture({ form, set, errorOf }: FieldsProps) {
  const { moistureMethod } = form
  const tins = moistureMethod === 'oven' || moistureMethod === 'microwave'
  return (
    <section className="mt-6">
      <SectionHead aside={tins ? 'masses in g' : undefined}>Moisture</SectionHead>
      <div className="mb-3 grid gap-3">
        <Segmented wide label="Moisture by" options={MOISTURE_METHODS.map((value) => ({ value, label: MOISTURE_WORDS[value] }))} value={moistureMethod} onChange={(method) => set({ moistureMethod: method })} />
        <MoistureCaution method={moistureMethod satisfies MoistureMethod} />
      </div>
      <div className={GRID}>
        {tins && (
          <>
            <NumberField label="Wet soil and tin" unit="g" value={form.wetAndTin} error={errorOf('moisture.wetAndTin')} onChange={(event) => set({ wetAndTin: event.target.value })} />
            <NumberField label="Dry soil and tin" unit="g" value={form.dryAndTin} error={errorOf('moisture.dryAndTin')} onChange={(event) => set({ dryAndTin: event.target.value })} />
            <NumberField label="Tin" unit="g" value={form.tin} error={errorOf('moisture.tin')} onChange={(event) => set({ tin: event.target.value })} />
          </>
        )}
        {moistureMethod === 'carbide' && <NumberField label="Dial, of wet mass" unit="%" value={form.reading} error={errorOf('moisture.readingPercent')} onChange={(event) => set({ reading: event.target.value })} />}
        {moistureMethod === 'stated' && <NumberField label="Moisture of dry mass" unit="%" value={form.percent} error={errorOf('moisture.percent')} onChange={(event) => set({ percent: event.target.value })} />}
      </div>
    </section>
  )
}
