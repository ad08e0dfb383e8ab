import { Controller, useFormContext, useWatch } from 'react-hook-form'
import { Segmented } from '#web/components/ui/segmented.tsx'
import { SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { FieldGrid, ReadingField } from './reading-field.tsx'
import { useRecord } from './record-context.tsx'
import type { PlaceBy, TestForm } from './test-form.ts'

const WAYS: readonly { readonly value: PlaceBy; readonly label: string }[] = [
  { value: 'stake', label: 'At a stake' },
  { value: 'cell', label: 'In a cell' },
  { value: 'point', label: 'Coordinates' },
]

/** Where the test was taken: at a stake, in a cell (its middle), or at a point of the map or typed coordinates. */
export function PlaceFields() {
  const { control, register, setValue } = useFormContext<TestForm>()
  const { stakes, problemAt, assessment } = useRecord()
  const { label, site } = useSite()
  const placeBy = useWatch({ control, name: 'placeBy' })
  const ways = stakes.length > 0 ? WAYS : WAYS.filter(({ value }) => value !== 'stake')
  const { place } = assessment
  return (
    <>
      <div className="mb-3">
        <Controller control={control} name="placeBy" render={({ field }) => <Segmented label="Place" options={ways} value={field.value} onChange={field.onChange} />} />
      </div>
      <FieldGrid>
        {placeBy === 'stake' && (
          <div className="col-span-2">
            <SelectField
              label="Stake"
              error={problemAt('stakeId')}
              {...register('stakeId', {
                onChange: (event: { target: { value: string } }) => {
                  const stake = stakes.find((each) => each.id === event.target.value)
                  if (stake !== undefined) setValue('lift', String(stake.lift), { shouldDirty: true })
                },
              })}
            >
              <option value="">Choose a stake</option>
              {stakes.map((stake) => (
                <option key={stake.id} value={stake.id}>
                  {`${stake.label}, cell ${label(stake.cell)}, ${stake.lotName}`}
                </option>
              ))}
            </SelectField>
          </div>
        )}
        {placeBy === 'cell' && (
          <TextField
            label="Cell"
            autoCapitalize="characters"
            autoComplete="off"
            spellCheck={false}
            error={problemAt('cell')}
            hint={place === null ? undefined : `${place.zone.name}, in the middle of the cell`}
            {...register('cell')}
          />
        )}
        {placeBy === 'point' && (
          <>
            <ReadingField name="easting" label="Easting" unit={site.grid.unit === 'm' ? 'm' : 'ft'} hint={place === null ? undefined : `Cell ${label(place.cell)}, ${place.zone.name}`} />
            <ReadingField name="northing" label="Northing" unit={site.grid.unit === 'm' ? 'm' : 'ft'} />
          </>
        )}
      </FieldGrid>
    </>
  )
}
