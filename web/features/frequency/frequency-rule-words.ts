import type { Zone } from '#shared/schemas/site.ts'
import type { Units } from '#web/lib/units.ts'

/** The volume one test speaks for, where all these zones ask the same: "500 cy"; null where they differ or set none. */
export function oneTestVolume(zones: readonly Zone[], units: Units): string | null {
  const volumes = new Set(zones.flatMap((zone) => zone.specification.frequency.flatMap((rule) => (rule.kind === 'volume' ? [rule.perCm3] : []))))
  const [only] = volumes
  return volumes.size === 1 && only !== undefined ? units.volume(only) : null
}
