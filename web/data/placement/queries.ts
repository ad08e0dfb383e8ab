import { queryOptions } from '@tanstack/react-query'
import { placementListSchema } from '#shared/schemas/placement.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const placementQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'placements'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...placementQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/placements`, placementListSchema, { signal })).placements,
    }),
}
