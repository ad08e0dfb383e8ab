import { Entity, ForeignKey, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { IdColumn, InstantColumn, IntColumn, JsonColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'

@Unique('uq_rework_step_position', ['siteId', 'orderId', 'position'])
@ForeignKey('ReworkOrderEntity', ['siteId', 'orderId'], ['siteId', 'id'], { name: 'fk_rework_step_order' })
@Entity('rework_step')
export class ReworkStepEntity extends SiteOwned {
  @IdColumn('order_id')
  orderId!: string

  @IntColumn('position')
  position!: number

  @WordColumn('kind')
  kind!: string

  @InstantColumn('happened_at')
  happenedAt!: Date

  @IdColumn('by_id')
  byId!: string

  @TextColumn('text', 2000)
  text!: string

  @JsonColumn('details')
  details!: Record<string, unknown>
}
