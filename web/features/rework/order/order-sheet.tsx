import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import type { Order } from '#shared/schemas/rework.ts'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { EmptyState } from '#web/components/ui/empty-state.tsx'
import { FactsRow } from '#web/components/ui/figure.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Skeleton } from '#web/components/ui/skeleton.tsx'
import { orderQueries } from '#web/data/order/queries.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { ReworkNotRead } from '#web/features/rework/rework-not-read.tsx'
import { isApiError } from '#web/lib/api-error.ts'
import { cellRangeWords } from '#web/lib/cell-range.ts'
import { usePageTitle } from '#web/lib/page-title.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { useGround } from '#web/lib/use-ground.ts'
import { OrderActs } from './order-acts.tsx'
import { OrderPlan } from './order-plan.tsx'
import { OrderTimeline } from './order-timeline.tsx'
import { isOpen, retestWords, standingWords } from './order-words.ts'
import { RetestList } from './retest-list.tsx'
import { WorkCaution, WorkSteps } from './work-steps.tsx'

/** One order for the office: what is wrong, what to do, how far it is, and who did what. */
export function OrderSheet({ orderId }: { orderId: string }) {
  const { site } = useSite()
  const { data: order, error, refetch } = useQuery(orderQueries.detail(site.id, orderId))
  usePageTitle(order === undefined ? 'Rework order' : `Rework ${order.number}`)
  return (
    <div className="min-h-0 flex-1 overflow-y-auto bg-raised">
      <div className="px-4 pt-[18px] pb-8 sm:px-[26px]">
        <Link to={paths.rework(site.id)} className="link-ink inline-flex items-center text-small pointer-coarse:min-h-11">
          All orders
        </Link>
        {order !== undefined ? (
          <OrderBody order={order} />
        ) : error === null ? (
          <div className="mt-4">
            <Skeleton label="The order is on its way" lines={[40, 62, 58, 61]} />
          </div>
        ) : isApiError(error) && error.status === 404 ? (
          <div className="mt-4 max-w-[560px]">
            <EmptyState title="No such order on this site" action={<Link to={paths.rework(site.id)} className={buttonClasses('plain')}>All orders</Link>}>
              The address may be mistyped.
            </EmptyState>
          </div>
        ) : (
          <ReworkNotRead error={error} retry={() => void refetch()} />
        )}
      </div>
    </div>
  )
}

function OrderBody({ order }: { order: Order }) {
  const { site, lookup, zone, units } = useSite()
  const ground = useGround(site.id)
  const now = useSiteClock(site.id)
  const { cause } = order
  return (
    <>
      <h1 className="m-0 mt-2 text-verdict font-extrabold tracking-[-0.01em] text-balance">
        {order.number}. {order.headline}
      </h1>
      <p className="m-0 mt-1 text-ink-2">
        {zone(order.zoneId)?.name}, lift {order.lift}, cells {cellRangeWords(lookup, order.cells)}. {standingWords(order, units, now())}.
        {order.assignedTo !== null && ` Assigned to ${order.assignedTo}.`}
      </p>
      <div className="mt-5 grid gap-x-10 gap-y-8 lg:grid-cols-[minmax(0,1fr)_380px]">
        <div className="min-w-0">
          <div className="border border-rule-2">
            <OrderPlan order={order} sheet={ground.sheet} height={300} />
          </div>
          <FactsRow
            className="mt-4"
            facts={[
              { label: 'Volume', value: units.volume(order.volumeCm3) },
              { label: 'Cells', value: String(order.cells.length) },
              { label: 'Retests passed', value: retestWords(order) },
            ]}
          />
          <section className="mt-6">
            <SectionHead
              aside={
                cause === null ? (
                  `issued by ${order.openedBy.name}`
                ) : (
                  <>
                    because of{' '}
                    <Link to={paths.test(site.id, cause.testId)} className="link-ink">
                      {cause.number}
                    </Link>
                    , {cause.headline.toLowerCase()}, {units.percent(cause.rc)} at {units.percent(cause.moisture)} moisture
                  </>
                )
              }
            >
              What to do
            </SectionHead>
            <WorkSteps order={order} />
            <WorkCaution order={order} />
          </section>
        </div>
        <div className="min-w-0">
          {isOpen(order) && <OrderActs order={order} now={now} />}
          {isOpen(order) && <RetestList order={order} />}
          <section className="mt-7">
            <SectionHead>What was done</SectionHead>
            <OrderTimeline order={order} />
          </section>
        </div>
      </div>
    </>
  )
}
