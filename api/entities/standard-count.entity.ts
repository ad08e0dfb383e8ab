import { Entity, ForeignKey, Index } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { DayColumn, DecimalColumn, IdColumn, InstantColumn, JsonColumn, TextColumn } from '#api/entities/columns.ts'
import type { CountPair } from '#shared/domain/standard-count.ts'

/** A standard count of a gauge on its block; whether it is good follows from the calibrations and the counts before it. */
@Index('ix_standard_count_day', ['siteId', 'gaugeId', 'day'])
@ForeignKey('GaugeEntity', ['siteId', 'gaugeId'], ['siteId', 'id'], { name: 'fk_standard_count_gauge' })
@Entity('standard_count')
export class StandardCountEntity extends SiteOwned {
  @IdColumn('gauge_id')
  gaugeId!: string

  @InstantColumn('counted_at')
  countedAt!: Date

  /** the site's working day it was counted on */
  @DayColumn('day')
  day!: string

  @DecimalColumn('density_count', 12, 2)
  densityCount!: number

  @DecimalColumn('moisture_count', 12, 2)
  moistureCount!: number

  /** the five counts of a stability check, where one was made */
  @JsonColumn('stability', { nullable: true })
  stability!: readonly CountPair[] | null

  @TextColumn('remarks', 2000)
  remarks!: string

  @IdColumn('counted_by')
  countedBy!: string

  @InstantColumn('voided_at', { nullable: true })
  voidedAt!: Date | null

  @IdColumn('voided_by', { nullable: true })
  voidedBy!: string | null

  @TextColumn('void_reason', 2000, { nullable: true })
  voidReason!: string | null
}
