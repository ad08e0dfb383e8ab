import { Entity, ForeignKey, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { IdColumn, IntColumn, JsonColumn } from '#api/entities/columns.ts'
import type { SpecificationInput } from '#shared/schemas/site.ts'

@Unique('uq_specification_version', ['siteId', 'zoneId', 'version'])
@ForeignKey('ZoneEntity', ['siteId', 'zoneId'], ['siteId', 'id'], { name: 'fk_specification_zone' })
@Entity('specification')
export class SpecificationEntity extends SiteOwned {
  @IdColumn('zone_id')
  zoneId!: string

  @IntColumn('version')
  version!: number

  @JsonColumn('body')
  body!: SpecificationInput

  @IdColumn('created_by')
  createdBy!: string
}
