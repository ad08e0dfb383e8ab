import { Controller, useFormContext, useWatch } from 'react-hook-form'
import { DENSITY_UNIT_LABEL } from '#shared/units/density.ts'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { WALL_CONVENTION_WORDS } from '#web/features/tests/outcome-words.ts'
import { ReadingField } from './reading-field.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'

const BY = [
  { value: '', label: 'No wall near' },
  { value: 'gauge', label: 'Gauge has corrected it' },
  { value: 'here', label: 'Correct it here' },
] as const

const CONVENTIONS = [
  { value: 'block-minus-standard', label: 'Block − standard' },
  { value: 'standard-minus-block', label: 'Standard − block' },
] as const

/** The water of a wall or trench in a gauge's reading, with the sign that the gauge's maker gives its offset. */
export function WallFields() {
  const { control } = useFormContext<TestForm>()
  const { wall, densityUnit } = useWatch({ control, name: 'moisture' })
  const { problemAt } = useRecord()
  const missing = problemAt('moisture.wall.convention')
  return (
    <div className="mt-4 grid gap-3">
      <div>
        <p className="m-0 mb-1 text-small font-medium text-ink-2">Within 24 in (0.6 m) of a wall or trench side</p>
        <Controller control={control} name="moisture.wall.by" render={({ field }) => <Segmented wide label="Correction for a wall" options={BY} value={field.value} onChange={field.onChange} />} />
        {wall.by !== '' && <p className="mt-2 mb-0 text-small text-ink-2">The side adds its own water to the moisture. A density by direct transmission is not affected. Never enter a trench that is not shored or sloped as the safety plan says.</p>}
      </div>
      {wall.by !== '' && (
        <div>
          <p className="m-0 mb-1 text-small font-medium text-ink-2">The offset is counted as</p>
          <Controller control={control} name="moisture.wall.convention" render={({ field }) => <Segmented wide label="Sign of the offset" options={CONVENTIONS} value={field.value as (typeof CONVENTIONS)[number]['value']} onChange={field.onChange} />} />
          <p role={missing === undefined ? undefined : 'alert'} className={missing === undefined ? 'mt-2 mb-0 text-small text-ink-2' : 'mt-2 mb-0 text-small font-medium text-bad'}>
            {missing ?? (wall.convention === '' ? 'Makers differ: see the gauge’s manual.' : WALL_CONVENTION_WORDS[wall.convention])}
          </p>
        </div>
      )}
      {wall.by !== '' && (
        <div className="sm:w-1/2">
          <ReadingField
            name="moisture.wall.offset"
            label={wall.by === 'gauge' ? 'Offset stored in the gauge' : 'Offset, as moisture density'}
            unit={wall.by === 'gauge' ? 'counts' : DENSITY_UNIT_LABEL[densityUnit]}
            hint={wall.by === 'gauge' ? 'Kept with the sheet; the reading is not changed again.' : 'Taken off the moisture density above, by its sign.'}
          />
        </div>
      )}
    </div>
  )
}
