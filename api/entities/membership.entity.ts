import { Entity, ForeignKey, Index } from 'typeorm'
import { Timestamped } from '#api/entities/base.ts'
import { PrimaryIdColumn, WordColumn } from '#api/entities/columns.ts'
import type { Role } from '#shared/policies/role.ts'

/** One person, one role per site: the pair is the key. */
@Entity('membership')
@Index('ix_membership_user', ['userId'])
export class MembershipEntity extends Timestamped {
  @PrimaryIdColumn('site_id')
  @ForeignKey('SiteEntity', { name: 'fk_membership_site' })
  siteId!: string

  @PrimaryIdColumn('user_id')
  @ForeignKey('UserEntity', { name: 'fk_membership_user' })
  userId!: string

  @WordColumn('role')
  role!: Role
}
