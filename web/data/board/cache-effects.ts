import type { QueryClient } from '@tanstack/react-query'
import { boardQueries } from '#web/data/board/queries.ts'
import { columnQueries } from '#web/data/column/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'
import { releaseQueries } from '#web/data/release/queries.ts'

/** The ground, or what is said of it, changed: the board, the columns of open cells and what stands against a release. */
export function groundChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, boardQueries.all(siteId), change)
  refresh(client, columnQueries.all(siteId), change)
  refresh(client, releaseQueries.checks(siteId), change)
}
