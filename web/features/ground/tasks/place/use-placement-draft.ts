import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { WHOLE_CELL } from '#shared/domain/placement-volume.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import { materialQueries } from '#web/data/material/queries.ts'
import { placementQueries } from '#web/data/placement/queries.ts'
import { useSiteClock } from '#web/data/site/use-site-clock.ts'
import { useGroundView } from '#web/features/ground/plan/ground-view.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { readPlacement, type PlacementDraft } from './placement-draft.ts'

const NONE: readonly never[] = []

/** The draft of a placement. What is usual on the site (material, load, machine) stands in it until it is changed. */
export function usePlacementDraft(surface: GroundSheet, lift: number | null) {
  const { site, units } = useSite()
  const { plan, chosen } = useGroundView()
  const materials = useQuery(materialQueries.list(site.id)).data ?? NONE
  const last = useQuery(placementQueries.list(site.id)).data?.find((placement) => placement.voided === null)
  const [id] = useState(() => crypto.randomUUID())
  const now = useSiteClock(site.id)
  const [openedAt] = useState(() => now())
  const [changes, setChanges] = useState<Partial<PlacementDraft>>({})
  const draft: PlacementDraft = {
    lift,
    quarters: WHOLE_CELL,
    materialId: materials.find((material) => material.id === last?.materialId)?.id ?? materials[0]?.id ?? '',
    happenedAt: units.field.instant(openedAt),
    loads: '',
    loadVolume: last !== undefined && last.loadVolumeCm3 > 0 ? units.field.volumeCm3(last.loadVolumeCm3) : '',
    looseThickness: '',
    machine: last?.machine ?? '',
    passes: '',
    remarks: '',
    ...changes,
  }
  const reading = readPlacement({ draft, cells: chosen, plan, surface, materials, units })
  const change = (next: Partial<PlacementDraft>): void => setChanges((before) => ({ ...before, ...next }))
  return { id, draft, change, reading, materials }
}

export type PlacementForm = ReturnType<typeof usePlacementDraft>
