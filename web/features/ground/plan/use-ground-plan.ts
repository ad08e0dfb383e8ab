import { useMemo } from 'react'
import { useSite } from '#web/lib/site-context.tsx'
import { buildGroundPlan, type GroundPlan } from './ground-plan.ts'

export function useGroundPlan(): GroundPlan {
  const { site, cells } = useSite()
  return useMemo(() => buildGroundPlan(site, cells), [site, cells])
}
