import type { QueryClient } from '@tanstack/react-query'
import { calibrationQueries } from '#web/data/calibration/queries.ts'
import { eventQueries } from '#web/data/event/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'

/** A calibration was recorded or voided. */
export function calibrationChanged(client: QueryClient, siteId: string, change: Change): void {
  refresh(client, calibrationQueries.all(siteId), change)
  refresh(client, eventQueries.all(siteId), change)
}
