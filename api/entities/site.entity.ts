import { Column, Entity, ForeignKey } from 'typeorm'
import { Identified } from '#api/entities/base.ts'
import { DoubleColumn, IdColumn, JsonColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'
import type { RoundingRule } from '#shared/domain/rounding.ts'
import type { GridDefinition, SiteRing } from '#shared/domain/site-geometry.ts'

@Entity('site')
export class SiteEntity extends Identified {
  @TextColumn('name', 120)
  name!: string

  @TextColumn('subtitle', 200)
  subtitle!: string

  /** authority and number, such as EPSG:6346 */
  @WordColumn('crs_code')
  crsCode!: string

  @WordColumn('unit_system', { length: 2 })
  unitSystem!: 'us' | 'si'

  @TextColumn('time_zone', 64)
  timeZone!: string

  /** the hour, 0 to 23, local time, at which one working day ends and the next begins */
  @Column('tinyint', { name: 'day_cut_hour', unsigned: true })
  dayCutHour!: number

  @JsonColumn('grid')
  grid!: GridDefinition

  @JsonColumn('boundary')
  boundary!: SiteRing

  @JsonColumn('rounding')
  rounding!: RoundingRule

  /** kg/m³ */
  @DoubleColumn('water_density')
  waterDensity!: number

  /** grid distance over ground distance */
  @DoubleColumn('combined_factor')
  combinedFactor!: number

  @TextColumn('vertical_datum', 120)
  verticalDatum!: string

  @IdColumn('created_by')
  @ForeignKey('UserEntity', { name: 'fk_site_created_by' })
  createdBy!: string
}
