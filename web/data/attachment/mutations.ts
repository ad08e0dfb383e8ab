import { attachmentSchema, type Attachment } from '#shared/schemas/attachment.ts'
import { attachmentsAddress } from '#web/data/attachment/queries.ts'
import { useSiteMutation, type MutationWords } from '#web/data/site-mutation.ts'
import { apiJson } from '#web/lib/api-client.ts'
import { attachmentChanged } from './cache-effects.ts'

export type WithdrawFile = { readonly id: string; readonly reason: string }

export function withdrawFile(siteId: string, { id, reason }: WithdrawFile): Promise<Attachment> {
  return apiJson(`${attachmentsAddress(siteId)}/${encodeURIComponent(id)}/withdraw`, attachmentSchema, { method: 'POST', body: { reason } })
}

export const useWithdrawFile = (siteId: string, words?: MutationWords) =>
  useSiteMutation({ siteId, send: withdrawFile, effects: (client, id) => attachmentChanged(client, id, { revision: null }), words })
