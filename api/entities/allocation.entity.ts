import { Entity, ForeignKey, Index } from 'typeorm'
import { BigCountColumn, BooleanColumn, PrimaryIdColumn, PrimaryIntColumn } from '#api/entities/columns.ts'

@Index('ix_allocation_test', ['siteId', 'testId'])
@ForeignKey('LotEntity', ['siteId', 'lotId'], ['siteId', 'id'], { name: 'fk_allocation_lot' })
@Entity('allocation')
export class AllocationEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('lot_id')
  lotId!: string

  @PrimaryIdColumn('test_id')
  testId!: string

  @PrimaryIntColumn('cell')
  cell!: number

  @BigCountColumn('cm3')
  cm3!: number

  @BooleanColumn('frozen')
  frozen!: boolean

  @BooleanColumn('far')
  far!: boolean
}
