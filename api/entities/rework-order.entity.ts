import { Entity, ForeignKey, Index, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { IdColumn, InstantColumn, IntColumn, JsonColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'

@Index('ix_rework_order_place', ['siteId', 'zoneId', 'lift'])
@Unique('uq_rework_order_seq', ['siteId', 'seq'])
@ForeignKey('ZoneEntity', ['siteId', 'zoneId'], ['siteId', 'id'], { name: 'fk_rework_order_zone' })
@Entity('rework_order')
export class ReworkOrderEntity extends SiteOwned {
  @IntColumn('seq')
  seq!: number

  @IdColumn('zone_id')
  zoneId!: string

  @IntColumn('lift')
  lift!: number

  @IdColumn('cause_test_id', { nullable: true })
  causeTestId!: string | null

  @WordColumn('state')
  state!: 'issued' | 'working' | 'ready' | 'closed' | 'withdrawn'

  @JsonColumn('actions')
  actions!: readonly string[]

  @TextColumn('headline', 200)
  headline!: string

  @IdColumn('opened_by')
  openedBy!: string

  @InstantColumn('opened_at')
  openedAt!: Date

  @TextColumn('assigned_to', 80, { nullable: true })
  assignedTo!: string | null

  @InstantColumn('working_since', { nullable: true })
  workingSince!: Date | null

  @InstantColumn('reported_at', { nullable: true })
  reportedAt!: Date | null

  @InstantColumn('closed_at', { nullable: true })
  closedAt!: Date | null

  @JsonColumn('retest_points')
  retestPoints!: readonly { cell: number; easting: number; northing: number }[]
}
