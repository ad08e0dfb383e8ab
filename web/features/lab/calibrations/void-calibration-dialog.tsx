import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { voidCalibrationSchema, type Calibration } from '#shared/schemas/calibration.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useVoidCalibration } from '#web/data/calibration/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** Takes a calibration out of use, with a reason; it stays on record, and tests keep what they were reduced with. */
export function VoidCalibrationDialog({ calibration, onClose }: { calibration: Calibration; onClose: () => void }) {
  const { site } = useSite()
  const voiding = useVoidCalibration(site.id, { saysOwnErrors: true })
  const { register, handleSubmit, formState } = useForm<{ reason: string }>({ resolver: zodResolver(voidCalibrationSchema), defaultValues: { reason: '' } })
  const handleVoid = handleSubmit(({ reason }) => voiding.mutate({ id: calibration.id, reason }, { onSuccess: onClose }))
  return (
    <Dialog open onOpenChange={(open) => !open && onClose()} title={`Void the calibration of ${calibration.apparatus}?`} description="It stays on record with your reason and is offered no more. Tests that used it keep their values. A void cannot be taken back.">
      <form noValidate onSubmit={(event) => void handleVoid(event)} className="grid gap-[14px]">
        {voiding.error !== null && (
          <Banner tone="bad" title="Not voided.">
            {voiding.error.message}
          </Banner>
        )}
        <TextArea label="Reason" error={formState.errors.reason?.message} {...register('reason')} />
        <div className="flex flex-wrap gap-2 pb-2">
          <DialogClose>
            <Button kind="primary" size="touch">
              Keep it
            </Button>
          </DialogClose>
          <Button type="submit" kind="danger" size="touch" busyLabel={voiding.isPending && 'Voiding'}>
            Void with reason
          </Button>
        </div>
      </form>
    </Dialog>
  )
}
