import type { ComponentType } from 'react'
import type { Verb } from '#shared/policies/policy.ts'
import { PATTERNS } from '#web/app/paths.ts'

export type Page = {
  readonly path: string
  /** The tab's title until the page knows a better one (usePageTitle). */
  readonly title: string
  /**
   * Who may come here: `anyone`, only somebody signed in (others are sent to sign in and come back), or only a member
   * of the site in its address; those find useSite() and the site's shell around them.
   */
  readonly open: 'anyone' | 'signed-in' | 'site'
  /** For a page of a site: the act one must be allowed to come here; others are told so, and their menu leaves it out. */
  readonly verb?: Verb
  /** The page's component, fetched when it is first needed. */
  readonly load: () => Promise<ComponentType>
}

/** Every page. A new one is one entry here and one address in paths.ts. */
export const PAGES: readonly Page[] = [
  {
    path: PATTERNS.home,
    title: 'My sites',
    open: 'signed-in',
    load: async () => (await import('#web/features/sites/sites-page.tsx')).SitesPage,
  },
  {
    path: PATTERNS.signIn,
    title: 'Sign in',
    open: 'anyone',
    load: async () => (await import('#web/features/session/sign-in-page.tsx')).SignInPage,
  },
  {
    path: PATTERNS.ground,
    title: 'Ground',
    open: 'site',
    verb: 'site.see',
    load: async () => (await import('#web/features/ground/ground-page.tsx')).GroundPage,
  },
  {
    path: PATTERNS.frequency,
    title: 'Frequency',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/frequency/frequency-page.tsx')).FrequencyPage,
  },
  {
    path: PATTERNS.tests,
    title: 'Results',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/tests/results-page.tsx')).ResultsPage,
  },
  {
    path: PATTERNS.newTest,
    title: 'Record a field test',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/tests/new-test-page.tsx')).NewTestPage,
  },
  {
    path: PATTERNS.importTests,
    title: 'Import results',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/tests/exchange/import-page.tsx')).ImportPage,
  },
  {
    path: PATTERNS.test,
    title: 'Test',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/tests/test-page.tsx')).TestPage,
  },
  {
    path: PATTERNS.rework,
    title: 'Rework',
    open: 'site',
    verb: 'site.see',
    load: async () => (await import('#web/features/rework/rework-page.tsx')).ReworkPage,
  },
  {
    path: PATTERNS.reworkOrder,
    title: 'Rework order',
    open: 'site',
    verb: 'site.see',
    load: async () => (await import('#web/features/rework/order-page.tsx')).ReworkOrderPage,
  },
  {
    path: PATTERNS.lab,
    title: 'Lab',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/lab/curves/curves-page.tsx')).CurvesPage,
  },
  {
    path: PATTERNS.newCurve,
    title: 'New reference curve',
    open: 'site',
    verb: 'curve.record',
    load: async () => (await import('#web/features/lab/curves/curve-entry-page.tsx')).CurveEntryPage,
  },
  {
    path: PATTERNS.correctCurve,
    title: 'Correct a curve',
    open: 'site',
    verb: 'curve.record',
    load: async () => (await import('#web/features/lab/curves/curve-entry-page.tsx')).CurveEntryPage,
  },
  {
    path: PATTERNS.onePoint,
    title: 'One-point checks',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/lab/one-point/one-point-page.tsx')).OnePointPage,
  },
  {
    path: PATTERNS.rejudge,
    title: 'Judge again',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/lab/rejudge/rejudge-page.tsx')).RejudgePage,
  },
  {
    path: PATTERNS.gauges,
    title: 'Gauges',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/lab/gauges/gauges-page.tsx')).GaugesPage,
  },
  {
    path: PATTERNS.calibrations,
    title: 'Calibrations',
    open: 'site',
    verb: 'registers.see',
    load: async () => (await import('#web/features/lab/calibrations/calibrations-page.tsx')).CalibrationsPage,
  },
  {
    path: PATTERNS.parts,
    title: 'Parts',
    open: 'anyone',
    load: async () => (await import('#web/features/gallery/gallery-page.tsx')).GalleryPage,
  },
]
