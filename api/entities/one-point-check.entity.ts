import { Entity, ForeignKey, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { DoubleColumn, IdColumn, InstantColumn, IntColumn, JsonColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'
import type { CreateOnePoint, OnePointResult } from '#shared/schemas/one-point.ts'

@Unique('uq_one_point_check_seq', ['siteId', 'seq'])
@ForeignKey('BorrowMaterialEntity', ['siteId', 'materialId'], ['siteId', 'id'], { name: 'fk_one_point_check_material' })
@ForeignKey('ReferenceCurveEntity', ['siteId', 'curveId'], ['siteId', 'id'], { name: 'fk_one_point_check_curve' })
@ForeignKey('FieldTestEntity', ['siteId', 'testId'], ['siteId', 'id'], { name: 'fk_one_point_check_test' })
@Entity('one_point_check')
export class OnePointCheckEntity extends SiteOwned {
  @IntColumn('seq')
  seq!: number

  @IdColumn('material_id')
  materialId!: string

  /** the curve in use, that is checked */
  @IdColumn('curve_id')
  curveId!: string

  @IdColumn('test_id', { nullable: true })
  testId!: string | null

  @WordColumn('method')
  method!: CreateOnePoint['method']

  @WordColumn('procedure_letter')
  procedure!: CreateOnePoint['procedure']

  @JsonColumn('sheet')
  sheet!: CreateOnePoint['sheet']

  @DoubleColumn('wet_density')
  wetDensity!: number

  @DoubleColumn('dry_density')
  dryDensity!: number

  @DoubleColumn('moisture')
  moisture!: number

  /** the family, the curve in use and the fit, as they were that day */
  @JsonColumn('result')
  result!: OnePointResult

  @InstantColumn('sampled_at')
  sampledAt!: Date

  @InstantColumn('recorded_at')
  recordedAt!: Date

  @IdColumn('recorded_by')
  recordedBy!: string

  @TextColumn('remarks', 2000)
  remarks!: string

  @InstantColumn('voided_at', { nullable: true })
  voidedAt!: Date | null

  @IdColumn('voided_by', { nullable: true })
  voidedBy!: string | null

  @TextColumn('void_reason', 2000, { nullable: true })
  voidReason!: string | null
}
