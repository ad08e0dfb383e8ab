import { Entity, ForeignKey, Index } from 'typeorm'
import { InstantColumn, PrimaryIdColumn, PrimaryIntColumn } from '#api/entities/columns.ts'

@Index('ix_rework_cell_cell', ['siteId', 'cell'])
@ForeignKey('ReworkOrderEntity', ['siteId', 'orderId'], ['siteId', 'id'], { name: 'fk_rework_cell_order' })
@Entity('rework_cell')
export class ReworkCellEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('order_id')
  orderId!: string

  @PrimaryIntColumn('cell')
  cell!: number

  @InstantColumn('left_at', { nullable: true })
  leftAt!: Date | null
}
