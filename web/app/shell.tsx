import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { LiveMark, type Connection } from '#web/app/shell-live.tsx'
import { ShellNav, type NavItem } from '#web/app/shell-nav.tsx'
import { UserMenu, type ShellUser } from '#web/app/shell-user-menu.tsx'
import { paths } from '#web/app/paths.ts'
import { Wordmark } from '#web/components/ui/wordmark.tsx'

type ShellProps = {
  /** Left out on pages that belong to no site. */
  site?: { readonly name: string; readonly subtitle: string } | undefined
  /** Only what works for this person. */
  nav: readonly NavItem[]
  /** Left out where nothing live is shown. */
  connection?: Connection | undefined
  user: ShellUser
  onSignOut: () => void
  /** Notices over the page: offline, read-only. */
  banner?: ReactNode
  children: ReactNode
}

/** The sheet's head with everything beneath it: the page fills what is left of the window. */
export function Shell({ site, nav, connection, user, onSignOut, banner, children }: ShellProps) {
  return (
    <div className="flex h-dvh flex-col">
      <a
        href="#main"
        className="absolute top-2 left-2 z-50 -translate-y-24 bg-ink px-4 pt-3 pb-[10px] font-semibold text-raised focus:translate-y-0"
      >
        Skip to the page
      </a>
      <header className="flex h-14 shrink-0 items-center gap-x-3 border-b-2 border-ink bg-raised px-3 sm:gap-x-[26px] sm:px-5">
        <Link to={paths.home()} aria-label="Hardpan, to my sites" className="flex no-underline">
          <Wordmark className="max-[480px]:[&>span]:sr-only" />
        </Link>
        {site !== undefined && (
          <div className="min-w-0 border-l border-rule-2 pl-3 leading-[1.15] sm:pl-[22px]">
            <b className="block truncate font-bold">{site.name}</b>
            <span className="block truncate text-[12px] text-ink-2">{site.subtitle}</span>
          </div>
        )}
        <ShellNav items={nav} />
        <div className="ml-auto flex items-center gap-x-3 sm:gap-x-[26px]">
          {connection !== undefined && <LiveMark connection={connection} />}
          <UserMenu user={user} nav={nav} onSignOut={onSignOut} />
        </div>
      </header>
      {banner}
      <main id="main" tabIndex={-1} className="relative flex min-h-0 flex-1 flex-col outline-none">
        {children}
      </main>
    </div>
  )
}
