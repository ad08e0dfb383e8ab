import { useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query'
import { useEffect, useRef } from 'react'
import { useLocation, useNavigate } from 'react-router-dom'
import { toast } from 'sonner'
import type { ChangedResource, MembershipChangedEvent, ServerEvent } from '#shared/realtime.ts'
import { paths } from '#web/app/paths.ts'
import { attachmentChanged } from '#web/data/attachment/cache-effects.ts'
import { groundChanged } from '#web/data/board/cache-effects.ts'
import { calibrationChanged } from '#web/data/calibration/cache-effects.ts'
import { curveChanged } from '#web/data/curve/cache-effects.ts'
import { dispositionChanged } from '#web/data/disposition/cache-effects.ts'
import { gaugeChanged } from '#web/data/gauge/cache-effects.ts'
import { inspectionChanged } from '#web/data/inspection/cache-effects.ts'
import { lotChanged } from '#web/data/lot/cache-effects.ts'
import { materialChanged } from '#web/data/material/cache-effects.ts'
import { memberChanged } from '#web/data/member/cache-effects.ts'
import { onePointChanged } from '#web/data/one-point/cache-effects.ts'
import { orderChanged } from '#web/data/order/cache-effects.ts'
import { placementChanged } from '#web/data/placement/cache-effects.ts'
import type { Change } from '#web/data/refresh.ts'
import { releaseChanged } from '#web/data/release/cache-effects.ts'
import { membershipChanged, membershipLost, siteChanged } from '#web/data/site/cache-effects.ts'
import { isSiteCells, siteQueries } from '#web/data/site/queries.ts'
import { stakeChanged } from '#web/data/stake/cache-effects.ts'
import { testChanged } from '#web/data/test/cache-effects.ts'
import { viewChanged } from '#web/data/view/cache-effects.ts'
import { sessionQueries } from '#web/features/session/queries.ts'
import { live } from '#web/lib/live/live-client.ts'
import { forgetGround } from '#web/lib/use-ground.ts'

const EFFECTS: Readonly<Record<ChangedResource, (client: QueryClient, siteId: string, change: Change) => void>> = {
  placement: placementChanged,
  test: testChanged,
  lot: lotChanged,
  stake: stakeChanged,
  order: orderChanged,
  release: releaseChanged,
  curve: curveChanged,
  'one-point': onePointChanged,
  material: materialChanged,
  calibration: calibrationChanged,
  gauge: gaugeChanged,
  zone: siteChanged,
  member: memberChanged,
  inspection: inspectionChanged,
  disposition: dispositionChanged,
  attachment: attachmentChanged,
  view: viewChanged,
  site: siteChanged,
}

/** What the cache does when the server tells of something. The ids come; the rows are read again. */
export function hearEvent(client: QueryClient, event: ServerEvent, onMembership: (event: MembershipChangedEvent) => void): void {
  switch (event.type) {
    case 'site:changed':
      EFFECTS[event.resource](client, event.siteId, event)
      break
    case 'ground:patch':
      groundChanged(client, event.siteId, event)
      break
    case 'ground:head':
      // the Ground's own store compares it with what it has
      break
    case 'membership:changed':
      onMembership(event)
      break
    default:
      event satisfies never
  }
}

/** After a loss everything on screen is read again, but for the Ground, which catches up by its patches. */
function readAllAgain(client: QueryClient): void {
  void client.invalidateQueries({ predicate: ({ queryKey }) => !isSiteCells(queryKey) })
}

/** Keeps the cache current while somebody is signed in. Mounted once. */
export function useRealtime(): void {
  const client = useQueryClient()
  const navigate = useNavigate()
  const { pathname } = useLocation()
  const place = useRef(pathname)
  useEffect(() => {
    place.current = pathname
  }, [pathname])

  const { data: me } = useQuery({ ...sessionQueries.me(), enabled: false })
  const userId = me?.user?.id
  useEffect(() => {
    if (userId === undefined) return
    const handleMembership = ({ siteId, role }: MembershipChangedEvent): void => {
      if (role !== null) {
        membershipChanged(client, siteId)
        return
      }
      const site = client.getQueryData(siteQueries.detail(siteId).queryKey)
      if (place.current.startsWith(`${paths.site(siteId)}/`)) {
        void navigate(paths.home(), { replace: true })
        toast(`You no longer belong to ${site?.name ?? 'that site'}.`)
      }
      forgetGround(siteId)
      membershipLost(client, siteId)
    }
    const stops = [live.listen((event) => hearEvent(client, event, handleMembership)), live.onReconnect(() => readAllAgain(client))]
    live.connect()
    return () => {
      for (const stop of stops) stop()
      live.disconnect()
      forgetGround()
    }
  }, [client, navigate, userId])
}
