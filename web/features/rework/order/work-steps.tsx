import type { Order } from '#shared/schemas/rework.ts'
import { useUnits } from '#web/lib/site-context.tsx'
import { edgeWords, stepsToTake } from './order-words.ts'

/** What to do to this ground, in its order. */
export function WorkSteps({ order, big = false }: { order: Order; big?: boolean }) {
  const units = useUnits()
  const steps = stepsToTake(order, units)
  if (steps.length === 0) return <p className="m-0 border-t border-rule py-3 text-ink-2">The order gives no figures. Ask the QC lead what to do.</p>
  return (
    <ol aria-label="What to do" className="m-0 list-none p-0">
      {steps.map(({ what, figure }) => (
        <li key={what} className={`grid grid-cols-[1fr_auto] items-baseline gap-3 border-t border-rule ${big ? 'pt-[11px] pb-[9px] text-[18px] leading-[1.25] font-semibold' : 'pt-[9px] pb-[7px] font-semibold'}`}>
          <span>{what}</span>
          {figure !== null && <span className={big ? 'num whitespace-nowrap text-bad' : 'num whitespace-nowrap'}>{figure}</span>}
        </li>
      ))}
    </ol>
  )
}

/** The usual caution: short, deferring to the site's own plan. */
export function WorkCaution({ order }: { order: Order }) {
  return (
    <p className="m-0 border-t border-rule pt-[10px] text-[13px] leading-[1.4] font-medium text-ink-2">
      {[edgeWords(order), 'Stop when the tester signals.'].filter((words) => words !== null).join(' ')}
    </p>
  )
}
