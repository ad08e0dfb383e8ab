import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import type { z } from 'zod'
import { releaseCheckSchema, releaseListSchema, type releaseCheckInputSchema } from '#shared/schemas/release.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export type ReleaseCheckInput = z.infer<typeof releaseCheckInputSchema>

export const releaseQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'releases'] as const,
  list: (siteId: string) =>
    queryOptions({
      queryKey: [...releaseQueries.all(siteId), 'list'] as const,
      queryFn: async ({ signal }) => (await apiJson(`${siteAddress(siteId)}/releases`, releaseListSchema, { signal })).releases,
    }),
  checks: (siteId: string) => [...releaseQueries.all(siteId), 'check'] as const,
  /** What stands against releasing these cells; null while none are chosen. */
  check: (siteId: string, input: ReleaseCheckInput | null) =>
    queryOptions({
      queryKey: [...releaseQueries.checks(siteId), input] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/releases/check`, releaseCheckSchema, { method: 'POST', body: input, signal }),
      enabled: input !== null,
      placeholderData: keepPreviousData,
      gcTime: 60_000,
    }),
}
