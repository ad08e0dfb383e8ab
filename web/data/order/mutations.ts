import { groundWriteSchema, type GroundWrite } from '#shared/schemas/placement.ts'
import { stepAnswerSchema, type CreateOrder, type EditOrder, type OrderStepInput, type StepAnswer } from '#shared/schemas/rework.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { orderChanged } from './cache-effects.ts'

export type OrderStep = { readonly orderId: string; readonly step: OrderStepInput }
export type OrderEdit = EditOrder & { readonly orderId: string }
export type WithdrawOrder = { readonly orderId: string; readonly reason: string }

const addressOf = (siteId: string, orderId: string): string => `${siteAddress(siteId)}/rework/${encodeURIComponent(orderId)}`

export function createOrder(siteId: string, input: CreateOrder): Promise<GroundWrite> {
  return apiJson(`${siteAddress(siteId)}/rework`, groundWriteSchema, { method: 'POST', body: input })
}

/** Assigns, starts, reports done or asks for help. */
export function stepOrder(siteId: string, { orderId, step }: OrderStep): Promise<StepAnswer> {
  return apiJson(`${addressOf(siteId, orderId)}/steps`, stepAnswerSchema, { method: 'POST', body: step })
}

export function editOrder(siteId: string, { orderId, cells, reason }: OrderEdit): Promise<GroundWrite> {
  return apiJson(addressOf(siteId, orderId), groundWriteSchema, { method: 'PATCH', body: { cells, reason } })
}

export function withdrawOrder(siteId: string, { orderId, reason }: WithdrawOrder): Promise<GroundWrite> {
  return apiJson(`${addressOf(siteId, orderId)}/withdraw`, groundWriteSchema, { method: 'POST', body: { reason } })
}

export const useCreateOrder = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: createOrder, effects: orderChanged, words })
export const useStepOrder = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: stepOrder, effects: orderChanged, words })
export const useEditOrder = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: editOrder, effects: orderChanged, words })
export const useWithdrawOrder = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: withdrawOrder, effects: orderChanged, words })
