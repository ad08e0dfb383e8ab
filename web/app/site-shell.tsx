import { useQueryClient } from '@tanstack/react-query'
import { useEffect, type ReactNode } from 'react'
import { ROLE_LABELS } from '#shared/policies/role.ts'
import { Shell } from '#web/app/shell.tsx'
import type { Connection } from '#web/app/shell-live.tsx'
import { siteNav } from '#web/app/site-nav.ts'
import { useShellUser } from '#web/app/use-shell-user.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { groundChanged } from '#web/data/board/cache-effects.ts'
import { useTotals } from '#web/data/board/use-totals.ts'
import { useSiteMoment } from '#web/data/site/use-site-clock.ts'
import type { GroundView } from '#web/lib/ground-store.ts'
import { useSite } from '#web/lib/site-context.tsx'
import type { Units } from '#web/lib/units.ts'
import { useGround } from '#web/lib/use-ground.ts'

type Moments = Pick<GroundView, 'status' | 'asOf' | 'offlineSince'>

function connectionOf({ status, asOf, offlineSince }: Moments, units: Units): Connection {
  if (status === 'offline' && offlineSince !== null) return { state: 'offline', since: units.time(offlineSince) }
  return status === 'live' && asOf !== null ? { state: 'live', asOf: units.timeWithSeconds(asOf) } : { state: 'catching-up' }
}

function OfflineBanner({ since, asOf }: { since: string; asOf: string | null }) {
  return (
    <Banner tone="off" title={`No signal since ${since}.`}>
      {asOf === null ? 'The sheet was not read yet.' : `The sheet is as of ${asOf}.`} What you have not saved stays on this page; it can be saved once the signal is back.
    </Banner>
  )
}

/** The shell of the open site: its sheets by role, and whether what it shows is what stands. */
export function SiteShell({ children }: { children: ReactNode }) {
  const { site, role, units } = useSite()
  const { name, signOut } = useShellUser()
  const client = useQueryClient()
  const ground = useGround(site.id)
  const totals = useTotals(site.id)
  const siteMoment = useSiteMoment(site.id)
  const { revision, status } = ground
  // the store counts by this device's clock; people read the site's
  const onSite = (moment: number | null): number | null => (moment === null ? null : siteMoment(moment))
  const asOf = onSite(ground.asOf)
  const offlineSince = onSite(ground.offlineSince)

  useEffect(() => {
    // patches that were fetched to catch up come without a notice
    if (revision > 0) groundChanged(client, site.id, { revision })
  }, [client, site.id, revision])

  const area = units.siteArea(site.areaMm2)
  return (
    <Shell
      site={{ name: site.name, subtitle: site.subtitle === '' ? area : `${site.subtitle} · ${area}` }}
      nav={siteNav(site.id, role, totals?.openOrders ?? 0)}
      connection={connectionOf({ status, asOf, offlineSince }, units)}
      user={{ name, role: ROLE_LABELS[role] }}
      onSignOut={signOut}
      banner={offlineSince !== null && <OfflineBanner since={units.time(offlineSince)} asOf={asOf === null ? null : units.timeWithSeconds(asOf)} />}
    >
      {children}
    </Shell>
  )
}
