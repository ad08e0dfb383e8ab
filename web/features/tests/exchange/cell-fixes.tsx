import { useState } from 'react'
import { columnOf, COLUMN_KEYS, READABLE_KEYS, type ColumnKey } from '#shared/exchange/test-columns.ts'
import type { RowProblem } from '#shared/schemas/test-exchange.ts'
import { SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import type { ImportLine } from './import-lines.ts'

type CellFixesProps = { line: ImportLine; problems: readonly RowProblem[]; onEdit: (key: ColumnKey, text: string) => void }

const columnKey = (column: string): ColumnKey => COLUMN_KEYS.find((key) => key === column) ?? 'record'

/** The cells of a row that need a look, with what is wrong with each; any other of its cells can be added. */
export function CellFixes({ line, problems, onEdit }: CellFixesProps) {
  const [added, setAdded] = useState<readonly ColumnKey[]>([])
  const messages = new Map<ColumnKey, string>()
  for (const { column, message } of problems) messages.set(columnKey(column), [messages.get(columnKey(column)), message].filter(Boolean).join(' '))
  const shown = [...new Set([...messages.keys(), ...line.edited, ...added])]
  const others = READABLE_KEYS.filter((key) => !shown.includes(key))
  return (
    <div className="mt-2 grid grid-cols-1 items-start gap-x-[14px] gap-y-3 sm:grid-cols-2 lg:grid-cols-3">
      {shown.map((key) => (
        <CellField key={key} name={`Line ${line.line}: ${columnOf(key).label}`} value={line.cells[key] ?? ''} error={messages.get(key)} onEdit={(text) => onEdit(key, text)} />
      ))}
      <SelectField label={`Line ${line.line}: another cell`} value="" onChange={(event) => setAdded([...added, columnKey(event.target.value)])}>
        <option value="">Choose a cell to correct</option>
        {others.map((key) => (
          <option key={key} value={key}>
            {columnOf(key).label}
          </option>
        ))}
      </SelectField>
    </div>
  )
}

/** A cell's text; taken over when the field is left or Enter is pressed. */
function CellField({ name, value, error, onEdit }: { name: string; value: string; error: string | undefined; onEdit: (text: string) => void }) {
  const [text, setText] = useState(value)
  const commit = (): void => {
    if (text !== value) onEdit(text)
  }
  return <TextField label={name} value={text} error={error} autoComplete="off" spellCheck={false} onChange={(event) => setText(event.target.value)} onBlur={commit} onKeyDown={(event) => event.key === 'Enter' && commit()} />
}
