import { useState } from 'react'
import { useFormContext } from 'react-hook-form'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { StakeFlag } from '#web/components/ui/stake-flag.tsx'
import { SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { PlaceFields } from './place-fields.tsx'
import { PurposeFields } from './purpose-fields.tsx'
import { FieldGrid } from './reading-field.tsx'
import { useRecord } from './record-context.tsx'
import type { TestForm } from './test-form.ts'

const PLACE_FIELDS = ['stakeId', 'cell', 'easting', 'northing'] as const

/** Where, when and what for. A place that the address already named is one line until it is to be changed. */
export function PlaceSection({ placed, unmoved }: { placed: boolean; unmoved: boolean }) {
  const [open, setOpen] = useState(!placed)
  const { register } = useFormContext<TestForm>()
  const { assessment, problemAt } = useRecord()
  const { label, site, units } = useSite()
  const { place } = assessment
  const refused = PLACE_FIELDS.some((field) => problemAt(field) !== undefined)
  const folded = !open && unmoved && place !== null && !refused
  return (
    <section>
      <SectionHead aside={place === null ? undefined : `E ${units.number(place.at.easting, 1)}, N ${units.number(place.at.northing, 1)}`}>Place and purpose</SectionHead>
      {folded ? (
        <p className="mt-0 mb-3 flex min-h-9 flex-wrap items-center gap-x-3 text-[16px] pointer-coarse:min-h-12">
          {place.stake !== null && <StakeFlag label={place.stake.label} />}
          <span>
            Cell <b className="font-semibold">{label(place.cell)}</b>, {place.zone.name}
          </span>
          <button type="button" className="link-ink ml-auto min-h-8 text-body pointer-coarse:min-h-12" onClick={() => setOpen(true)}>
            Change place
          </button>
        </p>
      ) : (
        <div className="mb-3">
          <PlaceFields />
        </div>
      )}
      <div className="mb-3">
        <FieldGrid>
          <SelectField label="Lift" error={problemAt('lift')} disabled={place === null} {...register('lift')}>
            <option value="">{place === null ? 'After the place' : 'Choose the lift'}</option>
            {[...(place?.layers ?? [])].reverse().map(({ lift }) => (
              <option key={lift} value={lift}>
                Lift {lift}
              </option>
            ))}
          </SelectField>
          <div className="max-sm:order-first col-span-2">
            <TextField label={`Sampled, ${site.timeZone.split('/').at(-1)?.replaceAll('_', ' ') ?? ''} time`} type="datetime-local" error={problemAt('sampledAt')} {...register('sampledAt')} />
          </div>
        </FieldGrid>
      </div>
      <PurposeFields />
    </section>
  )
}
