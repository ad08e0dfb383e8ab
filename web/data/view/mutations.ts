import type { QueryClient } from '@tanstack/react-query'
import { savedViewListSchema, savedViewSchema, type ChooseDefaultView, type CreateView, type EditView } from '#shared/schemas/saved-view.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { siteAddress } from '#web/data/site/queries.ts'
import { apiJson, apiVoid } from '#web/lib/api-client.ts'
import { viewChanged } from './cache-effects.ts'

const address = (siteId: string, id: string): string => `${siteAddress(siteId)}/views/${encodeURIComponent(id)}`
const createView = (siteId: string, input: CreateView) => apiJson(`${siteAddress(siteId)}/views`, savedViewSchema, { method: 'POST', body: input })
const editView = (siteId: string, { id, ...body }: EditView & { readonly id: string }) => apiJson(address(siteId, id), savedViewSchema, { method: 'PATCH', body })
const removeView = (siteId: string, id: string) => apiVoid(address(siteId, id), { method: 'DELETE' })
const chooseDefaultView = (siteId: string, body: ChooseDefaultView) => apiJson(address(siteId, 'default'), savedViewListSchema, { method: 'PUT', body })
const after = (client: QueryClient, siteId: string): void => viewChanged(client, siteId, { revision: null })

export const useCreateView = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: createView, effects: after, words })
export const useEditView = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: editView, effects: after, words })
export const useRemoveView = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: removeView, effects: after, words })
export const useChooseDefaultView = (siteId: string, words?: MutationWords) => useSiteMutation({ siteId, send: chooseDefaultView, effects: after, words })
