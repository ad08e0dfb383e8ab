import type { GroundState } from '#shared/domain/ground-state.ts'
import { stateLook } from '#shared/look/ground-look.ts'
import { SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import type { ListFilter } from './list-rows.ts'

type ListFiltersProps = { filter: ListFilter; states: readonly GroundState[]; onChange: (filter: ListFilter) => void }

export function ListFilters({ filter, states, onChange }: ListFiltersProps) {
  const { site } = useSite()
  return (
    <div className="grid grid-cols-2 gap-3 sm:grid-cols-[1fr_1fr_1.4fr]">
      <SelectField label="Zone" value={filter.zoneId} onChange={(event) => onChange({ ...filter, zoneId: event.target.value })}>
        <option value="">All zones</option>
        {site.zones.map((zone) => (
          <option key={zone.id} value={zone.id}>
            {zone.name}
          </option>
        ))}
      </SelectField>
      <SelectField
        label="State"
        value={filter.state}
        onChange={(event) => onChange({ ...filter, state: states.find((state) => state === event.target.value) ?? '' })}
      >
        <option value="">All states</option>
        {states.map((state) => (
          <option key={state} value={state}>
            {stateLook(state).word}
          </option>
        ))}
      </SelectField>
      <TextField className="max-sm:col-span-2" label="Find" placeholder="L8, T-0218, near a limit" value={filter.text} onChange={(event) => onChange({ ...filter, text: event.target.value })} />
    </div>
  )
}
