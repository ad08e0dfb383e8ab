import type { QueryClient } from '@tanstack/react-query'
import { curveSchema, type CreateCurve, type Curve, type CurveUse } from '#shared/schemas/lab.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { curveChanged } from './cache-effects.ts'
import { curveQueries } from './queries.ts'

export type WithdrawCurve = { readonly id: string; readonly reason: string }
export type ApproveCurve = { readonly id: string; readonly use: CurveUse }

export function recordCurve(siteId: string, input: CreateCurve): Promise<Curve> {
  return apiJson(`${siteAddress(siteId)}/curves`, curveSchema, { method: 'POST', body: input })
}

export function correctCurve(siteId: string, { id, ...sheet }: CreateCurve): Promise<Curve> {
  return apiJson(`${siteAddress(siteId)}/curves/${encodeURIComponent(id)}`, curveSchema, { method: 'PUT', body: sheet })
}

export function withdrawCurve(siteId: string, { id, reason }: WithdrawCurve): Promise<Curve> {
  return apiJson(`${siteAddress(siteId)}/curves/${encodeURIComponent(id)}/withdraw`, curveSchema, { method: 'POST', body: { reason } })
}

export function approveCurve(siteId: string, { id, use }: ApproveCurve): Promise<Curve> {
  return apiJson(`${siteAddress(siteId)}/curves/${encodeURIComponent(id)}/approve`, curveSchema, { method: 'POST', body: { use } })
}

function afterCurve(client: QueryClient, siteId: string, curve: Curve): void {
  client.setQueryData(curveQueries.detail(siteId, curve.id).queryKey, curve)
  curveChanged(client, siteId, { revision: null })
}

export const useRecordCurve = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: recordCurve, effects: afterCurve, words })
export const useCorrectCurve = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: correctCurve, effects: afterCurve, words })
export const useWithdrawCurve = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: withdrawCurve, effects: afterCurve, words })
export const useApproveCurve = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: approveCurve, effects: afterCurve, words })
