import { z } from 'zod'
import { idSchema, instantSchema, lineSchema, personSchema, reasonSchema } from '#shared/schemas/common.ts'

/** What a photo or document can belong to. */
export const ATTACHMENT_SUBJECTS = ['test', 'curve'] as const
export const attachmentSubjectSchema = z.enum(ATTACHMENT_SUBJECTS)
export type AttachmentSubject = z.infer<typeof attachmentSubjectSchema>

const MB = 1_000_000
/** Bytes that are taken in, as they arrive. */
export const ATTACHMENT_LIMITS = { photoBytes: 15 * MB, documentBytes: 25 * MB, perSubject: 60 } as const
/** The sides a stored photo and its thumbnail have at most, pixels. */
export const PHOTO_SIDES = { full: 2560, thumbnail: 320 } as const

/** GET …/attachments */
export const attachmentQuerySchema = z.object({ subject: attachmentSubjectSchema, subjectId: idSchema })
export type AttachmentQuery = z.infer<typeof attachmentQuerySchema>

/** POST …/attachments: the fields beside the file of a multipart form. */
export const createAttachmentSchema = attachmentQuerySchema.extend({ id: idSchema, caption: lineSchema.default('') })
export type CreateAttachment = z.infer<typeof createAttachmentSchema>

export const attachmentSchema = z.object({
  id: z.string(),
  subject: attachmentSubjectSchema,
  subjectId: z.string(),
  kind: z.enum(['photo', 'document']),
  /** as it was given, cleaned */
  fileName: z.string(),
  contentType: z.string(),
  /** of the stored file, as its hash is */
  bytes: z.number().int(),
  sha256: z.string(),
  /** pixels; null for a document */
  width: z.number().int().nullable(),
  height: z.number().int().nullable(),
  caption: z.string(),
  addedBy: personSchema,
  addedAt: instantSchema,
  takenAt: instantSchema,
  /** whether the camera said when it was taken, or it stands for the time it was added */
  takenFrom: z.enum(['camera', 'upload']),
  withdrawn: z.object({ at: instantSchema, by: z.string(), reason: z.string() }).nullable(),
})
export type Attachment = z.infer<typeof attachmentSchema>
export const attachmentListSchema = z.object({ attachments: z.array(attachmentSchema) })

/** POST …/attachments/:id/withdraw */
export const withdrawAttachmentSchema = z.object({ reason: reasonSchema })
