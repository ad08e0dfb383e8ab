import { PAGES } from '#web/app/pages.ts'
import { PATTERNS, paths } from '#web/app/paths.ts'
import type { NavItem } from '#web/app/shell-nav.tsx'
import { can, type Verb } from '#shared/policies/policy.ts'
import type { Role } from '#shared/policies/role.ts'

type Sheet = { readonly label: string; readonly pattern: string; readonly verb: Verb; readonly to: (siteId: string) => string }

const SHEETS: readonly Sheet[] = [
  { label: 'Ground', pattern: PATTERNS.ground, verb: 'site.see', to: paths.ground },
  { label: 'Frequency', pattern: PATTERNS.frequency, verb: 'registers.see', to: paths.frequency },
  { label: 'Results', pattern: PATTERNS.tests, verb: 'registers.see', to: paths.tests },
  { label: 'Rework', pattern: PATTERNS.rework, verb: 'site.see', to: paths.rework },
  { label: 'Lab', pattern: PATTERNS.lab, verb: 'registers.see', to: paths.lab },
]

/** The sheets of a site that are there and that the role may open. */
export function siteNav(siteId: string, role: Role, openOrders: number, patterns: readonly string[] = PAGES.map(({ path }) => path)): NavItem[] {
  return SHEETS.filter(({ pattern, verb }) => patterns.includes(pattern) && can(role, verb)).map(({ label, pattern, to }) => ({
    label,
    to: to(siteId),
    ...(pattern === PATTERNS.rework ? { count: openOrders, countOf: openOrders === 1 ? 'open order' : 'open orders' } : {}),
  }))
}
