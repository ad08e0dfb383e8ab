import { MembershipEntity } from '#api/entities/membership.entity.ts'
import { UserEntity } from '#api/entities/user.entity.ts'
import { conflict, forbidden, invalid, notFound } from '#api/errors.ts'
import type { SiteWrite } from '#api/features/site-head/site-write.ts'
import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { MemberInput } from '#shared/schemas/member.ts'

/** Roles that may change the people of a site at all; which of them is checked case by case. */
export function managesPeople(role: Role): boolean {
  return can(role, 'people.manage') || can(role, 'people.manage-owner-reps')
}

/**
 * Gives a person who has an account a role on the site, or another role. The lead manages people; the first owner's
 * representative is the lead's to name, the following ones, and any change of one, only an owner's representative's.
 * A site keeps at least one QC lead.
 */
export async function setMember(write: SiteWrite, input: MemberInput): Promise<{ userId: string; role: Role }> {
  const { manager, siteId, now } = write
  const user = await manager.findOneBy(UserEntity, { email: input.email.toLowerCase() })
  if (!user) {
    const message = 'Nobody has an account under this e-mail address. Check it, or ask the person to make an account first.'
    throw invalid(message, { issues: [{ path: 'body.email', message }] })
  }
  const membership = await manager.findOneBy(MembershipEntity, { siteId, userId: user.id })
  const before = membership?.role ?? null
  const { role } = input
  if (before === role) return { userId: user.id, role }
  await authorizeChange(write, before, role)
  if (before === 'qc-lead') await keepOneLead(write)

  if (membership) await manager.update(MembershipEntity, { siteId, userId: user.id }, { role, updatedAt: now })
  else await manager.insert(MembershipEntity, { siteId, userId: user.id, role, createdAt: now, updatedAt: now })

  const subject = { type: 'member', id: user.id }
  if (before === null) write.record('member.added', subject, { name: user.name, role })
  else write.record('member.role-changed', subject, { name: user.name, from: before, to: role })
  write.changed('member', user.id)
  write.memberChanged(user.id, role)
  return { userId: user.id, role }
}

/** Takes a person's membership away; what the person recorded stays. */
export async function removeMember(write: SiteWrite, userId: string): Promise<void> {
  const { manager, siteId } = write
  const membership = await manager.findOneBy(MembershipEntity, { siteId, userId })
  if (!membership) throw notFound()
  await authorizeChange(write, membership.role, null)
  if (membership.role === 'qc-lead') await keepOneLead(write)
  const { name } = await manager.findOneByOrFail(UserEntity, { id: userId })
  await manager.delete(MembershipEntity, { siteId, userId })
  write.record('member.removed', { type: 'member', id: userId }, { name, role: membership.role })
  write.changed('member', userId)
  write.memberChanged(userId, null)
}

async function authorizeChange(write: SiteWrite, before: Role | null, after: Role | null): Promise<void> {
  const concernsOwner = before === 'owner-rep' || after === 'owner-rep'
  const concernsOthers = (before !== null && before !== 'owner-rep') || (after !== null && after !== 'owner-rep')
  if (concernsOthers && !can(write.role, 'people.manage')) throw forbidden('Only a QC lead of this site may do that. Nothing was changed.')
  if (!concernsOwner || can(write.role, 'people.manage-owner-reps')) return
  const ownerReps = await countOf(write, 'owner-rep')
  if (ownerReps > 0 || !can(write.role, 'people.manage')) {
    throw forbidden('This site has an owner’s representative; only they may name, change or remove one. Nothing was changed.')
  }
}

async function keepOneLead(write: SiteWrite): Promise<void> {
  if ((await countOf(write, 'qc-lead')) > 1) return
  throw conflict('A site keeps at least one QC lead. Nothing was changed; make somebody else QC lead first.')
}

function countOf({ manager, siteId }: SiteWrite, role: Role): Promise<number> {
  return manager.countBy(MembershipEntity, { siteId, role })
}
