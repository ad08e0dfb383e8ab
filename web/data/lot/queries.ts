import { queryOptions } from '@tanstack/react-query'
import { lotListSchema, lotSchema, type LotQuery } from '#shared/schemas/lot.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const lotQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'lots'] as const,
  list: (siteId: string, filter: LotQuery = {}) =>
    queryOptions({
      queryKey: [...lotQueries.all(siteId), 'list', filter] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/lots`, lotListSchema, { query: filter, signal })).lots,
    }),
  detail: (siteId: string, id: string) =>
    queryOptions({
      queryKey: [...lotQueries.all(siteId), 'detail', id] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/lots/${encodeURIComponent(id)}`, lotSchema, { signal }),
    }),
}
