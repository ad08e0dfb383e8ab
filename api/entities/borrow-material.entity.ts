import { Entity, ForeignKey, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BooleanColumn, DecimalColumn, TextColumn } from '#api/entities/columns.ts'

@Unique('uq_borrow_material_name', ['siteId', 'name'])
@ForeignKey('SiteEntity', ['siteId'], ['id'], { name: 'fk_borrow_material_site' })
@Entity('borrow_material')
export class BorrowMaterialEntity extends SiteOwned {
  @TextColumn('name', 80)
  name!: string

  @TextColumn('source', 200)
  source!: string

  @TextColumn('classification', 200)
  classification!: string

  @DecimalColumn('swell_percent', 6, 2)
  swellPercent!: number

  @DecimalColumn('shrink_percent', 6, 2)
  shrinkPercent!: number

  /** specific gravity of the solids, null where it is not known */
  @DecimalColumn('gs', 6, 3, { nullable: true })
  gs!: number | null

  @BooleanColumn('gs_measured')
  gsMeasured!: boolean
}
