import { Entity, Index } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { HashColumn, IdColumn, InstantColumn, IntColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'
import type { Attachment } from '#shared/schemas/attachment.ts'

/** A photo or document of one record; its bytes are in the object store, which never loses any to a withdrawal. */
@Index('ix_attachment_subject', ['siteId', 'subjectType', 'subjectId'])
@Entity('attachment')
export class AttachmentEntity extends SiteOwned {
  @WordColumn('subject_type')
  subjectType!: Attachment['subject']

  @IdColumn('subject_id')
  subjectId!: string

  @WordColumn('kind')
  kind!: Attachment['kind']

  @TextColumn('file_name', 120)
  fileName!: string

  @WordColumn('content_type')
  contentType!: string

  @IntColumn('bytes')
  bytes!: number

  /** of the stored bytes */
  @HashColumn('sha256')
  sha256!: string

  @IntColumn('width', { nullable: true })
  width!: number | null

  @IntColumn('height', { nullable: true })
  height!: number | null

  @TextColumn('caption', 200)
  caption!: string

  @IdColumn('added_by')
  addedBy!: string

  @InstantColumn('added_at')
  addedAt!: Date

  @InstantColumn('taken_at')
  takenAt!: Date

  @WordColumn('taken_from')
  takenFrom!: Attachment['takenFrom']

  /** never told to anybody: the site, then chance */
  @TextColumn('object_key', 128, { charset: 'ascii', collation: 'ascii_bin' })
  objectKey!: string

  @TextColumn('thumbnail_key', 128, { charset: 'ascii', collation: 'ascii_bin', nullable: true })
  thumbnailKey!: string | null

  @InstantColumn('withdrawn_at', { nullable: true })
  withdrawnAt!: Date | null

  @IdColumn('withdrawn_by', { nullable: true })
  withdrawnBy!: string | null

  @TextColumn('withdrawal_reason', 2000, { nullable: true })
  withdrawalReason!: string | null
}
