import { useQuery } from '@tanstack/react-query'
import { useEffect } from 'react'
import type { UseFormReturn } from 'react-hook-form'
import type { Curve } from '#shared/schemas/lab.ts'
import { columnQueries } from '#web/data/column/queries.ts'
import { lotQueries } from '#web/data/lot/queries.ts'
import type { Place } from './place-test.ts'
import type { TestForm } from './test-form.ts'
import { usualCurve } from './usual-curve.ts'

/** The top placed lift of a column, or its lowest planned one. */
function usualLift(place: Place, rows: readonly { lift: number; state: string }[]): number | undefined {
  const placed = rows.filter((row) => row.lift > 0 && row.state !== 'not-placed' && row.state !== 'none').map((row) => row.lift)
  return placed.length > 0 ? Math.max(...placed) : place.layers[0]?.lift
}

/**
 * Fills in what the place already says, while it is still open: the top placed lift, and the approved curve of the
 * material placed there.
 * @returns the version of the specification that the lot at the place froze, or null
 */
export function useSheetDefaults(siteId: string, form: UseFormReturn<TestForm>, place: Place | null, lift: number | null, curves: readonly Curve[]): number | null {
  const cell = place?.cell ?? -1
  const column = useQuery({ ...columnQueries.detail(siteId, cell), enabled: place !== null }).data
  const lots = useQuery({ ...lotQueries.list(siteId, { zoneId: place?.zone.id ?? '', lift: lift ?? 0 }), enabled: place !== null && lift !== null }).data
  const lot = lots?.find((each) => each.cells.includes(cell))
  const { setValue, getValues } = form

  useEffect(() => {
    if (place === null || column?.cell !== place.cell) return
    const chosen = getValues('lift')
    const usual = usualLift(place, column.rows)
    if (usual !== undefined && !place.layers.some((layer) => String(layer.lift) === chosen)) setValue('lift', String(usual))
  }, [place?.cell, column, getValues, setValue, place])

  useEffect(() => {
    if (getValues('curveId') !== '') return
    const usual = usualCurve(curves, lot?.materialId ?? null)
    if (usual !== undefined) setValue('curveId', usual.id)
  }, [lot, curves, getValues, setValue])

  return lot?.specificationVersion ?? null
}
