import type { Calibration } from '#shared/schemas/calibration.ts'
import { calibrationState, stateWords } from '#web/components/calibration/calibration-state.ts'
import { calibrationWords } from '#web/components/calibration/calibration-words.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { FactsRow } from '#web/components/ui/figure.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { KIND_WORDS } from './calibration-form.ts'
import { measuredRows } from './calibration-rows.ts'

type CalibrationSheetProps = { calibration: Calibration; now: number; onVoid: (() => void) | undefined; onClose: () => void }

/** One calibration: what was measured, what it came to, who stands for it. */
export function CalibrationSheet({ calibration, now, onVoid, onClose }: CalibrationSheetProps) {
  const { units } = useSite()
  const { apparatus, sheet, value, spreadPercent, flags, performedAt, recordedBy, remarks, void: voided } = calibration
  const { name, gives, standard } = KIND_WORDS[sheet.kind]
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={apparatus}
      description={`${name}, ${standard}. ${stateWords(calibration, now, units)}.`}
      actions={
        <>
          <DialogClose>
            <Button kind="primary" className="pointer-coarse:min-h-12">
              Close
            </Button>
          </DialogClose>
          {onVoid !== undefined && calibrationState(calibration, now) !== 'void' && (
            <Button kind="quiet" className="pointer-coarse:min-h-12" onClick={onVoid}>
              Void with reason
            </Button>
          )}
        </>
      }
    >
      <FactsRow
        columns={2}
        facts={[
          { label: gives, value: calibrationWords(sheet.kind, value, units) },
          { label: sheet.kind === 'balloon' ? 'Largest error' : 'Farthest from the mean', value: units.percent(spreadPercent, 2) },
        ]}
      />
      {flags.map(({ code, message }) => (
        <p key={code} className="mt-2 mb-0 font-medium text-warn">
          {message}
        </p>
      ))}
      <dl className="m-0 mt-3">
        {measuredRows(sheet).map((row) => (
          <div key={row.label} className="flex items-baseline justify-between gap-3 border-b border-rule py-[5px]">
            <dt className="text-ink-2">{row.label}</dt>
            <dd className="num m-0 text-right">{row.value}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-3 mb-0 text-small text-ink-2">
        {recordedBy.name}, {units.fullDate(performedAt)}, {units.time(performedAt)}.{remarks !== '' && ` ${remarks}.`}
      </p>
      {voided !== null && (
        <p className="mt-1 mb-0 text-small text-ink-2">
          Void by {voided.by}, {units.fullDate(voided.at)}: {voided.reason}.
        </p>
      )}
    </Dialog>
  )
}
