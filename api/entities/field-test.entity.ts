import { Entity, ForeignKey, Index, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BigCountColumn, BooleanColumn, DoubleColumn, IdColumn, InstantColumn, IntColumn, JsonColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'
import type { RawSheet } from '#shared/domain/field-sheets.ts'
import type { Reason } from '#shared/domain/result.ts'
import type { Outcome, Verdict } from '#shared/domain/verdict-types.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'

@Index('ix_field_test_place', ['siteId', 'lift', 'cell'])
@Index('ix_field_test_chain', ['siteId', 'chainId'])
@Index('ix_field_test_sampled', ['siteId', 'sampledAt'])
@Index('ix_field_test_outcome', ['siteId', 'outcome'])
@Index('ix_field_test_recorder', ['siteId', 'recordedBy'])
@Unique('uq_field_test_number', ['siteId', 'number'])
@Unique('uq_field_test_seq', ['siteId', 'seq'])
@ForeignKey('ZoneEntity', ['siteId', 'zoneId'], ['siteId', 'id'], { name: 'fk_field_test_zone' })
@ForeignKey('ReferenceCurveEntity', ['siteId', 'curveId'], ['siteId', 'id'], { name: 'fk_field_test_curve' })
@ForeignKey('GaugeEntity', ['siteId', 'gaugeId'], ['siteId', 'id'], { name: 'fk_field_test_gauge' })
@Entity('field_test')
export class FieldTestEntity extends SiteOwned {
  @IntColumn('seq')
  seq!: number

  @TextColumn('number', 40)
  number!: string

  @IdColumn('chain_id')
  chainId!: string

  @IdColumn('follows_id', { nullable: true })
  followsId!: string | null

  @WordColumn('follow_kind', { nullable: true })
  followKind!: 'retest' | 'rerun' | null

  @WordColumn('purpose')
  purpose!: Purpose

  @IdColumn('zone_id')
  zoneId!: string

  @IntColumn('lift')
  lift!: number

  @IntColumn('cell')
  cell!: number

  @IdColumn('stake_id', { nullable: true })
  stakeId!: string | null

  @DoubleColumn('easting')
  easting!: number

  @DoubleColumn('northing')
  northing!: number

  @BigCountColumn('u')
  u!: number

  @BigCountColumn('v')
  v!: number

  @BigCountColumn('surface_um', { nullable: true })
  surfaceUm!: number | null

  @IntColumn('depth_um')
  depthUm!: number

  @InstantColumn('sampled_at')
  sampledAt!: Date

  @InstantColumn('recorded_at')
  recordedAt!: Date

  @IdColumn('recorded_by')
  recordedBy!: string

  @WordColumn('method')
  method!: RawSheet['method']

  @JsonColumn('sheet')
  sheet!: RawSheet

  /** the gauge of the register it was read with; null for none, and where none was named */
  @IdColumn('gauge_id', { nullable: true })
  gaugeId!: string | null

  @DoubleColumn('oversize_percent', { nullable: true })
  oversizePercent!: number | null

  @IdColumn('curve_id')
  curveId!: string

  @TextColumn('remarks', 2000)
  remarks!: string

  @WordColumn('outcome')
  outcome!: Outcome

  @BooleanColumn('treated_as_fail')
  treatedAsFail!: boolean

  @BooleanColumn('near')
  near!: boolean

  @TextColumn('headline', 200)
  headline!: string

  @DoubleColumn('wet_density')
  wetDensity!: number

  @DoubleColumn('dry_density')
  dryDensity!: number

  @DoubleColumn('moisture')
  moisture!: number

  @DoubleColumn('rc')
  rc!: number

  @DoubleColumn('moisture_deviation')
  moistureDeviation!: number

  @JsonColumn('verdict')
  verdict!: Verdict

  @JsonColumn('flags')
  flags!: readonly Reason[]

  @InstantColumn('voided_at', { nullable: true })
  voidedAt!: Date | null

  @IdColumn('voided_by', { nullable: true })
  voidedBy!: string | null

  @TextColumn('void_reason', 2000, { nullable: true })
  voidReason!: string | null
}
