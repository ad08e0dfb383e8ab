import { InstantColumn, PrimaryIdColumn } from '#api/entities/columns.ts'

/** Instants come from the service's clock, never from the database, so that a demo or a test can fix them. */
export abstract class Timestamped {
  @InstantColumn('created_at')
  createdAt!: Date

  @InstantColumn('updated_at')
  updatedAt!: Date
}

export abstract class Identified extends Timestamped {
  @PrimaryIdColumn('id')
  id!: string
}

/** A row that belongs to a site: the site comes first in its key, so that a site can move to another database. */
export abstract class SiteOwned extends Timestamped {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('id')
  id!: string
}
