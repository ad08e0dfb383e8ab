import { queryOptions } from '@tanstack/react-query'
import { savedViewListSchema } from '#shared/schemas/saved-view.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const viewQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'views'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...viewQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/views`, savedViewListSchema, { signal })).views,
    }),
}
