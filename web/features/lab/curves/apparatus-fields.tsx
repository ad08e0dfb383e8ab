import { compactionMethod, type checkApparatus } from '#shared/domain/compaction-method.ts'
import { NumberField } from '#web/components/ui/text-fields.tsx'
import { sieveWords } from '#web/features/lab/lab-words.ts'
import type { CurveForm } from './curve-form.ts'

type ApparatusFieldsProps = { form: CurveForm; check: ReturnType<typeof checkApparatus>; errorOf: (path: string) => string | undefined; onChange: (change: Partial<CurveForm>) => void }

/** What the report says of mould, layers and blows, held to the method while it is typed. */
export function ApparatusFields({ form, check, errorOf, onChange }: ApparatusFieldsProps) {
  const method = compactionMethod(form.method, form.procedure)
  const flag = (field: 'mouldVolume' | 'layers' | 'blows') => (check.ok ? check.flags.find((each) => each.field === field)?.message : undefined)
  const tooCoarse = !check.ok && check.field === 'oversizePercent' ? check.reason.message : undefined
  return (
    <div className="mt-4">
      {method !== null && (
        <p className="m-0 mb-2 text-small text-ink-2">
          {form.method} method {form.procedure}: {method.mould === '4-in' ? '4 in' : '6 in'} mould, {method.layers} layers of {method.blows} blows, at most {method.mostOversize} % retained on the {sieveWords(form.method, form.procedure)}.
        </p>
      )}
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-3">
        <NumberField label="Layers, if reported" value={form.layers} error={errorOf('apparatus.layers')} warning={flag('layers')} onChange={(event) => onChange({ layers: event.target.value })} />
        <NumberField label="Blows a layer, if reported" value={form.blows} error={errorOf('apparatus.blows')} warning={flag('blows')} onChange={(event) => onChange({ blows: event.target.value })} />
        <NumberField label={`Retained on the ${sieveWords(form.method, form.procedure)}`} unit="%" value={form.oversize} error={tooCoarse ?? errorOf('apparatus.oversizePercent')} onChange={(event) => onChange({ oversize: event.target.value })} />
      </div>
      {flag('mouldVolume') !== undefined && <p className="m-0 mt-2 font-medium text-warn">{flag('mouldVolume')}</p>}
    </div>
  )
}
