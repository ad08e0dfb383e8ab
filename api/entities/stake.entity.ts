import { Entity, ForeignKey, Index, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BigCountColumn, DoubleColumn, IdColumn, InstantColumn, IntColumn, TextColumn } from '#api/entities/columns.ts'

@Index('ix_stake_lot', ['siteId', 'lotId'])
@Unique('uq_stake_seq', ['siteId', 'seq'])
@ForeignKey('LotEntity', ['siteId', 'lotId'], ['siteId', 'id'], { name: 'fk_stake_lot' })
@Entity('stake')
export class StakeEntity extends SiteOwned {
  @IntColumn('seq')
  seq!: number

  @TextColumn('label', 12)
  label!: string

  @IdColumn('lot_id')
  lotId!: string

  @IntColumn('cell')
  cell!: number

  @BigCountColumn('u')
  u!: number

  @BigCountColumn('v')
  v!: number

  @DoubleColumn('easting')
  easting!: number

  @DoubleColumn('northing')
  northing!: number

  @InstantColumn('drawn_at')
  drawnAt!: Date

  @IdColumn('drawn_by')
  drawnBy!: string

  @InstantColumn('retired_at', { nullable: true })
  retiredAt!: Date | null

  @TextColumn('retired_by', 200, { nullable: true })
  retiredBy!: string | null
}
