import { useParams } from 'react-router-dom'
import { useMe } from '#web/data/session/use-me.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { CabSheet } from './cab/cab-sheet.tsx'
import { OrderSheet } from './order/order-sheet.tsx'

/** One order: its sheet for the office, opened on the operator's own sheet in the cab. */
export function ReworkOrderPage() {
  const { orderId = '' } = useParams()
  const { role } = useSite()
  const me = useMe()
  if (role !== 'operator') return <OrderSheet orderId={orderId} />
  return me === null ? null : <CabSheet user={me} openId={orderId} />
}
