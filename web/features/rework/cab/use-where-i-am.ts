import { useEffect, useState } from 'react'
import { toSite } from '#shared/domain/coordinate-systems.ts'
import { siteToGrid } from '#shared/domain/grid.ts'
import type { GridPoint } from '#shared/domain/site-geometry.ts'
import { useSite } from '#web/lib/site-context.tsx'

export type WhereIAm =
  | { readonly state: 'off' | 'asking' }
  | { readonly state: 'on'; readonly at: GridPoint; readonly accuracyMm: number }
  | { readonly state: 'failed'; readonly words: string }

const DENIED = 'The phone does not give its position to this page. It can be allowed in the browser’s settings.'
const NO_FIX = 'The phone has no position now. Try again in the open.'

/** The phone's position in grid axes, from the moment the person asks for it. Never asked for by itself, never sent. */
export function useWhereIAm(): { readonly where: WhereIAm; readonly show: () => void; readonly hide: () => void } {
  const { site, system } = useSite()
  const [wanted, setWanted] = useState(false)
  const [where, setWhere] = useState<WhereIAm>({ state: 'off' })

  useEffect(() => {
    if (!wanted) return
    const watch = navigator.geolocation.watchPosition(
      ({ coords }) => {
        const at = siteToGrid(site.grid, toSite(system, [coords.longitude, coords.latitude]))
        setWhere({ state: 'on', at, accuracyMm: coords.accuracy * 1000 })
      },
      (error) => {
        setWanted(false)
        setWhere({ state: 'failed', words: error.code === error.PERMISSION_DENIED ? DENIED : NO_FIX })
      },
      { enableHighAccuracy: true, maximumAge: 5_000, timeout: 20_000 },
    )
    return () => navigator.geolocation.clearWatch(watch)
  }, [wanted, site.grid, system])

  return {
    where,
    show: () => {
      if (!('geolocation' in navigator)) {
        setWhere({ state: 'failed', words: NO_FIX })
        return
      }
      setWhere({ state: 'asking' })
      setWanted(true)
    },
    hide: () => {
      setWanted(false)
      setWhere({ state: 'off' })
    },
  }
}
