import { forbidden } from '#api/errors.ts'
import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'

/** Roles that may judge a test of some purpose again; which one is checked by the purpose. */
export function rejudgesTests(role: Role): boolean {
  return can(role, 'test.rejudge') || can(role, 'test.rejudge-qa')
}

/** As voiding: the lead judges the contractor's tests again, the owner's representative verification and referee tests. */
export function mayRejudge(role: Role, purpose: Purpose): boolean {
  return can(role, purpose === 'verification' || purpose === 'referee' ? 'test.rejudge-qa' : 'test.rejudge')
}

/** Refuses the whole when one of the tests is not this role's to judge again. */
export function authorizeRejudging(role: Role, tests: readonly { readonly number: string; readonly purpose: Purpose }[]): void {
  const foreign = tests.find((test) => !mayRejudge(role, test.purpose))
  if (!foreign) return
  const owners = foreign.purpose === 'verification' || foreign.purpose === 'referee'
  throw forbidden(`${foreign.number} is a ${foreign.purpose} test; ${owners ? 'the owner’s representative' : 'a QC lead'} judges it again. Leave it out; nothing was changed.`)
}
