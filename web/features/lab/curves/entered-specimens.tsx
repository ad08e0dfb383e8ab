import { VOLUME_UNIT_LABEL } from '#shared/units/volume.ts'
import type { Curve } from '#shared/schemas/lab.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useUnits } from '#web/lib/site-context.tsx'
import { formOfCurve } from './curve-form.ts'
import { columnsOf } from './entry-columns.ts'
import { readEntry } from './read-entry.ts'

/** The specimens of a curve as they were written down, and what each comes to. */
export function EnteredSpecimens({ curve }: { curve: Curve }) {
  const units = useUnits()
  const { entry: form } = formOfCurve(curve, units)
  const { worked } = readEntry(form)
  const stated = form.rows.some((row) => (row.wetDensity ?? '') !== '')
  const columns = columnsOf(form).filter(({ key }) => key !== 'wetDensity' || stated)
  const tins = form.moistureBy !== 'stated'
  const calculated = tins || form.kind !== 'dry'
  return (
    <details className="mb-4">
      <summary className="min-h-9 cursor-pointer py-1 font-semibold pointer-coarse:min-h-11">Specimens as entered</summary>
      <Table caption="Specimens as entered">
        <thead>
          <tr>
            <HeadCell className="pl-0">No.</HeadCell>
            {columns.map(({ key, head, unit }) => (
              <HeadCell key={key} numeric>
                {head}, {unit}
              </HeadCell>
            ))}
            {tins && <HeadCell numeric>Moisture, %</HeadCell>}
            {calculated && <HeadCell numeric>Comes to, dry {units.marks.density}</HeadCell>}
          </tr>
        </thead>
        <tbody>
          {form.rows.map((row, index) => {
            const point = worked[index]
            return (
              <Row key={index}>
                <RowHead className="num pl-0">{index + 1}</RowHead>
                {columns.map(({ key }) => (
                  <Cell key={key} numeric>
                    {row[key] ?? ''}
                  </Cell>
                ))}
                {tins && <Cell numeric>{point === undefined ? '–' : units.number(point.moisture, 1)}</Cell>}
                {calculated && <Cell numeric>{point === undefined ? '–' : units.densityNumber(point.dryDensity)}</Cell>}
              </Row>
            )
          })}
        </tbody>
      </Table>
      {form.kind === 'masses' && (
        <p className="mt-2 mb-0 text-small text-ink-2">
          Mould {form.mould} {form.massUnit}, {form.mouldVolume} {VOLUME_UNIT_LABEL[form.volumeUnit]}.
        </p>
      )}
    </details>
  )
}
