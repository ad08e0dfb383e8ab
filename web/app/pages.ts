import type { ComponentType } from 'react'
import { PATTERNS } from '#web/app/paths.ts'

export type Page = {
  readonly path: string
  /** The tab's title until the page knows a better one (usePageTitle). */
  readonly title: string
  /** Who may come here: `anyone`, or only somebody signed in (others are sent to sign in and come back). */
  readonly open: 'anyone' | 'signed-in'
  /** The page's component, fetched when it is first needed. */
  readonly load: () => Promise<ComponentType>
}

/** Every page. A new one is one entry here and one address in paths.ts. */
export const PAGES: readonly Page[] = [
  {
    path: PATTERNS.signIn,
    title: 'Sign in',
    open: 'anyone',
    load: async () => (await import('#web/features/session/sign-in-page.tsx')).SignInPage,
  },
  {
    path: PATTERNS.parts,
    title: 'Parts',
    open: 'anyone',
    load: async () => (await import('#web/features/gallery/gallery-page.tsx')).GalleryPage,
  },
]
