import { queryOptions } from '@tanstack/react-query'
import { onePointListSchema } from '#shared/schemas/one-point.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const onePointQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'one-point-checks'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...onePointQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/one-point-checks`, onePointListSchema, { signal })).checks,
    }),
}
