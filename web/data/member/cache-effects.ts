import type { QueryClient } from '@tanstack/react-query'
import { eventQueries } from '#web/data/event/queries.ts'
import { memberQueries } from '#web/data/member/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** Somebody was given a role on the site, or lost it. */
export function memberChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, memberQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}
