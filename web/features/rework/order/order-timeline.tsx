import type { Order } from '#shared/schemas/rework.ts'
import { useUnits } from '#web/lib/site-context.tsx'
import type { Units } from '#web/lib/units.ts'

type Step = Order['steps'][number]

const WORDS: Readonly<Record<Step['kind'], string>> = {
  issued: 'Issued',
  assigned: 'Assigned',
  started: 'Started',
  ready: 'Reported ready for retest',
  help: 'Lead wanted at the place',
  reopened: 'Reopened',
  edited: 'Cells changed',
  closed: 'Closed',
  withdrawn: 'Withdrawn',
}

function doneWords({ done }: Step, units: Units): string | null {
  if (done === null) return null
  const parts = [
    done.passes === null ? null : `${done.passes} ${done.passes === 1 ? 'pass' : 'passes'}`,
    done.waterLitres === null ? null : `${units.water(done.waterLitres)} added`,
    done.depthUm === null ? null : `${units.thickness(done.depthUm)} deep`,
  ]
  return parts.filter((part) => part !== null).join(', ')
}

/** The order's steps, oldest first: what, who, when, and what was reported done. */
export function OrderTimeline({ order }: { order: Order }) {
  const units = useUnits()
  return (
    <ol aria-label={`Steps of ${order.number}`} className="m-0 list-none p-0">
      {order.steps.map((step, index) => {
        const done = doneWords(step, units)
        return (
          <li key={`${step.at} ${index}`} className="relative grid grid-cols-[14px_1fr] gap-x-3 pb-4 last:pb-0">
            <span aria-hidden className={`mt-[5px] block size-[11px] border-2 border-ink ${step.kind === 'help' ? 'bg-rework' : 'bg-raised'}`} />
            {index < order.steps.length - 1 && <span aria-hidden className="absolute top-[18px] bottom-[-4px] left-[4.5px] w-[2px] bg-rule-2" />}
            <span className="min-w-0 leading-[1.35]">
              <b className="font-semibold">
                {WORDS[step.kind]}
                {step.kind === 'assigned' && ` to ${step.text}`}
              </b>
              <span className="block text-small text-ink-2">
                {units.dateTime(step.at)}, {step.by}
              </span>
              {done !== null && <span className="block">{done}</span>}
              {step.kind !== 'assigned' && step.text !== '' && <span className="block break-words">{step.text}</span>}
            </span>
          </li>
        )
      })}
    </ol>
  )
}
