import type { Gauge } from '#shared/schemas/gauge.ts'
import { GaugeState } from '#web/components/gauge/gauge-state.tsx'
import { countText, dateWords, GAUGE_STATE_WORDS } from '#web/components/gauge/gauge-words.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useUnits } from '#web/lib/site-context.tsx'

type GaugesTableProps = { gauges: readonly Gauge[]; chosen: string | undefined; onChoose: (id: string) => void; onCount: ((gauge: Gauge) => void) | undefined }

/** The register: each gauge with how it stands today. */
export function GaugesTable({ gauges, chosen, onChoose, onCount }: GaugesTableProps) {
  const units = useUnits()
  return (
    <Table caption="Gauges">
      <thead>
        <tr>
          <HeadCell className="pl-0">Gauge</HeadCell>
          <HeadCell>Today</HeadCell>
          <HeadCell numeric className="max-sm:hidden">
            Density
          </HeadCell>
          <HeadCell numeric className="max-sm:hidden">
            Moisture
          </HeadCell>
          <HeadCell className="max-sm:hidden">Calibration</HeadCell>
          <HeadCell aria-label="Act" />
        </tr>
      </thead>
      <tbody>
        {gauges.map((gauge) => {
          const { id, serial, model, check, calibration } = gauge
          return (
            <Row key={id} selected={id === chosen}>
              <RowHead className="pl-0">
                <button type="button" aria-pressed={id === chosen} onClick={() => onChoose(id)} className="link-ink pointer-coarse:min-h-11">
                  {serial}
                </button>
                <span className="block text-small font-normal whitespace-normal text-ink-2">{model}</span>
              </RowHead>
              <Cell className="sm:whitespace-nowrap">
                <GaugeState state={check.state} words={GAUGE_STATE_WORDS[check.state]} />
                {check.count !== null && <span className="block pl-[19px] text-small text-ink-2">{units.time(check.count.countedAt)}</span>}
              </Cell>
              <Cell numeric className="max-sm:hidden">
                {check.count === null ? '–' : countText(check.count.density)}
              </Cell>
              <Cell numeric className="max-sm:hidden">
                {check.count === null ? '–' : countText(check.count.moisture)}
              </Cell>
              <Cell className="whitespace-nowrap max-sm:hidden">
                {calibration === null ? '–' : dateWords(calibration.calibratedOn)}
                {calibration !== null && calibration.dueOn !== null && <span className="block text-small text-ink-2">due {dateWords(calibration.dueOn)}</span>}
              </Cell>
              <Cell className="pr-0 text-right">
                {onCount !== undefined && check.state !== 'out-of-service' && (
                  <Button className="whitespace-nowrap pointer-coarse:min-h-11" onClick={() => onCount(gauge)}>
                    {check.count === null ? 'Enter count' : 'Count again'}
                  </Button>
                )}
              </Cell>
            </Row>
          )
        })}
      </tbody>
    </Table>
  )
}
