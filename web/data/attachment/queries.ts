import { queryOptions } from '@tanstack/react-query'
import { attachmentListSchema, type Attachment, type AttachmentQuery } from '#shared/schemas/attachment.ts'
import { siteAddress, siteQueries } from '#web/data/site/queries.ts'
import { apiJson } from '#web/lib/api-client.ts'

export const attachmentQueries = {
  all: (siteId: string) => [...siteQueries.one(siteId), 'attachments'] as const,
  list: (siteId: string, { subject, subjectId }: AttachmentQuery) =>
    queryOptions({
      queryKey: [...attachmentQueries.all(siteId), subject, subjectId] as const,
      queryFn: async ({ signal }) => (await apiJson(attachmentsAddress(siteId), attachmentListSchema, { query: { subject, subjectId }, signal })).attachments,
    }),
}

export function attachmentsAddress(siteId: string): string {
  return `${siteAddress(siteId)}/attachments`
}

const addressOf = (siteId: string, { id }: Pick<Attachment, 'id'>): string => `${attachmentsAddress(siteId)}/${encodeURIComponent(id)}`

/** Where the file itself is, for an img or a link. */
export const fileAddress = (siteId: string, attachment: Pick<Attachment, 'id'>): string => `${addressOf(siteId, attachment)}/file`
/** A photo at 320 pixels. */
export const thumbnailAddress = (siteId: string, attachment: Pick<Attachment, 'id'>): string => `${addressOf(siteId, attachment)}/thumbnail`
