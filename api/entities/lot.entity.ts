import { Entity, ForeignKey, Index, Unique } from 'typeorm'
import { SiteOwned } from '#api/entities/base.ts'
import { BigCountColumn, IdColumn, IntColumn, TextColumn, WordColumn } from '#api/entities/columns.ts'
import type { LotStanding } from '#shared/domain/lot-facts.ts'

@Index('ix_lot_zone_lift', ['siteId', 'zoneId', 'lift'])
@Unique('uq_lot_seq', ['siteId', 'seq'])
@ForeignKey('ZoneEntity', ['siteId', 'zoneId'], ['siteId', 'id'], { name: 'fk_lot_zone' })
@Entity('lot')
export class LotEntity extends SiteOwned {
  @IntColumn('seq')
  seq!: number

  @TextColumn('name', 80)
  name!: string

  @IdColumn('zone_id')
  zoneId!: string

  @IntColumn('lift')
  lift!: number

  @IdColumn('material_id', { nullable: true })
  materialId!: string | null

  @WordColumn('work_day')
  workDay!: string

  @IdColumn('specification_id')
  specificationId!: string

  @IdColumn('merged_into', { nullable: true })
  mergedInto!: string | null

  @BigCountColumn('volume_cm3')
  volumeCm3!: number

  @BigCountColumn('spoken_cm3')
  spokenCm3!: number

  @BigCountColumn('area_mm2')
  areaMm2!: number

  @BigCountColumn('f_cm3')
  fCm3!: number

  @IntColumn('required')
  required!: number

  @IntColumn('taken')
  taken!: number

  @IntColumn('passing')
  passing!: number

  @IntColumn('owed')
  owed!: number

  @IntColumn('reruns')
  reruns!: number

  @IntColumn('to_stake')
  toStake!: number

  @WordColumn('standing')
  standing!: LotStanding
}
