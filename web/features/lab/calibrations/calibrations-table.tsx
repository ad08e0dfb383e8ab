import type { Calibration } from '#shared/schemas/calibration.ts'
import { calibrationWords } from '#web/components/calibration/calibration-words.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { KIND_WORDS } from './calibration-form.ts'

type CalibrationsTableProps = { calibrations: readonly Calibration[]; now: number; onVoid: ((calibration: Calibration) => void) | undefined }

/** Every calibration, the last first; void ones keep their line. */
export function CalibrationsTable({ calibrations, now, onVoid }: CalibrationsTableProps) {
  const { units } = useSite()
  return (
    <Table caption="Calibrations">
      <thead>
        <tr>
          <HeadCell className="pl-0">Apparatus</HeadCell>
          <HeadCell>Of</HeadCell>
          <HeadCell>Comes to</HeadCell>
          <HeadCell numeric>Spread</HeadCell>
          <HeadCell>Performed</HeadCell>
          <HeadCell>State</HeadCell>
          <HeadCell>By</HeadCell>
          {onVoid !== undefined && <HeadCell>
            <span className="sr-only">Acts</span>
          </HeadCell>}
        </tr>
      </thead>
      <tbody>
        {calibrations.map((calibration) => (
          <Row key={calibration.id} className={calibration.void === null ? '' : 'text-ink-2'}>
            <RowHead className="pl-0">{calibration.apparatus}</RowHead>
            <Cell className="whitespace-nowrap">{KIND_WORDS[calibration.sheet.kind].name}</Cell>
            <Cell className="num whitespace-nowrap">{calibrationWords(calibration.sheet.kind, calibration.value, units)}</Cell>
            <Cell numeric>{units.percent(calibration.spreadPercent)}</Cell>
            <Cell className="whitespace-nowrap">{units.fullDate(calibration.performedAt)}</Cell>
            <Cell className="min-w-[190px]">
              <State calibration={calibration} now={now} />
            </Cell>
            <Cell className="whitespace-nowrap">{calibration.recordedBy.name}</Cell>
            {onVoid !== undefined && (
              <Cell className="text-right">
                {calibration.void === null && (
                  <Button kind="quiet" aria-label={`Void the calibration of ${calibration.apparatus}`} onClick={() => onVoid(calibration)}>
                    Void
                  </Button>
                )}
              </Cell>
            )}
          </Row>
        ))}
      </tbody>
    </Table>
  )
}

function State({ calibration, now }: { calibration: Calibration; now: number }) {
  const { units } = useSite()
  const { void: voided, validUntil, flags } = calibration
  if (voided !== null) {
    return (
      <>
        Void, {units.date(voided.at)}, {voided.by}: {voided.reason}
      </>
    )
  }
  const ended = validUntil !== null && Date.parse(validUntil) < now
  return (
    <>
      {ended ? <b className="font-semibold text-warn">Out of date since {units.date(validUntil)}</b> : validUntil === null ? 'In use' : `In use until ${units.date(validUntil)}`}
      {flags.map(({ code, message }) => (
        <span key={code} className="block text-small text-warn">
          {message}
        </span>
      ))}
    </>
  )
}
