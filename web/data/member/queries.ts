import { queryOptions } from '@tanstack/react-query'
import { memberListSchema } from '#shared/schemas/member.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const memberQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'members'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...memberQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/members`, memberListSchema, { signal })).members,
    }),
}
