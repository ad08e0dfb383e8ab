import type { QueryClient } from '@tanstack/react-query'
import { boardQueries } from '#web/data/board/queries.ts'
import { refresh, type Change } from '#web/data/refresh.ts'
import { siteQueries } from '#web/data/site/queries.ts'

/** The site's name, units, zones or specifications changed. */
export function siteChanged(client: QueryClient, siteId: string, change: Change): void {
  void client.invalidateQueries({ queryKey: siteQueries.lists() })
  refresh(client, siteQueries.detail(siteId).queryKey, change)
  refresh(client, boardQueries.all(siteId), change)
}

/** The person's own role on the site changed. */
export function membershipChanged(client: QueryClient, siteId: string): void {
  void client.invalidateQueries({ queryKey: siteQueries.lists() })
  void client.invalidateQueries({ queryKey: siteQueries.one(siteId) })
}

/** The person is no longer a member: nothing of the site stays on this screen. */
export function membershipLost(client: QueryClient, siteId: string): void {
  client.removeQueries({ queryKey: siteQueries.one(siteId) })
  void client.invalidateQueries({ queryKey: siteQueries.lists() })
}
