import { Link } from 'react-router-dom'
import type { Order } from '#shared/schemas/rework.ts'
import { paths } from '#web/app/paths.ts'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { groundOf, isOpen, remedyWords, retestWords, standingWords } from '#web/features/rework/order/order-words.ts'
import { cellRangeWords } from '#web/lib/cell-range.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** Below a tablet a row stands as a small sheet: what, where, and how far. */
const STACKED = 'max-md:block max-md:border-0 max-md:px-4 max-md:py-0 max-md:text-left'

function OrderRow({ order, now }: { order: Order; now: number }) {
  const { site, lookup, zone, units } = useSite()
  const label = (text: string) => <span className="mr-1 font-sans text-small text-ink-2 md:hidden">{text}</span>
  return (
    <Row className="max-md:block max-md:border-b max-md:border-rule max-md:py-3">
      <RowHead className={`${STACKED} md:pl-[26px]`}>
        <span className="flex items-center gap-2">
          {isOpen(order) && <StateSwatch state={groundOf(order)} />}
          <Link to={paths.reworkOrder(site.id, order.id)} className="link-ink inline-flex items-center pointer-coarse:min-h-11">
            {order.number}
          </Link>
        </span>
      </RowHead>
      <Cell className={`${STACKED} font-semibold`}>{order.headline}</Cell>
      <Cell className={STACKED}>
        {zone(order.zoneId)?.name}, lift {order.lift}, {cellRangeWords(lookup, order.cells)}
      </Cell>
      <Cell numeric className={STACKED}>
        {label('Volume')}
        {units.volume(order.volumeCm3)}
      </Cell>
      <Cell className={STACKED}>{remedyWords(order, units)}</Cell>
      <Cell className={STACKED}>{standingWords(order, units, now)}</Cell>
      <Cell className={STACKED}>{order.assignedTo ?? <span className="text-ink-2">nobody named</span>}</Cell>
      <Cell numeric className={`${STACKED} md:pr-[26px]`}>
        {label('Retests passed')}
        {retestWords(order)}
      </Cell>
    </Row>
  )
}

export function OrderTable({ caption, orders }: { caption: string; orders: readonly Order[] }) {
  const { site } = useSite()
  const now = useSiteClock(site.id)()
  return (
    <Table caption={caption} className="border-t border-rule-2">
      <thead className="max-md:sr-only">
        <tr>
          <HeadCell className="pl-[26px]">Order</HeadCell>
          <HeadCell>What is wrong</HeadCell>
          <HeadCell>Where</HeadCell>
          <HeadCell numeric>Volume</HeadCell>
          <HeadCell>What to do</HeadCell>
          <HeadCell>Stands</HeadCell>
          <HeadCell>Assigned to</HeadCell>
          <HeadCell numeric className="pr-[26px]">
            Retests passed
          </HeadCell>
        </tr>
      </thead>
      <tbody className="max-md:block">
        {orders.map((order) => (
          <OrderRow key={order.id} order={order} now={now} />
        ))}
      </tbody>
    </Table>
  )
}
