import type { QueryClient } from '@tanstack/react-query'
import { refresh, type Change } from '#web/data/refresh.ts'
import { viewQueries } from '#web/data/view/queries.ts'

/** A view of the register was saved, changed or removed. */
export function viewChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, viewQueries.all(siteId), change)
}
