import { Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import { BigCountColumn, HashColumn, IdColumn, InstantColumn, PrimaryIdColumn, TextColumn, WordColumn, numberFromText } from '#api/entities/columns.ts'

/** One link of a site's audit trail. Triggers refuse UPDATE and DELETE. */
@Entity('event')
@Index('ix_event_subject', ['siteId', 'subjectType', 'subjectId', 'seq'])
export class EventEntity {
  @PrimaryIdColumn('site_id')
  @ForeignKey('SiteEntity', { name: 'fk_event_site' })
  siteId!: string

  /** place in the site's chain, from 1 */
  @PrimaryColumn('bigint', { name: 'seq', transformer: numberFromText })
  seq!: number

  @BigCountColumn('revision')
  revision!: number

  @IdColumn('actor_id')
  @ForeignKey('UserEntity', { name: 'fk_event_actor' })
  actorId!: string

  /** the person's name as it was then */
  @TextColumn('actor_name', 120)
  actorName!: string

  @WordColumn('verb', { length: 64 })
  verb!: string

  @WordColumn('subject_type')
  subjectType!: string

  @WordColumn('subject_id', { length: 64 })
  subjectId!: string

  /** canonical JSON (RFC 8785), hashed exactly as stored */
  @Column('longtext', { name: 'payload' })
  payload!: string

  @InstantColumn('happened_at')
  happenedAt!: Date

  @InstantColumn('recorded_at')
  recordedAt!: Date

  @HashColumn('previous')
  previous!: string

  @HashColumn('hash')
  hash!: string
}
