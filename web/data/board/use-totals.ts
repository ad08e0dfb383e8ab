import { useQuery } from '@tanstack/react-query'
import type { GroundTotals } from '#shared/ground-codec.ts'
import { boardQueries } from '#web/data/board/queries.ts'
import { useGround } from '#web/lib/use-ground.ts'

/** The newest totals of a site, from the board or from a later patch; undefined until the first were read. */
export function useTotals(siteId: string): GroundTotals | undefined {
  const { data: board } = useQuery(boardQueries.detail(siteId))
  const { totals, totalsRevision } = useGround(siteId)
  return totals !== null && totalsRevision >= (board?.revision ?? 0) ? totals : board?.totals
}
