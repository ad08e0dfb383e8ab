import { queryOptions } from '@tanstack/react-query'
import { materialListSchema } from '#shared/schemas/lab.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const materialQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'materials'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...materialQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/materials`, materialListSchema, { signal })).materials,
    }),
}
