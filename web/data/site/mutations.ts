import { useMutation, useQueryClient } from '@tanstack/react-query'
import { siteSchema, specificationSchema, type CreateSite, type CreateSpecification, type Site, type Specification, type UpdateSite } from '#shared/schemas/site.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { siteChanged } from './cache-effects.ts'
import { siteAddress, siteQueries } from './queries.ts'

export type NewSpecification = { readonly zoneId: string; readonly input: CreateSpecification }

export const createSite = (input: CreateSite): Promise<Site> => apiJson('/api/sites', siteSchema, { method: 'POST', body: input })

export const updateSite = (siteId: string, input: UpdateSite): Promise<Site> => apiJson(siteAddress(siteId), siteSchema, { method: 'PATCH', body: input })

/** A new version of a zone's specification. */
export function createSpecification(siteId: string, { zoneId, input }: NewSpecification): Promise<Specification> {
  return apiJson(`${siteAddress(siteId)}/zones/${encodeURIComponent(zoneId)}/specifications`, specificationSchema, { method: 'POST', body: input })
}

export function useCreateSite() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: createSite,
    onSuccess: (site) => {
      client.setQueryData(siteQueries.detail(site.id).queryKey, site)
      siteChanged(client, site.id, site)
    },
  })
}

export const useUpdateSite = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: updateSite, effects: siteChanged, words })
export const useCreateSpecification = (siteId: string, words?: MutationWords) =>
  useSiteMutation({ siteId, send: createSpecification, effects: (client, id) => siteChanged(client, id, { revision: null }), words })
