import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import { frequencySeriesSchema, lotListSchema, lotSchema, type LotQuery, type SeriesQuery } from '#shared/schemas/lot.ts'
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
  /** Volume placed and spoken for by working day, of all zones or one. */
  series: (siteId: string, filter: SeriesQuery = {}) =>
    queryOptions({
      queryKey: [...lotQueries.all(siteId), 'series', filter] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/frequency/series`, frequencySeriesSchema, { query: filter, signal })).days,
      placeholderData: keepPreviousData,
    }),
}
