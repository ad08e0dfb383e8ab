import { forbidden } from '#api/errors.ts'
import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { Purpose } from '#shared/schemas/field-test.ts'

/** Roles that may record a test of some purpose; which one is checked by the purpose. */
export function recordsTests(role: Role): boolean {
  return can(role, 'test.record-qc') || can(role, 'test.record-qa')
}

/** Roles that may void a test of some purpose. */
export function voidsTests(role: Role): boolean {
  return can(role, 'test.void-qc') || can(role, 'test.void-qa')
}

/** The contractor's people record required and judgement tests, the owner's verification; a referee's either. */
export function authorizeRecording(role: Role, purpose: Purpose): void {
  const allowed = purpose === 'referee' ? recordsTests(role) : can(role, purpose === 'verification' ? 'test.record-qa' : 'test.record-qc')
  if (allowed) return
  const whose = purpose === 'verification' ? 'the owner’s representative' : 'quality control'
  throw forbidden(`A ${purpose} test is recorded by ${whose}. Nothing was saved; what you entered was kept.`)
}

/** The lead voids the contractor's tests; the owner's representative voids verification and referee tests. */
export function authorizeVoiding(role: Role, purpose: Purpose): void {
  const owners = purpose === 'verification' || purpose === 'referee'
  if (can(role, owners ? 'test.void-qa' : 'test.void-qc')) return
  throw forbidden(`A ${purpose} test is voided by ${owners ? 'the owner’s representative' : 'a QC lead'}. Nothing was changed.`)
}
