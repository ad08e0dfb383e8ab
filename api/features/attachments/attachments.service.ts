import { createHash, randomBytes } from 'node:crypto'
import type { Deps } from '#api/deps.ts'
import { AttachmentEntity } from '#api/entities/attachment.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { conflict } from '#api/errors.ts'
import { authorizeFile, loadSubject } from '#api/features/attachments/attachment-subject.ts'
import { findAttachment, presentAttachment } from '#api/features/attachments/attachments.queries.ts'
import { takenAtOf } from '#api/features/attachments/taken-at.ts'
import { findAnswer } from '#api/features/site-head/request-record.ts'
import type { IdentifiedRequest } from '#api/features/site-head/request-record.ts'
import type { SiteRead, SiteWrite } from '#api/features/site-head/site-write.ts'
import { readSite, writeToSite } from '#api/features/site-head/write-to-site.ts'
import { cleanFileName, nameWithEnding } from '#api/files/clean-file-name.ts'
import { readUpload } from '#api/files/read-upload.ts'
import type { ReadUpload } from '#api/files/read-upload.ts'
import { ATTACHMENT_LIMITS } from '#shared/schemas/attachment.ts'
import type { Attachment, CreateAttachment } from '#shared/schemas/attachment.ts'

type FileDeps = Pick<Deps, 'dataSource' | 'clock' | 'publisher' | 'objects'>

export interface AttachFile {
  readonly siteId: string
  readonly userId: string
  readonly input: CreateAttachment
  readonly file: { readonly bytes: Buffer; readonly name: string }
}

type Stored = Pick<AttachmentEntity, 'objectKey' | 'thumbnailKey' | 'bytes' | 'sha256'>

/**
 * Adds a photo or document to a record. What is sent is read and made anew first, then stored, and only then written down: a
 * row always has its object. A request sent twice is answered as the first time and stored once.
 */
export async function attachFile(deps: FileDeps, { siteId, userId, input, file }: AttachFile): Promise<Attachment> {
  const request = { id: input.id, body: { ...input, name: file.name, sha256: sha256Of(file.bytes) } }
  const access = { siteId, userId, verb: 'file.attach' } as const
  const answered = await readSite(deps, access, (read) => mayAttach(read, input, request))
  if (answered) return answered
  const upload = await readUpload(file.bytes)
  const stored = await store(deps, siteId, upload)
  return writeToSite(deps, { ...access, request }, (write) => recordFile(write, input, { upload, stored, name: file.name }))
}

/** Refuses before anything is decoded or stored; the answer of the same request before, if there was one. */
async function mayAttach(read: SiteRead, input: CreateAttachment, request: IdentifiedRequest): Promise<Attachment | null> {
  authorizeFile(read.role, 'file.attach', await loadSubject(read.manager, read.siteId, input))
  const before = await findAnswer(read.manager, read.siteId, request)
  if (before) return before.answer as Attachment
  await refuseTooMany(read, input)
  return null
}

async function refuseTooMany({ manager, siteId }: SiteRead, { subject, subjectId }: CreateAttachment): Promise<void> {
  const count = await manager.countBy(AttachmentEntity, { siteId, subjectType: subject, subjectId })
  if (count < ATTACHMENT_LIMITS.perSubject) return
  throw conflict(`This record has ${count} files already, which is all it can have. This one was not added.`)
}

async function store({ objects }: FileDeps, siteId: string, upload: ReadUpload): Promise<Stored> {
  const objectKey = `${siteId}/attachments/${randomBytes(16).toString('hex')}`
  const thumbnailKey = upload.kind === 'photo' ? `${objectKey}-thumbnail` : null
  await objects.put(objectKey, upload.body, upload.contentType)
  if (upload.kind === 'photo') await objects.put(`${objectKey}-thumbnail`, upload.thumbnail, upload.contentType)
  return { objectKey, thumbnailKey, bytes: upload.body.length, sha256: sha256Of(upload.body) }
}

async function recordFile(write: SiteWrite, input: CreateAttachment, { upload, stored, name }: { upload: ReadUpload; stored: Stored; name: string }): Promise<Attachment> {
  const { manager, siteId, user, now } = write
  const subject = await loadSubject(manager, siteId, input)
  authorizeFile(write.role, 'file.attach', subject)
  await refuseTooMany(write, input)
  const { timeZone } = await manager.findOneByOrFail(SiteEntity, { id: siteId })
  const { id, caption } = input
  const { kind, contentType } = upload
  const photo = upload.kind === 'photo' ? upload : null
  const fileName = nameWithEnding(cleanFileName(name, kind), kind === 'photo' ? 'jpg' : 'pdf')
  const what = { kind, fileName, contentType, width: photo?.width ?? null, height: photo?.height ?? null, caption, ...takenAtOf(photo?.taken ?? null, now, timeZone) }
  const row = { siteId, id, subjectType: subject.type, subjectId: subject.id, ...what, ...stored, addedBy: user.id, addedAt: now, withdrawnAt: null, withdrawnBy: null, withdrawalReason: null, createdAt: now, updatedAt: now }
  await manager.insert(AttachmentEntity, row)
  write.record('file.attached', { type: subject.type, id: subject.id }, { attachmentId: id, ...what, bytes: stored.bytes, sha256: stored.sha256 }, what.takenAt)
  write.changed('attachment', id)
  return presentAttachment(manager, row)
}

/** Takes a file out of sight with a reason; its row and its bytes stay. */
export async function withdrawFile(write: SiteWrite, id: string, reason: string): Promise<Attachment> {
  const { manager, siteId, user, now } = write
  const row = await findAttachment(write, id)
  const subject = await loadSubject(manager, siteId, { subject: row.subjectType, subjectId: row.subjectId })
  authorizeFile(write.role, 'file.withdraw', subject)
  if (row.withdrawnAt !== null) throw conflict('This file was withdrawn before. Nothing was changed.')
  const withdrawal = { withdrawnAt: now, withdrawnBy: user.id, withdrawalReason: reason, updatedAt: now }
  await manager.update(AttachmentEntity, { siteId, id }, withdrawal)
  write.record('file.withdrawn', { type: subject.type, id: subject.id }, { attachmentId: id, fileName: row.fileName, sha256: row.sha256, reason })
  write.changed('attachment', id)
  return presentAttachment(manager, { ...row, ...withdrawal })
}

function sha256Of(bytes: Buffer): string {
  return createHash('sha256').update(bytes).digest('hex')
}
