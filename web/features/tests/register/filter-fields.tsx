import { useQuery } from '@tanstack/react-query'
import type { ReactNode } from 'react'
import { railBands } from '#shared/domain/lift-schedule.ts'
import { fieldMethodSchema } from '#shared/schemas/field-sheet.ts'
import { purposeSchema } from '#shared/schemas/field-test.ts'
import { moistureMethodSchema, type TestFilter } from '#shared/schemas/test-register.ts'
import { SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { curveQueries } from '#web/data/curve/queries.ts'
import { lotQueries } from '#web/data/lot/queries.ts'
import { materialQueries } from '#web/data/material/queries.ts'
import { testQueries } from '#web/data/test/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { METHOD_WORDS, MOISTURE_WORDS, PURPOSE_WORDS } from '#web/features/tests/outcome-words.ts'
import { STANDING_FILTERS } from './filter-words.ts'
import type { RegisterControls } from './use-register.ts'

type FieldsProps = { filter: TestFilter; narrow: RegisterControls['narrow'] }
type Option = { readonly value: string; readonly label: string }

/** One of a list, or any of it. */
function OneOf({ label, any, value, options, onChoose, className }: { label: string; any: string; value: string | undefined; options: readonly Option[]; onChoose: (value: string | undefined) => void; className?: string }) {
  return (
    <SelectField label={label} value={value ?? ''} onChange={(event) => onChoose(event.target.value === '' ? undefined : event.target.value)} {...(className === undefined ? {} : { className })}>
      <option value="">{any}</option>
      {options.map((option) => (
        <option key={option.value} value={option.value}>
          {option.label}
        </option>
      ))}
    </SelectField>
  )
}

/** Zone and lift; another zone has other lifts. */
export function PlaceFields({ filter, narrow, className }: FieldsProps & { className?: string }) {
  const { site } = useSite()
  const zones = site.zones.filter((zone) => filter.zoneId === undefined || zone.id === filter.zoneId)
  const lifts = [...new Set(zones.flatMap((zone) => railBands(zone.liftPlan, zone.minBaseUm, zone.maxDesignUm).map((band) => band.lift)))].sort((a, b) => b - a)
  const extra = className === undefined ? {} : { className }
  return (
    <>
      <OneOf label="Zone" any="All zones" value={filter.zoneId} options={site.zones.map(({ id, name }) => ({ value: id, label: name }))} onChoose={(zoneId) => narrow({ zoneId, lift: undefined })} {...extra} />
      <OneOf label="Lift" any="All lifts" value={filter.lift === undefined ? undefined : String(filter.lift)} options={lifts.map((lift) => ({ value: String(lift), label: `Lift ${lift}` }))} onChoose={(lift) => narrow({ lift: lift === undefined ? undefined : Number(lift) })} {...extra} />
    </>
  )
}

/** How it was tested, against what and by whom. */
export function RecordFields({ filter, narrow }: FieldsProps) {
  const { site } = useSite()
  const lots = useQuery(lotQueries.list(site.id)).data ?? []
  const materials = useQuery(materialQueries.list(site.id)).data ?? []
  const curves = useQuery(curveQueries.list(site.id)).data ?? []
  const people = useQuery(testQueries.recorders(site.id)).data ?? []
  const ofMaterial = curves.filter((curve) => filter.materialId === undefined || curve.materialId === filter.materialId)
  return (
    <>
      <OneOf label="Lot" any="All lots" value={filter.lotId} options={lots.toReversed().map(({ id, name }) => ({ value: id, label: name }))} onChoose={(lotId) => narrow({ lotId })} />
      <OneOf label="Material" any="All materials" value={filter.materialId} options={materials.map(({ id, name }) => ({ value: id, label: name }))} onChoose={(materialId) => narrow({ materialId, curveId: undefined })} />
      <OneOf label="Curve" any="All curves" value={filter.curveId} options={ofMaterial.map(({ id, code }) => ({ value: id, label: code }))} onChoose={(curveId) => narrow({ curveId })} />
      <OneOf label="Method" any="All methods" value={filter.method} options={fieldMethodSchema.options.map((value) => ({ value, label: METHOD_WORDS[value].name }))} onChoose={(method) => narrow({ method: fieldMethodSchema.safeParse(method).data })} />
      <OneOf label="Moisture by" any="All methods" value={filter.moistureMethod} options={moistureMethodSchema.options.map((value) => ({ value, label: MOISTURE_WORDS[value].name }))} onChoose={(moistureMethod) => narrow({ moistureMethod: moistureMethodSchema.safeParse(moistureMethod).data })} />
      <OneOf label="Recorded by" any="Everybody" value={filter.technicianId} options={people.map(({ id, name }) => ({ value: id, label: name }))} onChoose={(technicianId) => narrow({ technicianId })} />
      <DayFields filter={filter} narrow={narrow} />
    </>
  )
}

/** First and last working day; one before the other is asked for as it is typed, and said. */
function DayFields({ filter: { from, to }, narrow }: FieldsProps) {
  const given = (day: string): string | undefined => (day === '' ? undefined : day)
  return (
    <>
      <TextField type="date" label="Sampled from" max={to} value={from ?? ''} onChange={(event) => narrow(to !== undefined && event.target.value > to ? { from: given(event.target.value), to: undefined } : { from: given(event.target.value) })} />
      <TextField type="date" label="Sampled to" min={from} value={to ?? ''} onChange={(event) => narrow(from !== undefined && event.target.value !== '' && event.target.value < from ? { to: given(event.target.value), from: undefined } : { to: given(event.target.value) })} />
    </>
  )
}

/** Purposes, any number of them. */
export function PurposeChoice({ filter: { purpose = [] }, narrow }: FieldsProps) {
  const toggle = (one: (typeof purpose)[number]): void => {
    const next = purposeSchema.options.filter((each) => (each === one ? !purpose.includes(each) : purpose.includes(each)))
    narrow({ purpose: next.length === 0 ? undefined : next })
  }
  return (
    <Choice legend="Purpose">
      {purposeSchema.options.map((one) => (
        <label key={one} className="flex min-h-9 items-center gap-2 font-medium pointer-coarse:min-h-12">
          <input type="checkbox" className="size-[18px] accent-ink" checked={purpose.includes(one)} onChange={() => toggle(one)} />
          {PURPOSE_WORDS[one].name}
        </label>
      ))}
    </Choice>
  )
}

export function Choice({ legend, children }: { legend: string; children: ReactNode }) {
  return (
    <fieldset className="m-0 min-w-0 border-0 p-0">
      <legend className="p-0 text-small font-medium text-ink-2">{legend}</legend>
      <div className="flex flex-wrap gap-x-5">{children}</div>
    </fieldset>
  )
}

/** Whether it counts, is void, flagged, near a limit, out of force, a retest. */
export function StandingFields({ filter, narrow }: FieldsProps) {
  return STANDING_FILTERS.map(({ key, label, yes, no }) => (
    <OneOf key={key} label={label} any="Either" value={filter[key]} options={[{ value: 'true', label: yes }, { value: 'false', label: no }]} onChoose={(value) => narrow({ [key]: value === 'true' || value === 'false' ? value : undefined })} />
  ))
}
