import type { QueryClient } from '@tanstack/react-query'
import { eventQueries } from '#web/data/event/queries.ts'
import { gaugeQueries } from '#web/data/gauge/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'
import { releaseQueries } from '#web/data/release/queries.ts'
import { testQueries } from '#web/data/test/queries.ts'

/** A gauge, one of its counts, calibrations or corrections changed: tests read with it and releases that rest on them too. */
export function gaugeChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, gaugeQueries.all(siteId), change)
  refresh(client, testQueries.all(siteId), change)
  refresh(client, releaseQueries.checks(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}
