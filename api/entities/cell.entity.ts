import { Entity, ForeignKey, Index } from 'typeorm'
import { BigCountColumn, BooleanColumn, IdColumn, IntColumn, PrimaryIdColumn, PrimaryIntColumn, WordColumn } from '#api/entities/columns.ts'

@Index('ix_cell_zone', ['siteId', 'zoneId'])
@ForeignKey('SiteEntity', ['siteId'], ['id'], { name: 'fk_cell_site' })
@Entity('cell')
export class CellEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIntColumn('cell')
  cell!: number

  @IntColumn('grid_column')
  gridColumn!: number

  @IntColumn('grid_row')
  gridRow!: number

  @IdColumn('zone_id', { nullable: true })
  zoneId!: string | null

  @IntColumn('zone_index')
  zoneIndex!: number

  @BigCountColumn('area_mm2')
  areaMm2!: number

  @BigCountColumn('centroid_u')
  centroidU!: number

  @BigCountColumn('centroid_v')
  centroidV!: number

  @BigCountColumn('base_um')
  baseUm!: number

  @BigCountColumn('design_um')
  designUm!: number

  @IntColumn('surface_lift')
  surfaceLift!: number

  @BooleanColumn('ready')
  ready!: boolean

  @IntColumn('next_lift', { nullable: true })
  nextLift!: number | null

  @BigCountColumn('next_cm3')
  nextCm3!: number

  @IntColumn('block_lift', { nullable: true })
  blockLift!: number | null

  @WordColumn('block_reason', { nullable: true })
  blockReason!: string | null
}
