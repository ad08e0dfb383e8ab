import { Link } from 'react-router-dom'
import type { Board } from '#shared/schemas/ground.ts'
import type { Order } from '#shared/schemas/rework.ts'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Figure } from '#web/components/ui/figure.tsx'
import { PanelRows } from '#web/components/ui/panel-row.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { capital, countOf, type NotYetGroup } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { GroupRow, ShowButton } from './group-row.tsx'
import { notYetWords, waterWords } from './not-yet-words.ts'
import { useOrders } from './use-panel-data.ts'

/** Ground that nobody may cover or drive out of shape before it is cleared. */
const KEEP_OFF: readonly NotYetGroup['reason'][] = ['awaiting-test', 'awaiting-retest', 'suspect', 'awaiting-release', 'awaiting-acceptance', 'hold', 'recheck', 'awaiting-inspection']

function OrderRow({ order }: { order: Order }) {
  const { site, units } = useSite()
  const { plan } = useGroundView()
  const water = waterWords(order, units)
  const working = order.workingSince === null ? 'not started' : `working since ${units.time(order.workingSince)}`
  return (
    <GroupRow
      mark={<StateSwatch state={order.state === 'ready' ? 'awaiting-retest' : 'rework'} size={34} />}
      title={order.headline}
      detail={
        <>
          {order.number}, {plan.range(order.cells)}, {working}
          {water !== null && <b className="block font-semibold text-ink">{capital(water)}</b>}
        </>
      }
      action={<ShowButton cells={order.cells} of={order.number} />}
      acts={
        <Link to={paths.reworkOrder(site.id, order.id)} className={buttonClasses('act', 'touch', 'no-underline!')}>
          Open {order.number}
        </Link>
      }
    />
  )
}

/** What to do to the ground in front of the machine, and where to keep off. */
export function OperatorPanel({ board }: { board: Board }) {
  const { units } = useSite()
  const { plan } = useGroundView()
  const orders = useOrders().filter((order) => order.state === 'issued' || order.state === 'working')
  const cells = orders.reduce((sum, order) => sum + order.cells.length, 0)
  const keepOff = board.notYet.filter((group) => KEEP_OFF.includes(group.reason))
  return (
    <>
      <PanelSection title="My rework">
        <Figure value={String(orders.length)} unit={orders.length === 1 ? 'order' : 'orders'} of={orders.length === 0 ? 'nothing to rework now' : `in ${countOf(cells, 'cell')}`} />
        {orders.length > 0 && (
          <PanelRows label="My rework">
            {orders.map((order) => (
              <OrderRow key={order.id} order={order} />
            ))}
          </PanelRows>
        )}
      </PanelSection>
      <PanelSection title="Keep off" aside={countOf(new Set(keepOff.flatMap((group) => group.cells)).size, 'cell')}>
        <PanelRows label="Keep off">
          {keepOff.map((group) => {
            const { title, state } = notYetWords(group, plan, units)
            return (
              <GroupRow
                key={[group.reason, group.zoneId, group.lift, group.orderId, group.lotId, group.testId].join(' ')}
                mark={<StateSwatch state={state} />}
                title={title}
                detail={plan.range(group.cells)}
                action={<ShowButton cells={group.cells} of={title} />}
              />
            )
          })}
        </PanelRows>
      </PanelSection>
    </>
  )
}
