import { useFormContext, type FieldPath } from 'react-hook-form'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { VOLUME_UNIT_LABEL } from '#shared/units/volume.ts'
import type { TestForm } from './test-form.ts'

const MASS = ['g', 'kg', 'lb'] as const
const DENSITY = ['g/cm3', 'kg/m3', 'pcf', 'kN/m3', 'lb/yd3'] as const
const LENGTH = ['in', 'mm', 'cm'] as const
const VOLUME = ['cm3', 'in3', 'ft3'] as const

const CHOICES = {
  mass: MASS.map((unit) => ({ unit, label: unit })),
  density: DENSITY.map((unit) => ({ unit, label: DENSITY_UNIT_LABEL[unit] })),
  length: LENGTH.map((unit) => ({ unit, label: unit })),
  volume: VOLUME.map((unit) => ({ unit, label: VOLUME_UNIT_LABEL[unit] })),
} as const

/** The unit that a part of the sheet was read in; what is typed stays as it is. */
export function UnitChoice({ name, of, label }: { name: FieldPath<TestForm>; of: keyof typeof CHOICES; label: string }) {
  const { register } = useFormContext<TestForm>()
  return (
    <label className="inline-flex items-baseline gap-1 rounded-ctl has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink">
      <span className="sr-only">{label}</span>
      <select
        {...register(name)}
        className="min-h-6 cursor-pointer border-0 bg-transparent py-0 font-semibold text-ink underline decoration-1 underline-offset-3 outline-none pointer-coarse:min-h-12 [&>option]:bg-raised"
      >
        {CHOICES[of].map(({ unit, label }) => (
          <option key={unit} value={unit}>
            {label}
          </option>
        ))}
      </select>
    </label>
  )
}
