import { useQuery } from '@tanstack/react-query'
import { boardQueries } from '#web/data/board/queries.ts'
import { lotQueries } from '#web/data/lot/queries.ts'
import { materialQueries } from '#web/data/material/queries.ts'
import { orderQueries } from '#web/data/order/queries.ts'
import { placementQueries } from '#web/data/placement/queries.ts'
import { releaseQueries } from '#web/data/release/queries.ts'
import { stakeQueries } from '#web/data/stake/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'

/** Everything panel, rail and title block say, of one revision. */
export function useBoard() {
  return useQuery(boardQueries.detail(useSite().site.id))
}

const NONE: readonly never[] = []

export function useOrders() {
  return useQuery(orderQueries.list(useSite().site.id)).data ?? NONE
}

export function useStakes() {
  return useQuery(stakeQueries.list(useSite().site.id)).data ?? NONE
}

/** The registers are closed to operators: they are not asked for. */
function useRegisters(): boolean {
  return useSite().can('registers.see')
}

export function useLots() {
  return useQuery({ ...lotQueries.list(useSite().site.id), enabled: useRegisters() }).data ?? NONE
}

export function useReleases() {
  return useQuery({ ...releaseQueries.list(useSite().site.id), enabled: useRegisters() }).data ?? NONE
}

export function usePlacements() {
  return useQuery({ ...placementQueries.list(useSite().site.id), enabled: useRegisters() }).data ?? NONE
}

export function useMaterials() {
  return useQuery({ ...materialQueries.list(useSite().site.id), enabled: useRegisters() }).data ?? NONE
}
