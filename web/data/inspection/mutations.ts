import { groundWriteSchema, type CreateInspection, type GroundWrite } from '#shared/schemas/placement.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { inspectionChanged } from './cache-effects.ts'

export function recordInspection(siteId: string, input: CreateInspection): Promise<GroundWrite> {
  return apiJson(`${siteAddress(siteId)}/inspections`, groundWriteSchema, { method: 'POST', body: input })
}

export const useRecordInspection = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordInspection, effects: inspectionChanged, words })
