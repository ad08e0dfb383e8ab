import { Entity, ForeignKey } from 'typeorm'
import { IdColumn, PrimaryIdColumn } from '#api/entities/columns.ts'

/** The saved view that the register opens with, for one person on one site. */
@ForeignKey('SavedViewEntity', ['siteId', 'viewId'], ['siteId', 'id'], { name: 'fk_default_view_view' })
@ForeignKey('UserEntity', ['userId'], ['id'], { name: 'fk_default_view_user' })
@Entity('default_view')
export class DefaultViewEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('user_id')
  userId!: string

  @IdColumn('view_id')
  viewId!: string
}
