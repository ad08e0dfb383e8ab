import { queryOptions } from '@tanstack/react-query'
import { curveListSchema, curveSchema } from '#shared/schemas/lab.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const curveQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'curves'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...curveQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/curves`, curveListSchema, { signal })).curves,
    }),
  detail: (siteId: string, id: string) =>
    queryOptions({
      queryKey: [...curveQueries.all(siteId), 'detail', id] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/curves/${encodeURIComponent(id)}`, curveSchema, { signal }),
    }),
}
