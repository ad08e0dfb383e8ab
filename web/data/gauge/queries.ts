import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import { gaugeDetailSchema, gaugeListSchema } from '#shared/schemas/gauge.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const gaugeQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'gauges'] as const,
  /** The register as it stands at a moment; null for now. */
  list: (siteId: string, at: string | null = null) =>
    queryOptions({
      queryKey: [...gaugeQueries.all(siteId), 'list', at] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/gauges`, gaugeListSchema, { query: at === null ? {} : { at }, signal })).gauges,
      placeholderData: keepPreviousData,
    }),
  detail: (siteId: string, id: string) =>
    queryOptions({
      queryKey: [...gaugeQueries.all(siteId), 'detail', id] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/gauges/${encodeURIComponent(id)}`, gaugeDetailSchema, { signal }),
    }),
}
