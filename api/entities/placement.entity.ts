import { Entity, ForeignKey, Index, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BigCountColumn, IdColumn, InstantColumn, IntColumn, TextColumn } from '#api/entities/columns.ts'

@Index('ix_placement_happened', ['siteId', 'happenedAt'])
@Unique('uq_placement_seq', ['siteId', 'seq'])
@ForeignKey('ZoneEntity', ['siteId', 'zoneId'], ['siteId', 'id'], { name: 'fk_placement_zone' })
@ForeignKey('BorrowMaterialEntity', ['siteId', 'materialId'], ['siteId', 'id'], { name: 'fk_placement_material' })
@Entity('placement')
export class PlacementEntity extends SiteOwned {
  @IntColumn('seq')
  seq!: number

  @IdColumn('zone_id')
  zoneId!: string

  @IntColumn('lift')
  lift!: number

  @IdColumn('material_id')
  materialId!: string

  @InstantColumn('happened_at')
  happenedAt!: Date

  @InstantColumn('recorded_at')
  recordedAt!: Date

  @IdColumn('recorded_by')
  recordedBy!: string

  @IntColumn('loads')
  loads!: number

  @BigCountColumn('load_volume_cm3')
  loadVolumeCm3!: number

  @IntColumn('loose_thickness_um', { nullable: true })
  looseThicknessUm!: number | null

  @TextColumn('machine', 200)
  machine!: string

  @IntColumn('passes', { nullable: true })
  passes!: number | null

  @TextColumn('remarks', 2000)
  remarks!: string

  @BigCountColumn('geometry_cm3')
  geometryCm3!: number

  @BigCountColumn('loads_cm3')
  loadsCm3!: number

  @BigCountColumn('driving_cm3')
  drivingCm3!: number

  @TextColumn('cover_reason', 2000, { nullable: true })
  coverReason!: string | null

  @InstantColumn('voided_at', { nullable: true })
  voidedAt!: Date | null

  @IdColumn('voided_by', { nullable: true })
  voidedBy!: string | null

  @TextColumn('void_reason', 2000, { nullable: true })
  voidReason!: string | null
}
