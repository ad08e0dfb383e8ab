import type { GroundSheet } from '#shared/ground-codec.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { distanceToCells } from '#web/features/rework/order/order-plan-geometry.ts'
import { OrderPlan } from '#web/features/rework/order/order-plan.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { convertLength } from '#shared/units/length.ts'
import type { Units } from '#web/lib/units.ts'
import { useWhereIAm, type WhereIAm } from './use-where-i-am.ts'

/** "You, 120 ft": whole feet or metres, since a phone knows no more. */
function distanceWords(mm: number | null, units: Units): string {
  if (mm === null) return 'You'
  if (mm === 0) return 'You are in it'
  return units.system === 'us' ? `You, ${units.number(convertLength(mm, 'mm', 'ft'))} ft` : `You, ${units.number(mm / 1000)} m`
}

function accuracyWords(where: WhereIAm, units: Units): string {
  if (where.state !== 'on') return ''
  return units.system === 'us' ? `good to about ${units.number(convertLength(where.accuracyMm, 'mm', 'ft'))} ft` : `good to about ${units.number(where.accuracyMm / 1000)} m`
}

/** The order on the ground, with the person on it when asked for. */
export function CabMap({ order, sheet }: { order: Order; sheet: GroundSheet | undefined }) {
  const { site, lookup, units } = useSite()
  const { where, show, hide } = useWhereIAm()
  const you = where.state === 'on' ? { at: where.at, words: distanceWords(distanceToCells(where.at, order.cells, lookup, site.grid), units) } : null
  const shown = where.state === 'on' || where.state === 'asking'
  return (
    <div className="relative border-b border-rule">
      <OrderPlan order={order} sheet={sheet} you={you} />
      <button type="button" className="link-ink absolute top-[220px] right-0 min-h-12 bg-film/90 px-[18px] text-[13px]" onClick={shown ? hide : show}>
        {shown ? 'Hide me' : 'Show where I am'}
      </button>
      <p role="status" className="m-0 px-[18px] text-[13px] text-ink-2 not-empty:py-2">
        {where.state === 'asking' && 'Asking the phone where it is'}
        {where.state === 'failed' && where.words}
        {you !== null && `${you.words}, ${accuracyWords(where, units)}`}
      </p>
    </div>
  )
}
