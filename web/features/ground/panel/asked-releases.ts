import type { Release } from '#shared/schemas/release.ts'
import type { NotYetGroup } from '#web/features/ground/plan/ground-words.ts'

/** The release that was asked for and holds cells of a group. */
export function askedFor(releases: readonly Release[], group: NotYetGroup): Release | undefined {
  const cells = new Set(group.cells)
  return releases.find(
    (release) => release.status === 'asked' && release.zoneId === group.zoneId && release.lift === group.lift && release.cells.some(({ cell }) => cells.has(cell)),
  )
}

export function releasesIn(releases: readonly Release[], status: Release['status']): Release[] {
  return releases.filter((release) => release.status === status)
}
