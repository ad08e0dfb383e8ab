import { queryOptions } from '@tanstack/react-query'
import { stakeListSchema } from '#shared/schemas/lot.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const stakeQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'stakes'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...stakeQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/stakes`, stakeListSchema, { signal })).stakes,
    }),
}
