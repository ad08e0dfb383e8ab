import { queryOptions } from '@tanstack/react-query'
import { boardSchema } from '#shared/schemas/ground.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const boardQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'board'] as const,
  detail: (siteId: string) =>
    queryOptions({
      queryKey: boardQueries.all(siteId),
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/board`, boardSchema, { signal }),
    }),
}
