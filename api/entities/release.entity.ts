import { Entity, ForeignKey, Index, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BooleanColumn, IdColumn, InstantColumn, IntColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'

@Index('ix_release_place', ['siteId', 'zoneId', 'lift'])
@Unique('uq_release_seq', ['siteId', 'seq'])
@ForeignKey('ZoneEntity', ['siteId', 'zoneId'], ['siteId', 'id'], { name: 'fk_release_zone' })
@Entity('release_record')
export class ReleaseEntity extends SiteOwned {
  @IntColumn('seq')
  seq!: number

  @IdColumn('zone_id')
  zoneId!: string

  @IntColumn('lift')
  lift!: number

  @WordColumn('status')
  status!: 'asked' | 'awaiting-acceptance' | 'released' | 'declined'

  @BooleanColumn('hold')
  hold!: boolean

  @InstantColumn('happened_at')
  happenedAt!: Date

  @IdColumn('asked_by', { nullable: true })
  askedBy!: string | null

  @IdColumn('issued_by', { nullable: true })
  issuedBy!: string | null

  @InstantColumn('issued_at', { nullable: true })
  issuedAt!: Date | null

  @IdColumn('accepted_by', { nullable: true })
  acceptedBy!: string | null

  @InstantColumn('accepted_at', { nullable: true })
  acceptedAt!: Date | null

  @TextColumn('declined_reason', 2000, { nullable: true })
  declinedReason!: string | null

  @TextColumn('override_reason', 2000, { nullable: true })
  overrideReason!: string | null

  @TextColumn('remarks', 2000)
  remarks!: string
}
