import { compactionMethod } from '#shared/domain/compaction-method.ts'
import { VOLUME_UNIT_LABEL, convertVolume } from '#shared/units/volume.ts'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { NumberField, SelectField } from '#web/components/ui/text-fields.tsx'
import type { CurveForm } from './curve-form.ts'
import { DENSITIES, MASSES, VOLUMES, type EntryForm } from './entry-columns.ts'

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
/** Figures of a volume worth saying, by unit. */
const DECIMALS = { cm3: 0, ft3: 4, in3: 1 } as const

type EntryChoicesProps = { form: EntryForm; onChange: (change: Partial<EntryForm>) => void }

/** What the specimens were written down as, and in which units. */
export function EntryChoices({ form, onChange }: EntryChoicesProps) {
  const masses = form.kind === 'masses'
  return (
    <>
      <div className="flex flex-wrap gap-3">
        <Segmented label="Specimens by" options={KINDS} value={form.kind} onChange={(kind) => onChange({ kind })} />
        <Segmented label="Moisture by" options={MOISTURES} value={form.moistureBy} onChange={(moistureBy) => onChange({ moistureBy })} />
      </div>
      <div className="grid grid-cols-2 items-start gap-x-[14px] gap-y-3 sm:grid-cols-4">
        {masses ? (
          <>
            <UnitSelect label="Mould masses in" units={MASSES} value={form.massUnit} words={(unit) => unit} onChange={(massUnit) => onChange({ massUnit })} />
            <UnitSelect label="Mould volume in" units={VOLUMES} value={form.volumeUnit} words={(unit) => VOLUME_UNIT_LABEL[unit]} onChange={(volumeUnit) => onChange({ volumeUnit })} />
          </>
        ) : (
          <UnitSelect label="Unit weights in" units={DENSITIES} value={form.densityUnit} words={(unit) => DENSITY_UNIT_LABEL[unit]} onChange={(densityUnit) => onChange({ densityUnit })} />
        )}
        {form.moistureBy !== 'stated' && <UnitSelect label="Tin masses in" units={MASSES} value={form.tinUnit} words={(unit) => unit} onChange={(tinUnit) => onChange({ tinUnit })} />}
      </div>
    </>
  )
}

type EntryFieldsProps = EntryChoicesProps & { method: Pick<CurveForm, 'method' | 'procedure' | 'edition'>; mouldError: string | undefined; mouldVolumeError: string | undefined }

/** How the laboratory wrote its specimens down, with the mould that all of them were compacted in. */
export function EntryFields({ form, method, mouldError, mouldVolumeError, onChange }: EntryFieldsProps) {
  const own = compactionMethod(method.method, method.procedure, method.edition)
  const unit = form.volumeUnit
  const nominal = own === null || !(unit in DECIMALS) ? undefined : `Method ${method.procedure}: ${convertVolume(own.volumeCm3, 'cm3', unit).toFixed(DECIMALS[unit as keyof typeof DECIMALS])}\u2009${VOLUME_UNIT_LABEL[unit]}, as calibrated`
  return (
    <>
      <EntryChoices form={form} onChange={onChange} />
      {form.kind === 'masses' && (
        <div className="grid grid-cols-2 items-start gap-x-[14px] gap-y-3">
          <NumberField label="Mould, empty" hint="0 where the soil was weighed alone" unit={form.massUnit} value={form.mould} error={mouldError} onChange={(event) => onChange({ mould: event.target.value })} />
          <NumberField label="Mould volume" hint={nominal} unit={VOLUME_UNIT_LABEL[unit]} value={form.mouldVolume} error={mouldVolumeError} onChange={(event) => onChange({ mouldVolume: event.target.value })} />
        </div>
      )}
    </>
  )
}

type UnitSelectProps<T extends string> = { label: string; units: readonly T[]; value: T; words: (unit: T) => string; onChange: (unit: T) => void }

function UnitSelect<T extends string>({ label, units, value, words, onChange }: UnitSelectProps<T>) {
  // a sheet sent by other means may be in a unit that is not offered
  const offered = units.includes(value) ? units : [value, ...units]
  const handleChange = (text: string): void => {
    const unit = offered.find((each) => each === text)
    if (unit !== undefined) onChange(unit)
  }
  return (
    <SelectField label={label} value={value} onChange={(event) => handleChange(event.target.value)}>
      {offered.map((unit) => (
        <option key={unit} value={unit}>
          {words(unit)}
        </option>
      ))}
    </SelectField>
  )
}
