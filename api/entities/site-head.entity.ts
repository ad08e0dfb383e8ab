import { Entity, ForeignKey } from 'typeorm'
import { BigCountColumn, HashColumn, IntColumn, PrimaryIdColumn } from '#api/entities/columns.ts'

/** The row every writer of a site locks first: revision, end of the event chain, next running numbers. */
@Entity('site_head')
export class SiteHeadEntity {
  @PrimaryIdColumn('site_id')
  @ForeignKey('SiteEntity', { name: 'fk_site_head_site' })
  siteId!: string

  @BigCountColumn('revision')
  revision!: number

  /** number of events in the chain */
  @BigCountColumn('chain_length')
  chainLength!: number

  @HashColumn('chain_head')
  chainHead!: string

  @IntColumn('next_test')
  nextTest!: number

  @IntColumn('next_order')
  nextOrder!: number

  @IntColumn('next_lot')
  nextLot!: number

  @IntColumn('next_stake')
  nextStake!: number

  @IntColumn('next_release')
  nextRelease!: number

  @IntColumn('next_placement')
  nextPlacement!: number
}
