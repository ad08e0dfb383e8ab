import { Entity, ForeignKey } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { IdColumn, InstantColumn, TextColumn } from '#api/entities/columns.ts'

/** A time a gauge was out of service. */
@ForeignKey('GaugeEntity', ['siteId', 'gaugeId'], ['siteId', 'id'], { name: 'fk_gauge_outage_gauge' })
@Entity('gauge_outage')
export class GaugeOutageEntity extends SiteOwned {
  @IdColumn('gauge_id')
  gaugeId!: string

  @InstantColumn('from_at')
  fromAt!: Date

  @TextColumn('reason', 2000)
  reason!: string

  @IdColumn('taken_out_by')
  takenOutBy!: string

  /** null while it is out */
  @InstantColumn('until_at', { nullable: true })
  untilAt!: Date | null

  @IdColumn('returned_by', { nullable: true })
  returnedBy!: string | null

  @TextColumn('return_remarks', 2000, { nullable: true })
  returnRemarks!: string | null
}
