import { methodLetters } from '#shared/domain/compaction-method.ts'
import { unusualGravity } from '#shared/domain/typical-gravity.ts'
import type { Material } from '#shared/schemas/lab.ts'
import { NumberField, SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { METHODS } from '#web/features/lab/lab-words.ts'
import { gravityOf, type CurveForm } from './curve-form.ts'
import { TypicalGravities } from './typical-gravities.tsx'

type CurveHeadFieldsProps = { form: CurveForm; materials: readonly Material[]; gs: number; errorOf: (path: string) => string | undefined; onChange: (change: Partial<CurveForm>) => void }

/** What was sampled, by which method, and the gravity of its solids. A material brings its own gravity with it. */
export function CurveHeadFields({ form, materials, gs, errorOf, onChange }: CurveHeadFieldsProps) {
  const letters = methodLetters(form.method)
  const own = materials.find((material) => material.id === form.materialId)
  const handleMaterial = (id: string): void => {
    const material = materials.find((each) => each.id === id)
    const untouched = form.gs === '' || (own !== undefined && form.gs === gravityOf(own).gs)
    onChange({ materialId: id, ...(untouched ? gravityOf(material) : {}) })
  }
  const fromMaterial = own !== undefined && own.gs !== null && form.gs === gravityOf(own).gs ? 'As the material has it' : undefined
  return (
    <>
      <div className="grid grid-cols-2 items-start gap-x-[14px] gap-y-3 sm:grid-cols-3">
        <TextField className="max-sm:col-span-2" label="Code" placeholder="RB-3" maxLength={80} value={form.code} error={errorOf('code')} onChange={(event) => onChange({ code: event.target.value })} />
        <SelectField className="max-sm:order-first max-sm:col-span-2" label="Material" value={form.materialId} error={errorOf('materialId')} onChange={(event) => handleMaterial(event.target.value)}>
          <option value="">Choose a material</option>
          {materials.map((material) => (
            <option key={material.id} value={material.id}>
              {material.name}
            </option>
          ))}
        </SelectField>
        <TextField className="max-sm:col-span-2" label="Sampled" type="datetime-local" value={form.sampledAt} error={errorOf('sampledAt')} onChange={(event) => onChange({ sampledAt: event.target.value })} />
        <div className="grid grid-cols-[minmax(0,1fr)_5rem] gap-x-[14px] max-sm:order-first max-sm:col-span-2">
          <SelectField label="Method" value={form.method} onChange={(event) => onChange({ method: METHODS.find((method) => method === event.target.value) ?? 'D698', procedure: 'A' })}>
            {METHODS.map((method) => (
              <option key={method}>{method}</option>
            ))}
          </SelectField>
          <SelectField label="Letter" value={form.procedure} error={errorOf('procedure')} onChange={(event) => onChange({ procedure: letters.find((letter) => letter === event.target.value) ?? 'A' })}>
            {letters.map((letter) => (
              <option key={letter}>{letter}</option>
            ))}
          </SelectField>
        </div>
        <NumberField label="Specific gravity, Gs" hint={fromMaterial} value={form.gs} error={errorOf('gs')} warning={form.gsMeasured ? undefined : (unusualGravity(gs) ?? undefined)} onChange={(event) => onChange({ gs: event.target.value })} />
        <SelectField label="Gs is" value={form.gsMeasured ? 'measured' : 'assumed'} onChange={(event) => onChange({ gsMeasured: event.target.value === 'measured' })}>
          <option value="assumed">Assumed</option>
          <option value="measured">Measured</option>
        </SelectField>
      </div>
      <TypicalGravities />
    </>
  )
}
