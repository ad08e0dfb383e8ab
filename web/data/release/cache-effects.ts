import type { QueryClient } from '@tanstack/react-query'
import { groundChanged } from '#web/data/board/cache-effects.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { lotQueries } from '#web/data/lot/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'
import { releaseQueries } from '#web/data/release/queries.ts'

/** A release was asked for, issued, accepted, declined or revoked. */
export function releaseChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, releaseQueries.all(siteId), change)
  refresh(client, lotQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
  groundChanged(client, siteId, change)
}
