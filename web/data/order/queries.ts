import { queryOptions } from '@tanstack/react-query'
import { orderListSchema, orderSchema } from '#shared/schemas/rework.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const orderQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'orders'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...orderQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/rework`, orderListSchema, { signal })).orders,
    }),
  detail: (siteId: string, id: string) =>
    queryOptions({
      queryKey: [...orderQueries.all(siteId), 'detail', id] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/rework/${encodeURIComponent(id)}`, orderSchema, { signal }),
    }),
}
