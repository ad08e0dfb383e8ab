import { Entity, ForeignKey, Index } from 'typeorm'
import { IntColumn, PrimaryIdColumn, PrimaryIntColumn } from '#api/entities/columns.ts'

@Index('ix_disposition_cell_place', ['siteId', 'lift', 'cell'])
@ForeignKey('DispositionEntity', ['siteId', 'dispositionId'], ['siteId', 'id'], { name: 'fk_disposition_cell_disposition' })
@Entity('disposition_cell')
export class DispositionCellEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('disposition_id')
  dispositionId!: string

  @PrimaryIntColumn('cell')
  cell!: number

  @IntColumn('lift')
  lift!: number
}
