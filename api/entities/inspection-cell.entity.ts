import { Entity, ForeignKey, Index } from 'typeorm'
import { PrimaryIdColumn, PrimaryIntColumn } from '#api/entities/columns.ts'

@Index('ix_inspection_cell_cell', ['siteId', 'cell'])
@ForeignKey('InspectionEntity', ['siteId', 'inspectionId'], ['siteId', 'id'], { name: 'fk_inspection_cell_inspection' })
@Entity('inspection_cell')
export class InspectionCellEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('inspection_id')
  inspectionId!: string

  @PrimaryIntColumn('cell')
  cell!: number
}
