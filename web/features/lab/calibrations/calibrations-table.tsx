import { Fragment } from 'react'
import { CALIBRATION_KINDS } from '#shared/domain/calibration.ts'
import type { Calibration } from '#shared/schemas/calibration.ts'
import { calibrationState, stateWords } from '#web/components/calibration/calibration-state.ts'
import { calibrationWords } from '#web/components/calibration/calibration-words.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { KIND_WORDS } from './calibration-form.ts'

type CalibrationsTableProps = { calibrations: readonly Calibration[]; now: number; onOpen: (calibration: Calibration) => void; onVoid: ((calibration: Calibration) => void) | undefined }

/** Every calibration by kind, the last first; void ones keep their line. */
export function CalibrationsTable({ calibrations, now, onOpen, onVoid }: CalibrationsTableProps) {
  const kinds = CALIBRATION_KINDS.filter((kind) => calibrations.some((each) => each.sheet.kind === kind))
  return (
    <Table caption="Calibrations">
      <thead>
        <tr>
          <HeadCell className="pl-0">Apparatus</HeadCell>
          <HeadCell className="max-sm:hidden">Comes to</HeadCell>
          <HeadCell numeric className="max-lg:hidden">
            Spread
          </HeadCell>
          <HeadCell className="max-lg:hidden">Performed</HeadCell>
          <HeadCell>State</HeadCell>
          {onVoid !== undefined && (
            <HeadCell className="max-sm:hidden">
              <span className="sr-only">Acts</span>
            </HeadCell>
          )}
        </tr>
      </thead>
      <tbody>
        {kinds.map((kind) => (
          <Fragment key={kind}>
            <tr>
              <th scope="rowgroup" colSpan={6} className="border-b border-rule-2 pt-5 pb-1 text-left text-head font-bold">
                {KIND_WORDS[kind].name}
                <span className="ml-3 text-small font-medium text-ink-2">{KIND_WORDS[kind].standard}</span>
              </th>
            </tr>
            {calibrations
              .filter((each) => each.sheet.kind === kind)
              .map((each) => (
                <CalibrationRow key={each.id} calibration={each} now={now} onOpen={() => onOpen(each)} onVoid={onVoid && (() => onVoid(each))} />
              ))}
          </Fragment>
        ))}
      </tbody>
    </Table>
  )
}

type CalibrationRowProps = { calibration: Calibration; now: number; onOpen: () => void; onVoid: (() => void) | undefined }

function CalibrationRow({ calibration, now, onOpen, onVoid }: CalibrationRowProps) {
  const { units } = useSite()
  const { apparatus, sheet, value, spreadPercent, flags, performedAt, recordedBy, void: voided } = calibration
  const state = calibrationState(calibration, now)
  const words = calibrationWords(sheet.kind, value, units)
  return (
    <Row className={state === 'void' ? 'text-ink-2' : ''}>
      <RowHead className="pl-0">
        <button type="button" onClick={onOpen} className="link-ink pointer-coarse:min-h-11">
          {apparatus}
        </button>
        <span className="num block font-normal text-ink-2 sm:hidden">{words}</span>
      </RowHead>
      <Cell className="num whitespace-nowrap max-sm:hidden">{words}</Cell>
      <Cell numeric className="max-lg:hidden">
        {units.percent(spreadPercent, 2)}
      </Cell>
      <Cell className="whitespace-nowrap max-lg:hidden">
        {units.fullDate(performedAt)}
        <span className="block text-small text-ink-2">{recordedBy.name}</span>
      </Cell>
      <Cell>
        <span className={state === 'out-of-date' ? 'font-semibold text-warn' : undefined}>{stateWords(calibration, now, units)}</span>
        {voided !== null && <span className="block text-small">{voided.reason}</span>}
        {state !== 'void' &&
          flags.map(({ code, message }) => (
            <span key={code} className="block text-small text-warn">
              {message}
            </span>
          ))}
      </Cell>
      {onVoid !== undefined && (
        <Cell className="pr-0 text-right max-sm:hidden">
          {state !== 'void' && (
            <Button kind="quiet" aria-label={`Void the calibration of ${apparatus}`} onClick={onVoid}>
              Void
            </Button>
          )}
        </Cell>
      )}
    </Row>
  )
}
