import { Column, Entity, ForeignKey } from 'typeorm'
import { HashColumn, InstantColumn, PrimaryIdColumn } from '#api/entities/columns.ts'

/** What a request with a client-given UUID was answered, so that sending it again does nothing twice. */
@Entity('request_record')
export class RequestRecordEntity {
  @PrimaryIdColumn('site_id')
  @ForeignKey('SiteEntity', { name: 'fk_request_record_site' })
  siteId!: string

  @PrimaryIdColumn('id')
  id!: string

  @HashColumn('hash')
  hash!: string

  @Column('longtext', { name: 'answer' })
  answer!: string

  @InstantColumn('recorded_at')
  recordedAt!: Date
}
