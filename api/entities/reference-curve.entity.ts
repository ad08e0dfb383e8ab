import { Entity, ForeignKey, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BooleanColumn, DecimalColumn, DoubleColumn, IdColumn, InstantColumn, JsonColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'
import type { CreateCurve, Curve } from '#shared/schemas/lab.ts'

@Unique('uq_reference_curve_code', ['siteId', 'code'])
@ForeignKey('BorrowMaterialEntity', ['siteId', 'materialId'], ['siteId', 'id'], { name: 'fk_reference_curve_material' })
@ForeignKey('ReferenceCurveEntity', ['siteId', 'successorId'], ['siteId', 'id'], { name: 'fk_reference_curve_successor' })
@Entity('reference_curve')
export class ReferenceCurveEntity extends SiteOwned {
  @TextColumn('code', 80)
  code!: string

  @IdColumn('material_id')
  materialId!: string

  @WordColumn('method')
  method!: CreateCurve['method']

  @WordColumn('procedure_letter')
  procedure!: CreateCurve['procedure']

  @JsonColumn('points')
  points!: CreateCurve['points']

  @DecimalColumn('gs', 6, 3)
  gs!: number

  @BooleanColumn('gs_measured')
  gsMeasured!: boolean

  @JsonColumn('coarse', { nullable: true })
  coarse!: CreateCurve['coarse']

  @JsonColumn('reported', { nullable: true })
  reported!: CreateCurve['reported']

  @InstantColumn('sampled_at')
  sampledAt!: Date

  @WordColumn('status')
  status!: Curve['status']

  @DoubleColumn('max_dry_density', { nullable: true })
  maxDryDensity!: number | null

  @DoubleColumn('optimum_moisture', { nullable: true })
  optimumMoisture!: number | null

  @WordColumn('pair_from', { nullable: true })
  pairFrom!: Curve['pairFrom']

  @IdColumn('recorded_by')
  recordedBy!: string

  @IdColumn('approved_by', { nullable: true })
  approvedBy!: string | null

  @InstantColumn('approved_at', { nullable: true })
  approvedAt!: Date | null

  /** the curve that took its place */
  @IdColumn('successor_id', { nullable: true })
  successorId!: string | null

  @InstantColumn('superseded_at', { nullable: true })
  supersededAt!: Date | null

  @IdColumn('superseded_by', { nullable: true })
  supersededBy!: string | null

  @TextColumn('supersede_reason', 2000, { nullable: true })
  supersedeReason!: string | null

  /** the specimens as they were written down; null where only points were given */
  @JsonColumn('entry', { nullable: true })
  entry!: NonNullable<CreateCurve['entry']> | null

  @JsonColumn('apparatus', { nullable: true })
  apparatus!: NonNullable<CreateCurve['apparatus']> | null

  @TextColumn('withdraw_reason', 2000, { nullable: true })
  withdrawReason!: string | null
}
