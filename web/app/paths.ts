/** Addresses of the pages: patterns for the router, functions for links. */
export const PATTERNS = {
  home: '/',
  site: '/sites/:siteId',
  signIn: '/sign-in',
  ground: '/sites/:siteId/ground',
  frequency: '/sites/:siteId/frequency',
  tests: '/sites/:siteId/tests',
  newTest: '/sites/:siteId/tests/new',
  importTests: '/sites/:siteId/tests/import',
  test: '/sites/:siteId/tests/:testId',
  rework: '/sites/:siteId/rework',
  reworkOrder: '/sites/:siteId/rework/:orderId',
  lab: '/sites/:siteId/lab',
  newCurve: '/sites/:siteId/lab/curves/new',
  correctCurve: '/sites/:siteId/lab/curves/:curveId/correct',
  onePoint: '/sites/:siteId/lab/one-point',
  rejudge: '/sites/:siteId/lab/curves/:curveId/rejudge',
  gauges: '/sites/:siteId/lab/gauges',
  calibrations: '/sites/:siteId/lab/calibrations',
  parts: '/parts',
} as const

const site = (siteId: string): string => `/sites/${encodeURIComponent(siteId)}`

export const paths = {
  home: () => PATTERNS.home,
  /** @param next where to go on to afterwards; an address of this site. */
  signIn: (next?: string) => (next === undefined || next === '/' ? PATTERNS.signIn : `${PATTERNS.signIn}?next=${encodeURIComponent(next)}`),
  /** Where every address of a site begins; by itself it leads to the Ground. */
  site,
  ground: (siteId: string) => `${site(siteId)}/ground`,
  frequency: (siteId: string) => `${site(siteId)}/frequency`,
  tests: (siteId: string) => `${site(siteId)}/tests`,
  newTest: (siteId: string) => `${site(siteId)}/tests/new`,
  importTests: (siteId: string) => `${site(siteId)}/tests/import`,
  test: (siteId: string, testId: string) => `${site(siteId)}/tests/${encodeURIComponent(testId)}`,
  rework: (siteId: string) => `${site(siteId)}/rework`,
  reworkOrder: (siteId: string, orderId: string) => `${site(siteId)}/rework/${encodeURIComponent(orderId)}`,
  lab: (siteId: string) => `${site(siteId)}/lab`,
  curve: (siteId: string, curveId: string) => `${site(siteId)}/lab?curve=${encodeURIComponent(curveId)}`,
  newCurve: (siteId: string) => `${site(siteId)}/lab/curves/new`,
  /** a draft put right, as a whole */
  correctCurve: (siteId: string, curveId: string) => `${site(siteId)}/lab/curves/${encodeURIComponent(curveId)}/correct`,
  onePoint: (siteId: string) => `${site(siteId)}/lab/one-point`,
  /** superseding a curve, and judging its tests again */
  rejudge: (siteId: string, curveId: string) => `${site(siteId)}/lab/curves/${encodeURIComponent(curveId)}/rejudge`,
  gauges: (siteId: string) => `${site(siteId)}/lab/gauges`,
  calibrations: (siteId: string) => `${site(siteId)}/lab/calibrations`,
  parts: () => PATTERNS.parts,
} as const
