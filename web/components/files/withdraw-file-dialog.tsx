import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { withdrawAttachmentSchema, type Attachment } from '#shared/schemas/attachment.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useWithdrawFile } from '#web/data/attachment/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { fileTitle } from './file-words.ts'

/** Takes a file out of sight, with a reason; it is kept. */
export function WithdrawFileDialog({ file, onClose, onDone }: { file: Attachment; onClose: () => void; onDone: () => void }) {
  const { site } = useSite()
  const withdrawing = useWithdrawFile(site.id, { saysOwnErrors: true })
  const { register, handleSubmit, formState } = useForm<{ reason: string }>({ resolver: zodResolver(withdrawAttachmentSchema), defaultValues: { reason: '' } })
  const handleWithdraw = handleSubmit(({ reason }) => withdrawing.mutate({ id: file.id, reason }, { onSuccess: onDone }))
  return (
    <Dialog open onOpenChange={(open) => !open && onClose()} title={`Withdraw “${fileTitle(file)}”?`} description="Nobody but the QC lead sees it any more, and the lead sees your reason. The file itself is kept. It cannot be shown again.">
      <form noValidate onSubmit={(event) => void handleWithdraw(event)} className="grid gap-[14px]">
        {withdrawing.error !== null && (
          <Banner tone="bad" title="Not withdrawn.">
            {withdrawing.error.message}
          </Banner>
        )}
        <TextArea label="Reason" error={formState.errors.reason?.message} {...register('reason')} />
        <div className="flex flex-wrap gap-2 pb-2">
          <DialogClose>
            <Button kind="primary" size="touch">
              Keep it
            </Button>
          </DialogClose>
          <Button type="submit" kind="danger" size="touch" busyLabel={withdrawing.isPending && 'Withdrawing'}>
            Withdraw with reason
          </Button>
        </div>
      </form>
    </Dialog>
  )
}
