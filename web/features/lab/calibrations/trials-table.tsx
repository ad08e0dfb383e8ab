import { Button } from '#web/components/ui/button.tsx'
import { NumberField } from '#web/components/ui/text-fields.tsx'
import { EMPTY_TRIAL, KIND_WORDS, type CalibrationForm, type Trial } from './calibration-form.ts'

const COLUMNS = ['a', 'b', 'c'] as const
const MOST = 12

type TrialsTableProps = { form: CalibrationForm; unit: string; errorAt: (place: string) => string | undefined; onChange: (trials: readonly Trial[]) => void }

/** Repeated measurements, a line each; blank lines are left out. */
export function TrialsTable({ form, unit, errorAt, onChange }: TrialsTableProps) {
  const { columns } = KIND_WORDS[form.kind]
  const set = (row: number, column: keyof Trial, text: string) => onChange(form.trials.map((trial, i) => (i === row ? { ...trial, [column]: text } : trial)))
  return (
    <div className={`grid gap-3 ${columns.length === 1 ? 'sm:grid-cols-3' : ''}`}>
      {form.trials.map((trial, row) => (
        // rows have no identity but their place
        <div key={row} className="grid items-start gap-3" style={{ gridTemplateColumns: `repeat(${columns.length}, minmax(0, 1fr))` }}>
          {columns.map((name, i) => {
            const column = COLUMNS[i] ?? 'a'
            return <NumberField key={name} label={`${name} ${row + 1}`} unit={unit} value={trial[column]} error={errorAt(`${row}.${column}`)} onChange={(event) => set(row, column, event.target.value)} />
          })}
        </div>
      ))}
      {form.trials.length < MOST && (
        <div className="self-end">
          <Button className="pointer-coarse:min-h-12" onClick={() => onChange([...form.trials, EMPTY_TRIAL])}>One more</Button>
        </div>
      )}
    </div>
  )
}
