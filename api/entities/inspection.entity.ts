import { Entity, ForeignKey } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { IdColumn, InstantColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'

@ForeignKey('SiteEntity', ['siteId'], ['id'], { name: 'fk_inspection_site' })
@Entity('inspection')
export class InspectionEntity extends SiteOwned {
  @InstantColumn('happened_at')
  happenedAt!: Date

  @InstantColumn('recorded_at')
  recordedAt!: Date

  @IdColumn('recorded_by')
  recordedBy!: string

  @WordColumn('method')
  method!: 'proof-roll' | 'visual'

  @WordColumn('outcome')
  outcome!: 'accepted' | 'not-accepted'

  @TextColumn('remarks', 2000)
  remarks!: string
}
