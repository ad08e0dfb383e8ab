import { compactedFromLoose, volumeOf } from '#shared/domain/volume-state.ts'
import type { Material } from '#shared/schemas/lab.ts'
import type { Placement } from '#shared/schemas/placement.ts'

/** Compacted volume of one load as hauled last, cm³; null where no load has been counted yet. */
export function lastLoadCm3(placements: readonly Placement[], materials: readonly Material[]): number | null {
  const hauled = placements
    .filter((placement) => placement.voided === null && placement.loadVolumeCm3 > 0 && placement.loads > 0)
    .toSorted((a, b) => Date.parse(b.happenedAt) - Date.parse(a.happenedAt))
  for (const placement of hauled) {
    const material = materials.find((each) => each.id === placement.materialId)
    if (material !== undefined) return compactedFromLoose(volumeOf('loose', placement.loadVolumeCm3), material.looseToCompacted).cm3
  }
  return null
}

/** Whole loads that a compacted volume takes; null where the load is not known. */
export function loadsFor(cm3: number, loadCm3: number | null): number | null {
  return loadCm3 === null || loadCm3 <= 0 ? null : Math.round(cm3 / loadCm3)
}
