import { VOLUME_UNIT_LABEL } from '#shared/units/volume.ts'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { NumberField, SelectField } from '#web/components/ui/text-fields.tsx'
import type { EntryForm } from './entry-columns.ts'

const KINDS = [
  { value: 'dry', label: 'Dry unit weight' },
  { value: 'wet', label: 'Wet unit weight' },
  { value: 'masses', label: 'Mould masses' },
] as const
const MOISTURES = [
  { value: 'stated', label: 'Moisture in %' },
  { value: 'one-tin', label: 'One tin' },
  { value: 'two-tins', label: 'Two tins' },
] as const
const MASSES = ['g', 'kg', 'lb'] as const
const DENSITIES = ['pcf', 'kN/m3', 'kg/m3', 'g/cm3'] as const
const VOLUMES = ['cm3', 'ft3', 'in3'] as const

type EntryFieldsProps = { form: EntryForm; mouldError: string | undefined; mouldVolumeError: string | undefined; onChange: (change: Partial<EntryForm>) => void }

/** How the laboratory wrote its specimens down, and in which units. */
export function EntryFields({ form, mouldError, mouldVolumeError, onChange }: EntryFieldsProps) {
  const masses = form.kind === 'masses'
  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap gap-3">
        <Segmented label="Specimens by" options={KINDS} value={form.kind} onChange={(kind) => onChange({ kind })} />
        <Segmented label="Moisture by" options={MOISTURES} value={form.moistureBy} onChange={(moistureBy) => onChange({ moistureBy })} />
      </div>
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-4">
        {masses ? (
          <>
            <UnitSelect label="Mould masses in" units={MASSES} value={form.massUnit} words={(unit) => unit} onChange={(massUnit) => onChange({ massUnit })} />
            <NumberField label="Mould, empty" unit={form.massUnit} value={form.mould} error={mouldError} onChange={(event) => onChange({ mould: event.target.value })} />
            <UnitSelect label="Mould volume in" units={VOLUMES} value={form.volumeUnit} words={(unit) => VOLUME_UNIT_LABEL[unit]} onChange={(volumeUnit) => onChange({ volumeUnit })} />
            <NumberField label="Mould volume" unit={VOLUME_UNIT_LABEL[form.volumeUnit]} value={form.mouldVolume} error={mouldVolumeError} onChange={(event) => onChange({ mouldVolume: event.target.value })} />
          </>
        ) : (
          <UnitSelect label="Unit weights in" units={DENSITIES} value={form.densityUnit} words={(unit) => DENSITY_UNIT_LABEL[unit]} onChange={(densityUnit) => onChange({ densityUnit })} />
        )}
        {form.moistureBy !== 'stated' && <UnitSelect label="Tin masses in" units={MASSES} value={form.tinUnit} words={(unit) => unit} onChange={(tinUnit) => onChange({ tinUnit })} />}
      </div>
    </div>
  )
}

type UnitSelectProps<T extends string> = { label: string; units: readonly T[]; value: string; words: (unit: T) => string; onChange: (unit: T) => void }

function UnitSelect<T extends string>({ label, units, value, words, onChange }: UnitSelectProps<T>) {
  const handleChange = (text: string): void => {
    const unit = units.find((each) => each === text)
    if (unit !== undefined) onChange(unit)
  }
  return (
    <SelectField label={label} value={value} onChange={(event) => handleChange(event.target.value)}>
      {units.map((unit) => (
        <option key={unit} value={unit}>
          {words(unit)}
        </option>
      ))}
    </SelectField>
  )
}
