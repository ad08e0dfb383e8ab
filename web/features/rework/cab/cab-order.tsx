import { useState } from 'react'
import { toast } from 'sonner'
import type { GroundSheet } from '#shared/ground-codec.ts'
import type { Order, OrderStepInput } from '#shared/schemas/rework.ts'
import { Button } from '#web/components/ui/button.tsx'
import { groundOf } from '#web/features/rework/order/order-words.ts'
import { WorkCaution, WorkSteps } from '#web/features/rework/order/work-steps.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { cellRangeWords } from '#web/lib/cell-range.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CabHelp } from './cab-help.tsx'
import { CabMap } from './cab-map.tsx'
import { CabReady } from './cab-ready.tsx'

type CabOrderProps = {
  order: Order
  others: readonly Order[]
  sheet: GroundSheet | undefined
  onOpen: (orderId: string) => void
  onStep: (order: Order, step: OrderStepInput) => void
  now: () => number
}

/** One order as the machine's operator needs it: where, what, how much, and the two keys at the bottom. */
export function CabOrder({ order, others, sheet, onOpen, onStep, now }: CabOrderProps) {
  const { lookup, zone } = useSite()
  const [asking, setAsking] = useState<'ready' | 'help' | null>(null)
  const step = () => ({ id: crypto.randomUUID(), happenedAt: new Date(now()).toISOString() })

  if (asking === 'ready') {
    return (
      <CabReady
        order={order}
        onBack={() => setAsking(null)}
        onReport={(done) => {
          onStep(order, { ...step(), kind: 'ready', ...done })
          setAsking(null)
        }}
      />
    )
  }
  if (asking === 'help') {
    return (
      <CabHelp
        order={order}
        onBack={() => setAsking(null)}
        onCall={(remarks) => {
          onStep(order, { ...step(), kind: 'help', remarks })
          toast(`The lead is asked to come to ${order.number}.`)
          setAsking(null)
        }}
      />
    )
  }
  return (
    <>
      <div className="min-h-0 flex-1 overflow-y-auto">
        <CabMap order={order} sheet={sheet} />
        <div className="px-[18px] pt-4 pb-3">
          <h2 className="m-0 mb-1 text-[31px] leading-[1.08] font-extrabold tracking-[-0.015em] text-balance">{order.headline}</h2>
          <p className="m-0 mb-[14px] text-[15px] font-medium text-ink-2">
            {zone(order.zoneId)?.name}, lift {order.lift}, cells {cellRangeWords(lookup, order.cells)}
          </p>
          <WorkSteps order={order} big />
          <WorkCaution order={order} />
          {others.length > 0 && <OtherOrders orders={others} onOpen={onOpen} />}
        </div>
      </div>
      <div className="grid gap-[10px] border-t border-rule px-[18px] pt-[14px] pb-5">
        {order.state === 'issued' ? (
          <Button kind="act" size="cab" onClick={() => onStep(order, { ...step(), kind: 'started' })}>
            Start
          </Button>
        ) : (
          <Button kind="act" size="cab" onClick={() => setAsking('ready')}>
            Ready for retest
          </Button>
        )}
        <Button size="touch" className="w-full bg-transparent!" onClick={() => setAsking('help')}>
          I need the lead here
        </Button>
      </div>
    </>
  )
}

function OtherOrders({ orders, onOpen }: { orders: readonly Order[]; onOpen: (orderId: string) => void }) {
  const { lookup, zone } = useSite()
  return (
    <section aria-label="My other orders" className="mt-5">
      <h3 className="m-0 mb-1 text-[15px] font-bold">After this</h3>
      <ul className="m-0 list-none p-0">
        {orders.map((order) => (
          <li key={order.id} className="border-t border-rule">
            <button type="button" onClick={() => onOpen(order.id)} className="grid min-h-14 w-full grid-cols-[auto_1fr] items-center gap-3 py-2 text-left">
              <StateSwatch state={groundOf(order)} size={28} />
              <span>
                <b className="block text-[16px] font-semibold">
                  {order.number}, {order.headline}
                </b>
                <span className="block text-[13px] text-ink-2">
                  {zone(order.zoneId)?.name}, lift {order.lift}, {cellRangeWords(lookup, order.cells)}
                </span>
              </span>
            </button>
          </li>
        ))}
      </ul>
    </section>
  )
}
