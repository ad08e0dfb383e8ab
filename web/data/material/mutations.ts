import type { QueryClient } from '@tanstack/react-query'
import { materialSchema, type CreateMaterial, type Material, type UpdateMaterial } from '#shared/schemas/lab.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { materialChanged } from './cache-effects.ts'

export function recordMaterial(siteId: string, input: CreateMaterial): Promise<Material> {
  return apiJson(`${siteAddress(siteId)}/materials`, materialSchema, { method: 'POST', body: input })
}

export function updateMaterial(siteId: string, { id, ...change }: UpdateMaterial & { readonly id: string }): Promise<Material> {
  return apiJson(`${siteAddress(siteId)}/materials/${encodeURIComponent(id)}`, materialSchema, { method: 'PATCH', body: change })
}

const afterMaterial = (client: QueryClient, siteId: string): void => materialChanged(client, siteId, { revision: null })

export const useRecordMaterial = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordMaterial, effects: afterMaterial, words })
export const useUpdateMaterial = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: updateMaterial, effects: afterMaterial, words })
