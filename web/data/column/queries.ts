import { queryOptions } from '@tanstack/react-query'
import { columnSchema } from '#shared/schemas/ground.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const columnQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'columns'] as const,
  detail: (siteId: string, cell: number) =>
    queryOptions({
      queryKey: [...columnQueries.all(siteId), cell] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/columns/${cell}`, columnSchema, { signal }),
    }),
}
