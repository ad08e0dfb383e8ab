import { queryOptions } from '@tanstack/react-query'
import { calibrationListSchema } from '#shared/schemas/calibration.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const calibrationQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'calibrations'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...calibrationQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/calibrations`, calibrationListSchema, { signal })).calibrations,
    }),
}
