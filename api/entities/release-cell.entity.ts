import { Entity, ForeignKey, Index } from 'typeorm'
import { BigCountColumn, InstantColumn, IntColumn, JsonColumn, PrimaryIdColumn, PrimaryIntColumn, TextColumn } from '#api/entities/columns.ts'
import type { SharePair } from '#shared/domain/lot-facts.ts'

@Index('ix_release_cell_place', ['siteId', 'lift', 'cell'])
@ForeignKey('ReleaseEntity', ['siteId', 'releaseId'], ['siteId', 'id'], { name: 'fk_release_cell_release' })
@Entity('release_cell')
export class ReleaseCellEntity {
  @PrimaryIdColumn('site_id')
  siteId!: string

  @PrimaryIdColumn('release_id')
  releaseId!: string

  @PrimaryIntColumn('cell')
  cell!: number

  @IntColumn('lift')
  lift!: number

  @BigCountColumn('volume_cm3')
  volumeCm3!: number

  @JsonColumn('pairs')
  pairs!: readonly SharePair[]

  @InstantColumn('revoked_at', { nullable: true })
  revokedAt!: Date | null

  @TextColumn('revoked_reason', 400, { nullable: true })
  revokedReason!: string | null
}
