import { Entity, ForeignKey } from 'typeorm'
import { BigCountColumn, IntColumn, PrimaryIdColumn, PrimaryIntColumn } from '#api/entities/columns.ts'

@ForeignKey('ZoneEntity', ['siteId', 'zoneId'], ['siteId', 'id'], { name: 'fk_lift_total_zone' })
@Entity('lift_total')
export class LiftTotalEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('zone_id')
  zoneId!: string

  @PrimaryIntColumn('lift')
  lift!: number

  @PrimaryIntColumn('state')
  state!: number

  @IntColumn('cells')
  cells!: number

  @BigCountColumn('cm3')
  cm3!: number
}
