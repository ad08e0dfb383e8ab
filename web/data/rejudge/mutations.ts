import type { QueryClient } from '@tanstack/react-query'
import { curveSchema, type Curve } from '#shared/schemas/lab.ts'
import { rejudgeAnswerSchema, type Rejudge, type RejudgeAnswer, type SupersedeCurve } from '#shared/schemas/rejudge.ts'
import { curveChanged } from '#web/data/curve/cache-effects.ts'
import { curveQueries } from '#web/data/curve/queries.ts'
import { orderChanged } from '#web/data/order/cache-effects.ts'
import { releaseChanged } from '#web/data/release/cache-effects.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { testChanged } from '#web/data/test/cache-effects.ts'
import { apiJson } from '#web/lib/api-client.ts'

type OfCurve<Input> = Input & { readonly curveId: string }

const curveAddress = (siteId: string, curveId: string): string => `${siteAddress(siteId)}/curves/${encodeURIComponent(curveId)}`

export function supersedeCurve(siteId: string, { curveId, ...body }: OfCurve<SupersedeCurve>): Promise<Curve> {
  return apiJson(`${curveAddress(siteId, curveId)}/supersede`, curveSchema, { method: 'POST', body })
}

export function rejudgeTests(siteId: string, { curveId, ...body }: OfCurve<Rejudge>): Promise<RejudgeAnswer> {
  return apiJson(`${curveAddress(siteId, curveId)}/rejudge`, rejudgeAnswerSchema, { method: 'POST', body })
}

function afterSuperseding(client: QueryClient, siteId: string, curve: Curve): void {
  client.setQueryData(curveQueries.detail(siteId, curve.id).queryKey, curve)
  curveChanged(client, siteId, { revision: null })
}

function afterRejudging(client: QueryClient, siteId: string, answer: RejudgeAnswer): void {
  testChanged(client, siteId, answer)
  orderChanged(client, siteId, answer)
  releaseChanged(client, siteId, answer)
}

export const useSupersedeCurve = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: supersedeCurve, effects: afterSuperseding, words })
export const useRejudgeTests = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: rejudgeTests, effects: afterRejudging, words })
