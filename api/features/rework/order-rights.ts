import { forbidden } from '#api/errors.ts'
import { can } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'
import type { OrderStepInput } from '#shared/schemas/rework.ts'

/** Roles that may take some step of an order; which one is checked by the step. */
export function stepsOrders(role: Role): boolean {
  return can(role, 'rework.work') || can(role, 'rework.assign')
}

export function authorizeStep(role: Role, kind: OrderStepInput['kind']): void {
  if (!can(role, kind === 'assigned' ? 'rework.assign' : 'rework.work')) throw forbidden()
}
