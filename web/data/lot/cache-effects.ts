import type { QueryClient } from '@tanstack/react-query'
import { lotQueries } from '#web/data/lot/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** A lot's figures changed. */
export function lotChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, lotQueries.all(siteId), change)
}
