import { bench, describe } from 'vitest'
import { allocateShares } from '#shared/domain/allocation.ts'
import type { AllocationPoint, AllocationSlice } from '#shared/domain/allocation.ts'

const CELL_MM = 15_240
const fill = Array.from({ length: 2_000 }, (_, cell): AllocationSlice => ({ cell, slice: `p${cell % 40}`, placedAt: cell % 40, volumeCm3: 47_000_000 }))
const points = Array.from({ length: 100 }, (_, i): AllocationPoint => ({ testId: `t${i}`, at: { u: (i * 7_919) % 762_000, v: (i * 104_729) % 609_600 }, sampledAt: i % 45, outcome: 'pass' }))
const cellOf = (cell: number) => ({ centroid: { u: (cell % 50) * CELL_MM, v: Math.floor(cell / 50) * CELL_MM }, thicknessUm: 203_200 })

/** The floor: the distances of all pairs, sorted, which any nearest-first allocation has to know. */
function sortDistances(): number {
  const distances = new Float64Array(fill.length * points.length)
  let at = 0
  for (const { cell } of fill) {
    const { centroid } = cellOf(cell)
    for (const point of points) distances[at++] = (centroid.u - point.at.u) ** 2 + (centroid.v - point.at.v) ** 2
  }
  return distances.sort()[0] ?? 0
}

describe('2,000 slices among 100 tests', () => {
  bench('floor: sort every distance', () => void sortDistances())
  bench('allocateShares', () => void allocateShares({ slices: fill, points, frozen: [], fCm3: 800_000_000, cellOf }))
})
