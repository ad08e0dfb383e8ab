/** The five roles a person can have on a site; one person has one role on one site. */
export const ROLES = ['qc-lead', 'technician', 'superintendent', 'owner-rep', 'operator'] as const

export type Role = (typeof ROLES)[number]

export const ROLE_LABELS: Readonly<Record<Role, string>> = {
  'qc-lead': 'QC lead',
  technician: 'Technician',
  superintendent: 'Superintendent',
  'owner-rep': 'Owner’s representative',
  operator: 'Equipment operator',
}

/** True when a text (from a form or the database) is one of the roles. */
export function isRole(text: string): text is Role {
  return (ROLES as readonly string[]).includes(text)
}
