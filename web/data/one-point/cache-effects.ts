import type { QueryClient } from '@tanstack/react-query'
import { eventQueries } from '#web/data/event/queries.ts'
import { onePointQueries } from '#web/data/one-point/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** A one-point check was recorded or voided. */
export function onePointChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, onePointQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}
