import { Entity, ForeignKey, Index } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { DoubleColumn, IdColumn, InstantColumn, JsonColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'
import type { CalibrationKind, CalibrationSheet } from '#shared/domain/calibration.ts'
import type { Reason } from '#shared/domain/result.ts'

@Index('ix_calibration_performed', ['siteId', 'kind', 'performedAt'])
@ForeignKey('SiteEntity', ['siteId'], ['id'], { name: 'fk_calibration_site' })
@Entity('calibration')
export class CalibrationEntity extends SiteOwned {
  @WordColumn('kind')
  kind!: CalibrationKind

  @TextColumn('apparatus', 80)
  apparatus!: string

  @JsonColumn('sheet')
  sheet!: CalibrationSheet

  /** as CalibrationResult.value */
  @DoubleColumn('value')
  value!: number

  @DoubleColumn('spread_percent')
  spreadPercent!: number

  @JsonColumn('flags')
  flags!: readonly Reason[]

  @InstantColumn('performed_at')
  performedAt!: Date

  @InstantColumn('valid_until', { nullable: true })
  validUntil!: Date | null

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
