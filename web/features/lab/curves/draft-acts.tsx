import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { Link } from 'react-router-dom'
import { withdrawCurveSchema, type Curve } from '#shared/schemas/lab.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { TextArea } from '#web/components/ui/text-fields.tsx'
import { useWithdrawCurve } from '#web/data/curve/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** A draft that no test was judged by can be put right or taken back. */
export function DraftActs({ curve }: { curve: Curve }) {
  const { site, can } = useSite()
  const [asked, setAsked] = useState(false)
  if (curve.status !== 'draft' || curve.testsJudged > 0 || !can('curve.record')) return null
  return (
    <>
      <Link to={paths.correctCurve(site.id, curve.id)} className={buttonClasses('plain', 'regular', 'pointer-coarse:min-h-11')}>
        Correct
      </Link>
      <Button kind="quiet" className="pointer-coarse:min-h-11" onClick={() => setAsked(true)}>
        Withdraw
      </Button>
      {asked && <WithdrawDialog curve={curve} onClose={() => setAsked(false)} />}
    </>
  )
}

function WithdrawDialog({ curve, onClose }: { curve: Curve; onClose: () => void }) {
  const { site } = useSite()
  const withdraw = useWithdrawCurve(site.id, { saysOwnErrors: true })
  const { register, handleSubmit, formState } = useForm<{ reason: string }>({ resolver: zodResolver(withdrawCurveSchema), defaultValues: { reason: '' } })
  const handleWithdraw = handleSubmit(({ reason }) => withdraw.mutate({ id: curve.id, reason }, { onSuccess: onClose }))
  return (
    <Dialog open onOpenChange={(open) => !open && onClose()} title={`Withdraw ${curve.code}?`} description="The draft stays on record with your reason and judges nothing. This cannot be taken back.">
      <form noValidate onSubmit={(event) => void handleWithdraw(event)} className="grid gap-[14px]">
        {withdraw.error !== null && (
          <Banner tone="bad" title="Not withdrawn.">
            {withdraw.error.message}
          </Banner>
        )}
        <TextArea label="Reason" error={formState.errors.reason?.message} {...register('reason')} />
        <div className="flex flex-wrap gap-2 pb-2">
          <DialogClose>
            <Button kind="primary" size="touch">
              Keep it
            </Button>
          </DialogClose>
          <Button type="submit" kind="danger" size="touch" busyLabel={withdraw.isPending && 'Withdrawing'}>
            Withdraw with reason
          </Button>
        </div>
      </form>
    </Dialog>
  )
}
