import type { QueryClient } from '@tanstack/react-query'
import { curveQueries } from '#web/data/curve/queries.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** A compaction curve was recorded or approved. */
export function curveChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, curveQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}
