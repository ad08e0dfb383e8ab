import type { QueryClient } from '@tanstack/react-query'
import { recordTestAnswerSchema, voidTestAnswerSchema, type CreateTest, type RecordTestAnswer, type VoidTestAnswer } from '#shared/schemas/field-test.ts'
import { orderChanged } from '#web/data/order/cache-effects.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { testChanged } from './cache-effects.ts'

export type VoidTest = { readonly id: string; readonly reason: string }

export function recordTest(siteId: string, input: CreateTest): Promise<RecordTestAnswer> {
  return apiJson(`${siteAddress(siteId)}/tests`, recordTestAnswerSchema, { method: 'POST', body: input })
}

export function voidTest(siteId: string, { id, reason }: VoidTest): Promise<VoidTestAnswer> {
  return apiJson(`${siteAddress(siteId)}/tests/${encodeURIComponent(id)}/void`, voidTestAnswerSchema, { method: 'POST', body: { reason } })
}

function afterTest(client: QueryClient, siteId: string, answer: { readonly revision: number }): void {
  testChanged(client, siteId, answer)
  orderChanged(client, siteId, answer)
}

export const useRecordTest = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordTest, effects: afterTest, words })
export const useVoidTest = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: voidTest, effects: afterTest, words })
