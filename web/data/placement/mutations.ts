import { groundWriteSchema, type CreatePlacement, type GroundWrite } from '#shared/schemas/placement.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { placementChanged } from './cache-effects.ts'

export type VoidPlacement = { readonly id: string; readonly reason: string }

export function recordPlacement(siteId: string, input: CreatePlacement): Promise<GroundWrite> {
  return apiJson(`${siteAddress(siteId)}/placements`, groundWriteSchema, { method: 'POST', body: input })
}

export function voidPlacement(siteId: string, { id, reason }: VoidPlacement): Promise<GroundWrite> {
  return apiJson(`${siteAddress(siteId)}/placements/${encodeURIComponent(id)}/void`, groundWriteSchema, { method: 'POST', body: { reason } })
}

export const useRecordPlacement = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordPlacement, effects: placementChanged, words })
export const useVoidPlacement = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: voidPlacement, effects: placementChanged, words })
