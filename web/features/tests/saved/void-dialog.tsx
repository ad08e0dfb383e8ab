import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { voidTestSchema, type TestDetail } from '#shared/schemas/field-test.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useVoidTest } from '#web/data/test/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

type VoidDialogProps = { test: Pick<TestDetail, 'id' | 'number' | 'outcome' | 'treatedAsFail'>; open: boolean; onOpenChange: (open: boolean) => void }

/** Takes a test out of force, with a reason; it stays on record. */
export function VoidDialog({ test, open, onOpenChange }: VoidDialogProps) {
  const { site } = useSite()
  const voiding = useVoidTest(site.id, { saysOwnErrors: true })
  const { register, handleSubmit, formState } = useForm<{ reason: string }>({ resolver: zodResolver(voidTestSchema), defaultValues: { reason: '' } })
  const failure = test.outcome === 'fail' || test.treatedAsFail
  const handleVoid = handleSubmit(({ reason }) => voiding.mutate({ id: test.id, reason }, { onSuccess: () => onOpenChange(false) }))
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title={`Void ${test.number}?`}
      description={
        <>
          It keeps its number and stays on record with your reason, and its lot is worked out again. A void cannot be taken back.
          {failure && ' The failure stays among the exceptions, and its place still needs a test.'}
        </>
      }
    >
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
