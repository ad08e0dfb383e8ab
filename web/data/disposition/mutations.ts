import { groundWriteSchema, type CreateDisposition, type GroundWrite } from '#shared/schemas/placement.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { dispositionChanged } from './cache-effects.ts'

export function acceptAsIs(siteId: string, input: CreateDisposition): Promise<GroundWrite> {
  return apiJson(`${siteAddress(siteId)}/dispositions`, groundWriteSchema, { method: 'POST', body: input })
}

export const useAcceptAsIs = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: acceptAsIs, effects: dispositionChanged, words })
