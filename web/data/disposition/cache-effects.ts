import type { QueryClient } from '@tanstack/react-query'
import { groundChanged } from '#web/data/board/cache-effects.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { orderQueries } from '#web/data/order/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** Ground was accepted as it is. */
export function dispositionChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, orderQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
  groundChanged(client, siteId, change)
}
