import { useQuery } from '@tanstack/react-query'
import type { TestFilter } from '#shared/schemas/test-register.ts'
import { curveQueries } from '#web/data/curve/queries.ts'
import { lotQueries } from '#web/data/lot/queries.ts'
import { materialQueries } from '#web/data/material/queries.ts'
import { testQueries } from '#web/data/test/queries.ts'
import { useSite } from '#web/lib/site-context.tsx'
import type { FilterNames } from './filter-words.ts'

const dayText = new Intl.DateTimeFormat('en-US', { month: 'short', day: 'numeric', year: 'numeric', timeZone: 'UTC' })

/** The names behind a filter's ids; each list is read only where the filter tells one of it. */
export function useFilterNames({ lotId, materialId, curveId, technicianId }: TestFilter): FilterNames {
  const { site, label } = useSite()
  const lots = useQuery({ ...lotQueries.list(site.id), enabled: lotId !== undefined }).data
  const materials = useQuery({ ...materialQueries.list(site.id), enabled: materialId !== undefined }).data
  const curves = useQuery({ ...curveQueries.list(site.id), enabled: curveId !== undefined }).data
  const people = useQuery({ ...testQueries.recorders(site.id), enabled: technicianId !== undefined }).data
  return {
    lot: (id) => lots?.find((lot) => lot.id === id)?.name,
    material: (id) => materials?.find((material) => material.id === id)?.name,
    curve: (id) => curves?.find((curve) => curve.id === id)?.code,
    person: (id) => people?.find((person) => person.id === id)?.name,
    cell: label,
    day: (day) => dayText.format(new Date(`${day}T12:00:00Z`)),
  }
}
