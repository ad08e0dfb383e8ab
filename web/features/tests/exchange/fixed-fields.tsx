import { useQuery } from '@tanstack/react-query'
import { METHOD_WORDS, MOISTURE_WORDS, PURPOSE_WORDS } from '#shared/exchange/exchange-words.ts'
import { columnOf, type ColumnKey, type RowCells } from '#shared/exchange/test-columns.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { SelectField, TextField } from '#web/components/ui/text-fields.tsx'
import { curveQueries } from '#web/data/curve/queries.ts'
import { gaugeQueries } from '#web/data/gauge/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import type { FileSettings } from './file-settings.ts'

/** What laboratories' files seldom say, since all of a file has it in common. */
const OFTEN_UNSAID = ['purpose', 'method', 'curve', 'lift', 'depth', 'moistureMethod', 'gauge'] as const satisfies readonly ColumnKey[]

/** What holds for every row of a file that has no column for it. */
export function FixedFields({ settings: { columns, fixed }, onChange }: { settings: FileSettings; onChange: (fixed: RowCells) => void }) {
  const { site } = useSite()
  const curves = useQuery(curveQueries.list(site.id)).data ?? []
  const gauges = useQuery(gaugeQueries.list(site.id)).data ?? []
  const choices: Partial<Record<ColumnKey, readonly string[]>> = {
    purpose: Object.values(PURPOSE_WORDS),
    method: Object.values(METHOD_WORDS),
    moistureMethod: Object.values(MOISTURE_WORDS),
    curve: curves.map((curve) => curve.code),
    gauge: gauges.map((gauge) => gauge.serial),
  }
  const unsaid = OFTEN_UNSAID.filter((key) => !columns.includes(key) && (key !== 'gauge' || gauges.length > 0))
  if (unsaid.length === 0) return null
  const put = (key: ColumnKey, text: string): void => onChange({ ...fixed, [key]: text })
  return (
    <>
      <SectionHead aside="where the file has no column for it">For every row</SectionHead>
      <div className="mb-7 grid grid-cols-1 items-start gap-x-[14px] gap-y-3 sm:grid-cols-3">
        {unsaid.map((key) => {
          const options = choices[key]
          const field = { label: columnOf(key).label, value: fixed[key] ?? '' }
          if (options === undefined) return <TextField key={key} {...field} autoComplete="off" onChange={(event) => put(key, event.target.value)} />
          return (
            <SelectField key={key} {...field} onChange={(event) => put(key, event.target.value)}>
              <option value="">Not said</option>
              {options.map((option) => (
                <option key={option} value={option}>
                  {option}
                </option>
              ))}
            </SelectField>
          )
        })}
      </div>
    </>
  )
}
