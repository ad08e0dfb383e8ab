import type { QueryClient } from '@tanstack/react-query'
import { onePointCheckSchema, type CreateOnePoint, type OnePointCheck } from '#shared/schemas/one-point.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { testChanged } from '#web/data/test/cache-effects.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { onePointChanged } from './cache-effects.ts'

export type VoidOnePoint = { readonly id: string; readonly reason: string }

export function recordOnePoint(siteId: string, input: CreateOnePoint): Promise<OnePointCheck> {
  return apiJson(`${siteAddress(siteId)}/one-point-checks`, onePointCheckSchema, { method: 'POST', body: input })
}

export function voidOnePoint(siteId: string, { id, reason }: VoidOnePoint): Promise<OnePointCheck> {
  return apiJson(`${siteAddress(siteId)}/one-point-checks/${encodeURIComponent(id)}/void`, onePointCheckSchema, { method: 'POST', body: { reason } })
}

function afterOnePoint(client: QueryClient, siteId: string, check: OnePointCheck): void {
  onePointChanged(client, siteId, { revision: null })
  if (check.testId !== null) testChanged(client, siteId, { revision: null })
}

export const useRecordOnePoint = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordOnePoint, effects: afterOnePoint, words })
export const useVoidOnePoint = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: voidOnePoint, effects: afterOnePoint, words })
