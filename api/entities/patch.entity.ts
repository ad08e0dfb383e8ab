import { Column, Entity, ForeignKey, PrimaryColumn } from 'typeorm'
import { InstantColumn, PrimaryIdColumn, numberFromText } from '#api/entities/columns.ts'

/** What one revision changed on the Ground (ground-codec's encodePatch), kept so that a client can catch up. */
@Entity('patch')
export class PatchEntity {
  @PrimaryIdColumn('site_id')
  @ForeignKey('SiteEntity', { name: 'fk_patch_site' })
  siteId!: string

  @PrimaryColumn('bigint', { name: 'revision', transformer: numberFromText })
  revision!: number

  @Column('mediumblob', { name: 'body' })
  body!: Buffer

  @InstantColumn('recorded_at')
  recordedAt!: Date
}
