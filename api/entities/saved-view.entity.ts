import { Entity, ForeignKey, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BooleanColumn, IdColumn, JsonColumn, TextColumn } from '#api/entities/columns.ts'
import type { ViewContent } from '#shared/schemas/saved-view.ts'

/** A way to look at the register of tests that somebody keeps. A convenience, no record: it may be removed. */
@Unique('uq_saved_view_name', ['siteId', 'authorId', 'name'])
@ForeignKey('SiteEntity', ['siteId'], ['id'], { name: 'fk_saved_view_site' })
@ForeignKey('UserEntity', ['authorId'], ['id'], { name: 'fk_saved_view_author' })
@Entity('saved_view')
export class SavedViewEntity extends SiteOwned {
  @IdColumn('author_id')
  authorId!: string

  @TextColumn('name', 80)
  name!: string

  /** seen by everybody who may see the registers */
  @BooleanColumn('shared')
  shared!: boolean

  @JsonColumn('content')
  content!: ViewContent
}
