import { useSite } from '#web/lib/site-context.tsx'
import { useMe } from '#web/data/session/use-me.ts'
import { CabSheet } from './cab/cab-sheet.tsx'
import { OrderRegister } from './register/order-register.tsx'

/** Rework: the register for the office, the operator's own sheet in the cab. */
export function ReworkPage() {
  const { role } = useSite()
  const me = useMe()
  if (role !== 'operator') return <OrderRegister />
  return me === null ? null : <CabSheet user={me} />
}
