import { Entity, ForeignKey, Index } from 'typeorm'
import { BigCountColumn, BooleanColumn, IdColumn, IntColumn, PrimaryIdColumn, PrimaryIntColumn, TinyCountColumn } from '#api/entities/columns.ts'

@Index('ix_placement_cell_place', ['siteId', 'lift', 'cell'])
@Index('ix_placement_cell_lot', ['siteId', 'lotId'])
@ForeignKey('LotEntity', ['siteId', 'lotId'], ['siteId', 'id'], { name: 'fk_placement_cell_lot' })
@ForeignKey('PlacementEntity', ['siteId', 'placementId'], ['siteId', 'id'], { name: 'fk_placement_cell_placement' })
@Entity('placement_cell')
export class PlacementCellEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('placement_id')
  placementId!: string

  @PrimaryIntColumn('cell')
  cell!: number

  @IntColumn('lift')
  lift!: number

  @IdColumn('lot_id')
  lotId!: string

  @TinyCountColumn('quarters')
  quarters!: number

  @BigCountColumn('volume_cm3')
  volumeCm3!: number

  @BooleanColumn('covered_early')
  coveredEarly!: boolean
}
