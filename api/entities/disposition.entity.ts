import { Entity, ForeignKey } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { IdColumn, InstantColumn, IntColumn, TextColumn } from '#api/entities/columns.ts'

@ForeignKey('SiteEntity', ['siteId'], ['id'], { name: 'fk_disposition_site' })
@Entity('disposition')
export class DispositionEntity extends SiteOwned {
  @IntColumn('lift')
  lift!: number

  @TextColumn('reason', 2000)
  reason!: string

  @TextColumn('engineer', 80)
  engineer!: string

  @TextColumn('document', 200)
  document!: string

  @InstantColumn('recorded_at')
  recordedAt!: Date

  @IdColumn('recorded_by')
  recordedBy!: string
}
