import { useState } from 'react'
import { toast } from 'sonner'
import { fitReferenceCurve } from '#shared/domain/reference-curve.ts'
import type { Curve, CurveUse } from '#shared/schemas/lab.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Dialog, DialogClose } from '#web/components/ui/dialog.tsx'
import { useApproveCurve } from '#web/data/curve/mutations.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { FIT_WORDS, issuesOf, pairWords } from '#web/features/lab/lab-words.ts'

/** True where the fits lie so far apart that the pair must be confirmed knowingly. */
function mustKnow(curve: Curve, use: CurveUse, waterDensity: number): boolean {
  const fit = fitReferenceCurve({ points: curve.points, gs: curve.gs, gsMeasured: curve.gsMeasured, waterDensity, use: use === 'reported' ? 'spline' : use })
  return use === 'reported' || (fit.ok && fit.confirmKnowingly)
}

/** The lead puts a curve in force with one of its pairs, knowing where they differ. */
export function ApproveDialog({ curve, onClose }: { curve: Curve; onClose: () => void }) {
  const { site, units } = useSite()
  const [use, setUse] = useState<CurveUse>(curve.pairFrom ?? 'spline')
  const [known, setKnown] = useState(false)
  const [asked, setAsked] = useState(false)
  const approve = useApproveCurve(site.id, { saysOwnErrors: true })
  const pairs: Readonly<Record<CurveUse, Curve['pair']>> = { spline: curve.fit.spline, quadratic: curve.fit.quadratic, cubic: curve.fit.cubic, reported: curve.reported }
  const choices = (['spline', 'quadratic', 'cubic', 'reported'] as const).filter((name) => pairs[name] !== null)
  const knowingly = mustKnow(curve, use, site.waterDensity)
  const send = () => {
    setAsked(true)
    if (knowingly && !known) return
    approve.mutate(
      { id: curve.id, use },
      {
        onSuccess: (answer) => {
          toast(`${answer.code} is in force: ${pairWords(answer.pair, units)}.`)
          onClose()
        },
      },
    )
  }
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Approve ${curve.code}`}
      description="Tests are judged by the pair you confirm. It is reported to 0.1 and never changed afterwards."
      actions={
        <>
          <Button kind="primary" busyLabel={approve.isPending && 'Approving'} onClick={send}>
            Approve this pair
          </Button>
          <DialogClose>
            <Button kind="quiet">Cancel</Button>
          </DialogClose>
        </>
      }
    >
      <fieldset className="m-0 border-0 p-0">
        <legend className="mb-1 p-0 text-small font-medium text-ink-2">Pair to use</legend>
        {choices.map((name) => (
          <label key={name} className="flex min-h-11 cursor-pointer items-center gap-3 border-t border-rule">
            <input
              type="radio"
              name="use"
              className="size-5 accent-ink"
              checked={use === name}
              onChange={() => {
                setUse(name)
                setKnown(false)
              }}
            />
            <span className="flex-1 font-semibold">{FIT_WORDS[name]}</span>
            <span className="num">{pairWords(pairs[name], units)}</span>
          </label>
        ))}
      </fieldset>
      {knowingly && (
        <div className="mt-3">
          <label className="flex min-h-11 cursor-pointer items-center gap-3 font-medium text-warn">
            <input type="checkbox" className="size-5 shrink-0 accent-ink" checked={known} onChange={(event) => setKnown(event.target.checked)} />
            {use === 'reported' ? 'This pair is the laboratory’s, not read from the curve. I have compared the two.' : 'The fits differ by 0.3 or more. I have looked at the points and confirm this pair.'}
          </label>
          {asked && !known && (
            <p role="alert" className="m-0 mt-1 text-small font-medium text-bad">
              Confirm that you know it.
            </p>
          )}
        </div>
      )}
      {issuesOf(approve.error).map((message) => (
        <Banner key={message} tone="bad" className="mt-3" title={message} />
      ))}
    </Dialog>
  )
}
