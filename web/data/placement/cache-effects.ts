import type { QueryClient } from '@tanstack/react-query'
import { groundChanged } from '#web/data/board/cache-effects.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { lotQueries } from '#web/data/lot/queries.ts'
import { placementQueries } from '#web/data/placement/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** Fill was placed or a placement voided. */
export function placementChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, placementQueries.all(siteId), change)
  refresh(client, lotQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
  groundChanged(client, siteId, change)
}
