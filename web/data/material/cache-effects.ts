import type { QueryClient } from '@tanstack/react-query'
import { curveQueries } from '#web/data/curve/queries.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { materialQueries } from '#web/data/material/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** A borrow material was recorded. */
export function materialChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, materialQueries.all(siteId), change)
  refresh(client, curveQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}
