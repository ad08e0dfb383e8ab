import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'

/** Whose record a photo or document belongs to: the contractor's, the owner's (a verification test), or either's (a referee's). */
export type FileSide = 'contractor' | 'owner' | 'either'

/** The side of a test by its purpose; everything else of a site is the contractor's. */
export function fileSideOfTest(purpose: string): FileSide {
  if (purpose === 'verification') return 'owner'
  return purpose === 'referee' ? 'either' : 'contractor'
}

/** True when the role may add a photo or document to a record of this side, or withdraw one from it. */
export function canHandleFile(role: Role, verb: 'file.attach' | 'file.withdraw', side: FileSide): boolean {
  if (!can(role, verb) || side === 'either') return can(role, verb)
  return (role === 'owner-rep') === (side === 'owner')
}

/** Withdrawn files are shown, with the reason, to the lead alone. */
export function seesWithdrawnFiles(role: Role): boolean {
  return role === 'qc-lead'
}
