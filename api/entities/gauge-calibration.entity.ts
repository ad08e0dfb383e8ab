import { Entity, ForeignKey } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { DayColumn, DecimalColumn, IdColumn } from '#api/entities/columns.ts'

/** A calibration of a gauge; the last made on or before a day is in force on it. */
@ForeignKey('GaugeEntity', ['siteId', 'gaugeId'], ['siteId', 'id'], { name: 'fk_gauge_calibration_gauge' })
@Entity('gauge_calibration')
export class GaugeCalibrationEntity extends SiteOwned {
  @IdColumn('gauge_id')
  gaugeId!: string

  @DayColumn('calibrated_on')
  calibratedOn!: string

  @DayColumn('due_on', { nullable: true })
  dueOn!: string | null

  @DecimalColumn('density_count', 12, 2)
  densityCount!: number

  @DecimalColumn('moisture_count', 12, 2)
  moistureCount!: number

  @IdColumn('recorded_by')
  recordedBy!: string
}
