import type { EntityManager } from 'typeorm'
import type { GroundPatch } from '#shared/ground-codec.ts'
import type { Role } from '#shared/policies/role.ts'
import type { ChangedResource } from '#shared/realtime.ts'

/** The things a site numbers in the order they are committed. */
export type RunningNumber = 'test' | 'order' | 'lot' | 'stake' | 'release' | 'placement'

export interface Actor {
  readonly id: string
  readonly name: string
}

/** One consistent look at a site by one of its people. */
export interface SiteRead {
  readonly manager: EntityManager
  readonly siteId: string
  readonly user: Actor
  readonly role: Role
  readonly now: Date
  /** the revision that is being looked at */
  readonly revision: number
}

/** One change of a site by one of its people, inside its transaction, the site's head row locked. */
export interface SiteWrite extends SiteRead {
  /** the revision this change makes */
  readonly revision: number
  /** the next running number of its kind; given for good only when the change commits */
  take(kind: RunningNumber): number
  /** appends to the audit trail; happenedAt is now unless the act was earlier */
  record(verb: string, subject: { type: string; id: string }, payload: object, happenedAt?: Date): void
  /** what the change does to the Ground; at most once in a write */
  patch(patch: Omit<GroundPatch, 'revision' | 'base'>): void
  /** tells open boards, after the commit, to fetch this again */
  changed(resource: ChangedResource, id: string): void
  /** tells one person, after the commit, of a change of the membership (null: taken away) */
  memberChanged(userId: string, role: Role | null): void
}
