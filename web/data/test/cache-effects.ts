import type { QueryClient } from '@tanstack/react-query'
import { groundChanged } from '#web/data/board/cache-effects.ts'
import { curveQueries } from '#web/data/curve/queries.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'
import { stakeQueries } from '#web/data/stake/queries.ts'
import { testQueries } from '#web/data/test/queries.ts'

/** A test was recorded, voided or put out of force. */
export function testChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, testQueries.all(siteId), change)
  refresh(client, curveQueries.all(siteId), change)
  refresh(client, stakeQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
  groundChanged(client, siteId, change)
}
