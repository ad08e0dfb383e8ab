import { useEffect, useState } from 'react'
import { railBands } from '#shared/domain/lift-schedule.ts'
import { SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import type { RegisterAddress } from './register-filter.ts'

const OUTCOMES = [
  { value: '', label: 'Any result' },
  { value: 'pass', label: 'Meets spec' },
  { value: 'fail', label: 'Fails' },
  { value: 'suspect', label: 'Suspect' },
] as const

const WAIT_MS = 300

/** What narrows the register. */
export function RegisterFilters({ address, onChange }: { address: RegisterAddress; onChange: (change: Partial<Omit<RegisterAddress, 'page'>>) => void }) {
  const { site } = useSite()
  const zones = site.zones.filter((zone) => address.zone === '' || zone.id === address.zone)
  const lifts = [...new Set(zones.flatMap((zone) => railBands(zone.liftPlan, zone.minBaseUm, zone.maxDesignUm).map((band) => band.lift)))].sort((a, b) => b - a)
  return (
    <div className="grid grid-cols-2 items-end gap-x-[14px] gap-y-3 sm:grid-cols-4 xl:grid-cols-[minmax(180px,1.2fr)_repeat(3,minmax(130px,1fr))_auto]">
      <SearchField value={address.q} onChange={(q) => onChange({ q })} />
      <SelectField label="Zone" value={address.zone} onChange={(event) => onChange({ zone: event.target.value, lift: '' })}>
        <option value="">All zones</option>
        {site.zones.map((zone) => (
          <option key={zone.id} value={zone.id}>
            {zone.name}
          </option>
        ))}
      </SelectField>
      <SelectField label="Lift" value={address.lift} onChange={(event) => onChange({ lift: event.target.value })}>
        <option value="">All lifts</option>
        {lifts.map((lift) => (
          <option key={lift} value={lift}>
            Lift {lift}
          </option>
        ))}
      </SelectField>
      <SelectField label="Result" value={address.outcome} onChange={(event) => onChange({ outcome: event.target.value })}>
        {OUTCOMES.map(({ value, label }) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </SelectField>
      <label className="flex min-h-[38px] items-center gap-2 leading-[1.25] font-medium pointer-coarse:min-h-12 sm:col-span-4 xl:col-span-1">
        <input type="checkbox" className="size-[18px] accent-ink" checked={address.current} onChange={(event) => onChange({ current: event.target.checked })} />
        Only results that count
      </label>
    </div>
  )
}

/** Asked for once typing pauses. */
function SearchField({ value, onChange }: { value: string; onChange: (text: string) => void }) {
  const [text, setText] = useState(value)
  const [known, setKnown] = useState(value)
  if (known !== value) {
    setKnown(value)
    setText(value)
  }
  useEffect(() => {
    if (text === value) return
    const timer = setTimeout(() => onChange(text), WAIT_MS)
    return () => clearTimeout(timer)
  }, [text, value, onChange])
  return <TextField label="Number, cell, curve or name" type="search" maxLength={40} placeholder="T-0142 or N4" className="col-span-2 sm:col-span-1" value={text} onChange={(event) => setText(event.target.value)} />
}
