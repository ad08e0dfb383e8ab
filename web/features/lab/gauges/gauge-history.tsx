import type { GaugeCorrection, GaugeDetail } from '#shared/schemas/gauge.ts'
import { countText, dateWords } from '#web/components/gauge/gauge-words.ts'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useUnits } from '#web/lib/site-context.tsx'

/** Moisture corrections by material, those out of force too. */
export function CorrectionsTable({ gauge, onWithdraw }: { gauge: GaugeDetail; onWithdraw: ((correction: GaugeCorrection) => void) | undefined }) {
  const units = useUnits()
  if (gauge.corrections.length === 0) return <p className="m-0 text-ink-2">None. A gauge counts all hydrogen as water: compare it with the oven for each material.</p>
  return (
    <Table caption={`Moisture corrections of gauge ${gauge.serial}`}>
      <thead>
        <tr>
          <HeadCell className="pl-0">Material</HeadCell>
          <HeadCell numeric>K</HeadCell>
          <HeadCell numeric>Pairs</HeadCell>
          <HeadCell numeric>Spread</HeadCell>
          <HeadCell>In force</HeadCell>
          <HeadCell aria-label="Act" />
        </tr>
      </thead>
      <tbody>
        {gauge.corrections.map((each) => (
          <Row key={each.id} className={each.inForce ? '' : 'text-ink-2'}>
            <RowHead className="pl-0">{each.materialName}</RowHead>
            <Cell numeric>{units.number(each.k, 1)}</Cell>
            <Cell numeric>{each.pairs.length}</Cell>
            <Cell numeric>
              {units.number(each.least, 1)} to {units.number(each.greatest, 1)}
            </Cell>
            <Cell>{each.withdrawn !== null ? `Withdrawn: ${each.withdrawn.reason}` : `${each.inForce ? 'From' : 'Replaced, from'} ${units.date(each.inForceFrom)}`}</Cell>
            <Cell className="pr-0 text-right">
              {each.withdrawn === null && onWithdraw !== undefined && (
                <button type="button" className="link-ink text-small pointer-coarse:min-h-11" aria-label={`Withdraw the correction for ${each.materialName}`} onClick={() => onWithdraw(each)}>
                  Withdraw
                </button>
              )}
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  )
}

/** Calibrations and times out of service, newest first, one line each. */
export function GaugeHistory({ gauge }: { gauge: GaugeDetail }) {
  const units = useUnits()
  const lines = [
    ...gauge.calibrations.map((each) => ({
      id: each.id,
      at: `${each.calibratedOn}T12`,
      words: `${dateWords(each.calibratedOn)}: calibrated at density ${countText(each.density)} and moisture ${countText(each.moisture)}${each.dueOn === null ? '' : `, due ${dateWords(each.dueOn)}`}. Recorded by ${each.recordedBy}.`,
    })),
    ...gauge.outages.map((each) => ({
      id: each.id,
      at: each.from,
      words: `${units.dateTime(each.from)}: out of service, ${each.reason} (${each.takenOutBy}). ${each.until === null ? 'It still is.' : `Back ${units.dateTime(each.until)}${each.returnRemarks === null || each.returnRemarks === '' ? '' : `, ${each.returnRemarks}`} (${each.returnedBy}).`}`,
    })),
  ].sort((a, b) => (a.at < b.at ? 1 : -1))
  return (
    <ul className="m-0 list-none p-0">
      {lines.map(({ id, words }) => (
        <li key={id} className="border-b border-rule py-[7px]">
          {words}
        </li>
      ))}
    </ul>
  )
}
