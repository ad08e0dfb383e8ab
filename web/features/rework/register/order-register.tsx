import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { orderQueries } from '#web/data/order/queries.ts'
import { isOpen } from '#web/features/rework/order/order-words.ts'
import { ReworkNotRead } from '#web/features/rework/rework-not-read.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { OrderTable } from './order-table.tsx'

function IssueLink({ siteId }: { siteId: string }) {
  return (
    <Link to={paths.ground(siteId)} className={buttonClasses('primary')}>
      Issue an order from the Ground
    </Link>
  )
}

/** Every order of the site: what is open first, what is closed folded away. */
export function OrderRegister() {
  const { site, can, units } = useSite()
  const { data: orders, error, refetch } = useQuery(orderQueries.list(site.id))
  const open = orders?.filter(isOpen) ?? []
  const closed = orders?.filter((order) => !isOpen(order)) ?? []
  const cells = open.reduce((sum, order) => sum + order.cells.length, 0)
  const volume = open.reduce((sum, order) => sum + order.volumeCm3, 0)
  return (
    <div className="min-h-0 flex-1 overflow-y-auto bg-raised">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3 px-4 pt-[22px] pb-4 sm:px-[26px]">
        <div>
          <h1 className="m-0 text-[19px] leading-[1.2] font-bold">Rework</h1>
          {orders !== undefined && (
            <p className="m-0 mt-1 text-ink-2">
              {open.length === 0 ? 'No open order' : `${open.length} open ${open.length === 1 ? 'order' : 'orders'}, ${cells} ${cells === 1 ? 'cell' : 'cells'}, ${units.volume(volume)}`}
            </p>
          )}
        </div>
        {can('rework.issue') && <IssueLink siteId={site.id} />}
      </div>
      {orders === undefined ? (
        <div className="px-4 sm:px-[26px]">{error === null ? <Skeleton label="The orders are on their way" lines={[90, 84, 88, 60]} /> : <ReworkNotRead error={error} retry={() => void refetch()} />}</div>
      ) : orders.length === 0 ? (
        <div className="max-w-[640px] px-4 sm:px-[26px]">
          <EmptyState title="No ground was ever in rework here">
            A failing test issues an order by itself, over the cells it marks.
            {can('rework.issue') && ' For ground that no test marked, choose its cells on the Ground and issue one there.'}
          </EmptyState>
        </div>
      ) : (
        <>
          {open.length > 0 && <OrderTable caption="Open orders" orders={open} />}
          {closed.length > 0 && (
            <details className="mt-6 border-t border-rule-2">
              <summary className="min-h-12 cursor-pointer px-4 pt-[14px] pb-3 font-bold sm:px-[26px]">
                Closed and withdrawn, {closed.length} {closed.length === 1 ? 'order' : 'orders'}
              </summary>
              <OrderTable caption="Closed and withdrawn orders" orders={closed} />
            </details>
          )}
        </>
      )}
    </div>
  )
}
