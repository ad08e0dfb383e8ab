import { NumberField, TextArea } from '#web/components/ui/text-fields.tsx'
import { sieveWords } from '#web/features/lab/lab-words.ts'
import { useUnits } from '#web/lib/site-context.tsx'
import type { CurveForm } from './curve-form.ts'

type ReferenceChoicesProps = { form: CurveForm; errorOf: (path: string) => string | undefined; onChange: (change: Partial<CurveForm>) => void }

const CHECK = 'mt-3 flex min-h-11 cursor-pointer items-center gap-3 font-semibold'

/** The laboratory's own pair, and the stones its mould left out. */
export function ReferenceChoices({ form, errorOf, onChange }: ReferenceChoicesProps) {
  const units = useUnits()
  return (
    <>
      <label className={CHECK}>
        <input type="checkbox" className="size-5 accent-ink" checked={form.withReported} onChange={(event) => onChange({ withReported: event.target.checked })} />
        Use the pair the laboratory reported
      </label>
      {form.withReported && (
        <div className="grid gap-3 sm:grid-cols-2">
          <NumberField label="Maximum dry unit weight" unit={units.marks.density} value={form.reportedDensity} error={errorOf('reported.maxDryDensity')} onChange={(event) => onChange({ reportedDensity: event.target.value })} />
          <NumberField label="Optimum moisture" unit="%" value={form.reportedMoisture} error={errorOf('reported.optimumMoisture')} onChange={(event) => onChange({ reportedMoisture: event.target.value })} />
          <TextArea className="sm:col-span-2" label="Why this pair" rows={2} maxLength={2_000} value={form.reportedReason} error={errorOf('reported.reason')} onChange={(event) => onChange({ reportedReason: event.target.value })} />
        </div>
      )}
      <label className={CHECK}>
        <input type="checkbox" className="size-5 accent-ink" checked={form.withCoarse} onChange={(event) => onChange({ withCoarse: event.target.checked })} />
        The stones kept on the {sieveWords(form.method, form.procedure)} are known
      </label>
      {form.withCoarse && (
        <div className="grid gap-3 sm:grid-cols-2">
          <NumberField label="Bulk specific gravity of the stones" value={form.coarseGravity} error={errorOf('coarse.bulkGravity')} onChange={(event) => onChange({ coarseGravity: event.target.value })} />
          <NumberField label="Moisture of the stones" unit="%" hint="0 where it is not known" value={form.coarseMoisture} error={errorOf('coarse.moisture')} onChange={(event) => onChange({ coarseMoisture: event.target.value })} />
        </div>
      )}
    </>
  )
}
