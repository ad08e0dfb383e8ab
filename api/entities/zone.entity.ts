import { Entity, ForeignKey, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BigCountColumn, IntColumn, JsonColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'
import type { LiftPlan, SiteRing } from '#shared/domain/site-geometry.ts'
import type { ZoneInput } from '#shared/schemas/site.ts'

@Unique('uq_zone_position', ['siteId', 'position'])
@ForeignKey('SiteEntity', ['siteId'], ['id'], { name: 'fk_zone_site' })
@Entity('zone')
export class ZoneEntity extends SiteOwned {
  @IntColumn('position')
  position!: number

  @TextColumn('name', 80)
  name!: string

  @TextColumn('short_name', 16)
  shortName!: string

  @WordColumn('purpose')
  purpose!: ZoneInput['purpose']

  @JsonColumn('ring')
  ring!: SiteRing

  @JsonColumn('lift_plan')
  liftPlan!: LiftPlan

  @JsonColumn('design')
  design!: ZoneInput['design']

  @JsonColumn('holds')
  holds!: ZoneInput['holds']

  @WordColumn('volume_basis')
  volumeBasis!: ZoneInput['volumeBasis']

  @WordColumn('lot_basis')
  lotBasis!: ZoneInput['lotBasis']

  @BigCountColumn('min_base_um')
  minBaseUm!: number

  @BigCountColumn('max_design_um')
  maxDesignUm!: number

  @BigCountColumn('design_cm3')
  designCm3!: number
}
