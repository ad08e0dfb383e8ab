import { EventEntity } from '#api/entities/event.entity.ts'
import { groundEntities } from '#api/entities/ground-entities.ts'
import { MembershipEntity } from '#api/entities/membership.entity.ts'
import { PatchEntity } from '#api/entities/patch.entity.ts'
import { RequestRecordEntity } from '#api/entities/request-record.entity.ts'
import { SessionEntity } from '#api/entities/session.entity.ts'
import { SiteHeadEntity } from '#api/entities/site-head.entity.ts'
import { SiteEntity } from '#api/entities/site.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'

/** Every table's class; add one line for a new table. */
export const entities = [
  UserEntity,
  SessionEntity,
  SiteEntity,
  MembershipEntity,
  SiteHeadEntity,
  EventEntity,
  PatchEntity,
  RequestRecordEntity,
  ...groundEntities,
]
