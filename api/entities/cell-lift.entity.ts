import { Entity, ForeignKey, Index } from 'typeorm'
import { BigCountColumn, IdColumn, PrimaryIdColumn, PrimaryIntColumn, TinyCountColumn } from '#api/entities/columns.ts'

@Index('ix_cell_lift_cell', ['siteId', 'cell'])
@Index('ix_cell_lift_lot', ['siteId', 'lotId'])
@ForeignKey('CellEntity', ['siteId', 'cell'], ['siteId', 'cell'], { name: 'fk_cell_lift_cell' })
@Entity('cell_lift')
export class CellLiftEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIntColumn('lift')
  lift!: number

  @PrimaryIntColumn('cell')
  cell!: number

  @IdColumn('zone_id')
  zoneId!: string

  @TinyCountColumn('state')
  state!: number

  @TinyCountColumn('flags')
  flags!: number

  @IdColumn('lot_id', { nullable: true })
  lotId!: string | null

  @BigCountColumn('bottom_um')
  bottomUm!: number

  @BigCountColumn('top_um')
  topUm!: number

  @BigCountColumn('volume_cm3')
  volumeCm3!: number

  @BigCountColumn('spoken_cm3')
  spokenCm3!: number

  @IdColumn('naming_test_id', { nullable: true })
  namingTestId!: string | null
}
