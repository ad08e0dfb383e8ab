import { useState } from 'react'
import type { Order } from '#shared/schemas/rework.ts'
import { Button } from '#web/components/ui/button.tsx'
import { readReadyForm, readyFormOf, type ReadyErrors, type ReadyStep } from '#web/features/rework/order/ready-form.ts'
import { useUnits } from '#web/lib/site-context.tsx'

import { DoneStepper } from './done-stepper.tsx'

type CabReadyProps = { order: Order; onReport: (done: Omit<ReadyStep, 'id' | 'kind' | 'happenedAt'>) => void; onBack: () => void }

/** What was done, in the site's units, before the ground is reported ready for its retest. */
export function CabReady({ order, onReport, onBack }: CabReadyProps) {
  const units = useUnits()
  const [form, setForm] = useState(() => readyFormOf(order, units))
  const [errors, setErrors] = useState<ReadyErrors>({})
  const us = units.system === 'us'
  const report = () => {
    const read = readReadyForm(form, units)
    if (read.ok) onReport(read.done)
    else setErrors(read.errors)
  }
  return (
    <>
      <div className="min-h-0 flex-1 overflow-y-auto px-[18px] pt-4 pb-2">
        <h2 className="m-0 mb-3 text-verdict font-extrabold">What was done?</h2>
        <DoneStepper label="Passes" unit="passes" step={1} value={form.passes} error={errors.passes} onChange={(passes) => setForm({ ...form, passes })} />
        <DoneStepper label="Water added" unit={units.marks.water} step={us ? 100 : 500} value={form.water} error={errors.water} onChange={(water) => setForm({ ...form, water })} />
        <DoneStepper label="Depth worked" unit={units.marks.thickness} step={us ? 1 : 25} value={form.depth} error={errors.depth} onChange={(depth) => setForm({ ...form, depth })} />
        <p className="m-0 border-t border-rule pt-[10px] text-[13px] text-ink-2">Earlier tests in these cells stop counting once this is reported.</p>
      </div>
      <div className="grid gap-[10px] px-[18px] pt-[14px] pb-5">
        <Button kind="act" size="cab" onClick={report}>
          Report {order.number} ready
        </Button>
        <Button size="touch" className="w-full bg-transparent!" onClick={onBack}>
          Back to the work
        </Button>
      </div>
    </>
  )
}
