import type { QueryClient } from '@tanstack/react-query'
import { eventQueries } from '#web/data/event/queries.ts'
import { lotQueries } from '#web/data/lot/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'
import { stakeQueries } from '#web/data/stake/queries.ts'

/** Stakes were drawn, used or retired. */
export function stakeChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, stakeQueries.all(siteId), change)
  refresh(client, lotQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}
