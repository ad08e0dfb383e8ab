import type { Role } from '#shared/policies/role.ts'

const EVERYONE: readonly Role[] = ['qc-lead', 'technician', 'superintendent', 'owner-rep', 'operator']
const OFFICE: readonly Role[] = ['qc-lead', 'technician', 'superintendent', 'owner-rep']
const QC: readonly Role[] = ['qc-lead', 'technician']
const LEAD: readonly Role[] = ['qc-lead']
const OWNER: readonly Role[] = ['owner-rep']
const SUPERINTENDENT: readonly Role[] = ['superintendent']

/** Who may do what on a site: the product's table, one line for each act. */
const POLICY = {
  /** the Ground, and for an operator the rework orders of his own */
  'site.see': EVERYONE,
  /** lots, tests, curves, placements, events: everything beside the Ground */
  'registers.see': OFFICE,
  'site.setup': LEAD,
  'people.manage': LEAD,
  /** after the first one, which the lead names, only owner's representatives name others */
  'people.manage-owner-reps': OWNER,
  'placement.record': ['qc-lead', 'technician', 'superintendent'],
  'placement.void': LEAD,
  'inspection.record': QC,
  'inspection.void': LEAD,
  'test.record-qc': QC,
  'test.record-qa': OWNER,
  'test.void-qc': LEAD,
  'test.void-qa': OWNER,
  'gauge.record': QC,
  /** bulk density of sand, sand in a cone, volume of a cylinder: what field sheets are reduced with */
  'calibration.record': QC,
  'material.record': QC,
  'curve.record': QC,
  'curve.approve': LEAD,
  'curve.supersede': LEAD,
  /** judge an old test again by another curve or specification, both verdicts kept */
  'test.rejudge': LEAD,
  /** the same of a verification or referee test */
  'test.rejudge-qa': OWNER,
  'one-point.record': QC,
  /** photos and documents; on a verification test only the owner's, on all else only the contractor's */
  'file.attach': ['qc-lead', 'technician', 'owner-rep'],
  'file.withdraw': ['qc-lead', 'owner-rep'],
  /** keep views of a register for oneself */
  'view.save': OFFICE,
  /** show a view to everybody who sees the registers */
  'view.share': QC,
  /** change a shared view of somebody else */
  'view.edit-shared': LEAD,
  'stake.draw': QC,
  'lot.edit': LEAD,
  'rework.issue': LEAD,
  'rework.edit': LEAD,
  'rework.assign': ['qc-lead', 'superintendent'],
  /** start an order, report its work done */
  'rework.work': ['qc-lead', 'superintendent', 'operator'],
  'rework.close': LEAD,
  'release.issue': LEAD,
  'release.revoke': LEAD,
  'release.ask': SUPERINTENDENT,
  /** the owner's acceptance at a hold point */
  'release.accept': OWNER,
  'disposition.accept-as-is': OWNER,
  'weather.record': ['qc-lead', 'technician', 'superintendent'],
  'daily.sign': LEAD,
  'daily.countersign': OWNER,
} as const satisfies Record<string, readonly Role[]>

export type Verb = keyof typeof POLICY

export const VERBS = Object.keys(POLICY) as readonly Verb[]

/** True when a person with this role on a site may do the act there. The API enforces it, the client hides by it. */
export function can(role: Role, verb: Verb): boolean {
  const allowed: readonly Role[] = POLICY[verb]
  return allowed.includes(role)
}
