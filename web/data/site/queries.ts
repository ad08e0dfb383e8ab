import { queryOptions, type QueryKey } from '@tanstack/react-query'
import { siteCellsSchema, siteListSchema, siteSchema, type SiteCells } from '#shared/schemas/site.ts'
import { apiJson } from '#web/lib/api-client.ts'

/** Where a site's resources are asked for. */
export function siteAddress(siteId: string): string {
  return `/api/sites/${encodeURIComponent(siteId)}`
}

const hashOf = (cells: unknown): string | undefined => (cells as SiteCells | undefined)?.hash

/** The cells of a site are large and known by their hash, so that they are not read again without need. */
export function isSiteCells(key: QueryKey): boolean {
  return key[0] === 'site' && key[2] === 'cells'
}

export const siteQueries = {
  lists: () => ['site-list'] as const,
  /** Everything that was read of one site: the keys of its resources begin with it. */
  one: (siteId: string) => ['site', siteId] as const,
  list: () =>
    queryOptions({
      queryKey: siteQueries.lists(),
      queryFn: async ({ signal }) => (await apiJson('/api/sites', siteListSchema, { signal })).sites,
    }),
  detail: (siteId: string) =>
    queryOptions({
      queryKey: [...siteQueries.one(siteId), 'detail'] as const,
      queryFn: ({ signal }) => apiJson(siteAddress(siteId), siteSchema, { signal }),
    }),
  /** The cells' static geometry: it changes only when the plan does (Site.cellsHash). */
  cells: (siteId: string) =>
    queryOptions({
      queryKey: [...siteQueries.one(siteId), 'cells'] as const,
      queryFn: ({ signal }) => apiJson(`${siteAddress(siteId)}/cells`, siteCellsSchema, { signal }),
      staleTime: Infinity,
      structuralSharing: (known, read) => (hashOf(known) === hashOf(read) ? known : read),
    }),
}
