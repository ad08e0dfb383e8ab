import type { QueryClient } from '@tanstack/react-query'
import { attachmentQueries } from '#web/data/attachment/queries.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** A photo or document was added or withdrawn. */
export function attachmentChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, attachmentQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}
