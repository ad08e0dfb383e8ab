import { Link } from 'react-router-dom'
import type { Order } from '#shared/schemas/rework.ts'
import { paths } from '#web/app/paths.ts'
import { PanelRow, PanelRows } from '#web/components/ui/panel-row.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { StakeFlag } from '#web/components/ui/stake-flag.tsx'
import { useSite } from '#web/lib/site-context.tsx'

/** The recording sheet at a drawn point, following the failing test as its retest where there is one. */
export function retestLink(siteId: string, order: Pick<Order, 'cause' | 'lift'>, point: Order['retestPoints'][number]): string {
  const query = new URLSearchParams({
    ...(order.cause === null ? {} : { follows: order.cause.testId, kind: 'retest' }),
    e: point.easting.toFixed(2),
    n: point.northing.toFixed(2),
    lift: String(order.lift),
  })
  return `${paths.newTest(siteId)}?${query.toString()}`
}

/** How far the order is from closing, and where its retests are to be taken. */
export function RetestList({ order }: { order: Order }) {
  const { site, label, units, can } = useSite()
  const left = Math.max(0, order.retestsWanted - order.retestsPassed)
  return (
    <section className="mt-7">
      <SectionHead aside={`${order.retestsPassed} of ${order.retestsWanted} passed`}>Retests</SectionHead>
      {order.state !== 'ready' ? (
        <p className="m-0 text-ink-2">Their places are drawn when the work is reported ready. It takes {left === 1 ? 'one passing retest' : `${left} passing retests`} to close the order.</p>
      ) : (
        <PanelRows label="Places of the retests">
          {order.retestPoints.map((point, index) => (
            <PanelRow
              key={`${point.cell} ${point.easting} ${point.northing}`}
              mark={<StakeFlag label={`R${index + 1}`} />}
              title={`Cell ${label(point.cell)}, lift ${order.lift}`}
              detail={<span className="num">{`E ${units.number(point.easting, 1)} N ${units.number(point.northing, 1)}`}</span>}
              action={
                can('test.record-qc') ? (
                  <Link to={retestLink(site.id, order, point)} className="inline-flex items-start pointer-coarse:min-h-11" aria-label={`Record the retest at cell ${label(point.cell)}`}>
                    Record the retest
                  </Link>
                ) : undefined
              }
            />
          ))}
        </PanelRows>
      )}
    </section>
  )
}
