import { compactionMethod, hasEditions, type ApparatusCheck, type ApparatusFlag } from '#shared/domain/compaction-method.ts'
import { NumberField, SelectField } from '#web/components/ui/text-fields.tsx'
import { sieveWords } from '#web/features/lab/lab-words.ts'
import type { CurveForm } from './curve-form.ts'

type ApparatusFieldsProps = { form: CurveForm; check: ApparatusCheck; errorOf: (path: string) => string | undefined; onChange: (change: Partial<CurveForm>) => void }

/** The method, and what the report says of mould, layers and blows: held to the method while it is typed. */
export function ApparatusFields({ form, check, errorOf, onChange }: ApparatusFieldsProps) {
  const method = compactionMethod(form.method, form.procedure, form.edition)
  const flag = (field: ApparatusFlag['field']) => (check.ok ? check.flags.find((each) => each.field === field)?.message : undefined)
  const tooCoarse = !check.ok && check.field === 'oversizePercent' ? check.reason.message : undefined
  const alone = [flag('mouldVolume'), flag('energy')].filter((message) => message !== undefined)
  return (
    <>
      {method !== null && (
        <p className="m-0 text-small text-ink-2">
          Method {form.procedure}: {method.mould === '4-in' ? '4 in' : '6 in'} mould, {method.layers} layers of {method.blows} blows, at most {method.mostOversize} % retained on the {sieveWords(form.method, form.procedure)}. Leave out what the report does not say.
        </p>
      )}
      <div className="grid grid-cols-2 items-start gap-x-[14px] gap-y-3 sm:grid-cols-4">
        <SelectField label="Mould" value={form.mould} warning={flag('mould')} onChange={(event) => onChange({ mould: event.target.value === '4-in' || event.target.value === '6-in' ? event.target.value : '' })}>
          <option value="">Not said</option>
          <option value="4-in">4 in</option>
          <option value="6-in">6 in</option>
        </SelectField>
        <NumberField label="Layers" value={form.layers} error={errorOf('apparatus.layers')} warning={flag('layers')} onChange={(event) => onChange({ layers: event.target.value })} />
        <NumberField label="Blows a layer" value={form.blows} error={errorOf('apparatus.blows')} warning={flag('blows')} onChange={(event) => onChange({ blows: event.target.value })} />
        <NumberField label={`Retained on ${sieveWords(form.method, form.procedure)}`} unit="%" value={form.oversize} error={tooCoarse ?? errorOf('apparatus.oversizePercent')} onChange={(event) => onChange({ oversize: event.target.value })} />
        {hasEditions(form.method) && (
          <SelectField className="col-span-2" label="Issue of the method" value={form.edition} onChange={(event) => onChange({ edition: event.target.value === '2000' ? '2000' : '2007' })}>
            <option value="2007">2007 or later</option>
            <option value="2000">2000 to 2006</option>
          </SelectField>
        )}
      </div>
      {alone.map((message) => (
        <p key={message} className="m-0 font-medium text-warn">
          {message}
        </p>
      ))}
    </>
  )
}
