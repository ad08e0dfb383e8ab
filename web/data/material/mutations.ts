import { materialSchema, type CreateMaterial, type Material } from '#shared/schemas/lab.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { materialChanged } from './cache-effects.ts'

export function recordMaterial(siteId: string, input: CreateMaterial): Promise<Material> {
  return apiJson(`${siteAddress(siteId)}/materials`, materialSchema, { method: 'POST', body: input })
}

export const useRecordMaterial = (siteId: string, words?: MutationWords) =>
  useSiteMutation({ siteId, send: recordMaterial, effects: (client, id) => materialChanged(client, id, { revision: null }), words })
