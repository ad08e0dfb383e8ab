import { Entity, ForeignKey, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { DayColumn, TextColumn } from '#api/entities/columns.ts'

/** A nuclear gauge of the site's register. */
@Unique('uq_gauge_serial', ['siteId', 'serial'])
@ForeignKey('SiteEntity', ['siteId'], ['id'], { name: 'fk_gauge_site' })
@Entity('gauge')
export class GaugeEntity extends SiteOwned {
  @TextColumn('serial', 80)
  serial!: string

  @TextColumn('model', 200)
  model!: string

  @DayColumn('leak_tested_on', { nullable: true })
  leakTestedOn!: string | null
}
