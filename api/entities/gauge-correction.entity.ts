import { Entity, ForeignKey } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { IdColumn, InstantColumn, JsonColumn, TextColumn } from '#api/entities/columns.ts'
import type { MoisturePair } from '#shared/domain/moisture-correction.ts'

/** The moisture correction of a gauge for a material: the paired moistures its K is the mean of. */
@ForeignKey('GaugeEntity', ['siteId', 'gaugeId'], ['siteId', 'id'], { name: 'fk_gauge_correction_gauge' })
@ForeignKey('BorrowMaterialEntity', ['siteId', 'materialId'], ['siteId', 'id'], { name: 'fk_gauge_correction_material' })
@Entity('gauge_correction')
export class GaugeCorrectionEntity extends SiteOwned {
  @IdColumn('gauge_id')
  gaugeId!: string

  @IdColumn('material_id')
  materialId!: string

  @JsonColumn('pairs')
  pairs!: readonly MoisturePair[]

  @InstantColumn('in_force_from')
  inForceFrom!: Date

  @TextColumn('remarks', 2000)
  remarks!: string

  @IdColumn('recorded_by')
  recordedBy!: string

  @InstantColumn('withdrawn_at', { nullable: true })
  withdrawnAt!: Date | null

  @IdColumn('withdrawn_by', { nullable: true })
  withdrawnBy!: string | null

  @TextColumn('withdraw_reason', 2000, { nullable: true })
  withdrawReason!: string | null
}
