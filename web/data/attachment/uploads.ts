import { useQueryClient } from '@tanstack/react-query'
import { useEffect, useMemo, useSyncExternalStore } from 'react'
import { attachmentSchema, type Attachment, type AttachmentQuery } from '#shared/schemas/attachment.ts'
import { attachmentAdded } from '#web/data/attachment/cache-effects.ts'
import { attachmentsAddress } from '#web/data/attachment/queries.ts'
import { apiUpload } from '#web/lib/upload.ts'
import { UploadQueue, type Upload } from '#web/lib/upload-queue.ts'

function sendFile({ siteId, id, subject, subjectId, caption, file }: Upload, onProgress: (share: number) => void, signal: AbortSignal): Promise<Attachment> {
  const form = new FormData()
  for (const [name, value] of Object.entries({ id, subject, subjectId, caption })) form.append(name, value)
  form.append('file', file, file.name)
  return apiUpload(attachmentsAddress(siteId), attachmentSchema, form, { onProgress, signal })
}

/** The files this window has on their way, for whatever record. */
export const uploads = new UploadQueue(sendFile)

/** The files on their way to one record. While any are, leaving the window is asked about. */
export function useUploads({ subject, subjectId }: AttachmentQuery): readonly Upload[] {
  const client = useQueryClient()
  const all = useSyncExternalStore(uploads.subscribe, uploads.list)
  useEffect(() => uploads.onSent((siteId, attachment) => attachmentAdded(client, siteId, attachment)), [client])
  const pending = all.length > 0
  useEffect(() => {
    if (!pending) return
    const ask = (event: BeforeUnloadEvent): void => event.preventDefault()
    window.addEventListener('beforeunload', ask)
    return () => window.removeEventListener('beforeunload', ask)
  }, [pending])
  return useMemo(() => all.filter((upload) => upload.subject === subject && upload.subjectId === subjectId), [all, subject, subjectId])
}
