import { infiniteQueryOptions } from '@tanstack/react-query'
import { eventListSchema, type EventQuery } from '#shared/schemas/event.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export type EventFilter = Partial<Omit<EventQuery, 'before'>>

export const eventQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'events'] as const,
  /** Newest first, a page at a time (useInfiniteQuery). */
  list: (siteId: string, filter: EventFilter = {}) =>
    infiniteQueryOptions({
      queryKey: [...eventQueries.all(siteId), filter] as const,
      queryFn: ({ pageParam, signal }) => apiJson(`${siteAddress(siteId)}/events`, eventListSchema, { query: { ...filter, before: pageParam }, signal }),
      initialPageParam: null as number | null,
      getNextPageParam: (page) => page.next,
    }),
}
