import { apportion } from './apportion.ts'
import type { Layer } from './site-geometry.ts'
import { compactedFromLoose, volumeOf } from './volume-state.ts'

/** All four quarters of a cell; bit 0 top left, 1 top right, 2 bottom left, 3 bottom right. */
export const WHOLE_CELL = 0b1111

/** A difference between the two volumes above this many percent is flagged (domain section 5). */
export const VOLUME_DIFFERENCE_LIMIT_PERCENT = 15

/** µm · mm² in a cm³ */
const UM_MM2_PER_CM3 = 1_000_000

/** Number of quarters a mask names, 0 to 4. */
export function quarterCount(quarters: number): number {
  return [1, 2, 4, 8].filter((bit) => (quarters & bit) !== 0).length
}

/**
 * Compacted volume of a layer in a cell, from geometry: area × thickness × quarters placed.
 * @param areaMm2 area of the cell cut by the boundary, mm²
 * @param thicknessUm compacted thickness, µm, 0 or more
 * @param quarters mask 1 to 15 of the quarters placed; a quarter of a cut cell counts as a quarter of its area
 * @returns cm³, rounded to a whole number
 */
export function layerVolumeCm3(areaMm2: number, thicknessUm: number, quarters: number = WHOLE_CELL): number {
  return Math.round((areaMm2 * thicknessUm * quarterCount(quarters)) / (4 * UM_MM2_PER_CM3))
}

/** Which volume drives the test frequency in a zone. */
export type VolumeDriver = 'geometry' | 'loads'

export interface PlacedCell {
  readonly areaMm2: number
  /** the layer as placed: compacted bottom and top */
  readonly layer: Pick<Layer, 'bottomUm' | 'topUm'>
  /** mask 1 to 15 of the quarters placed, WHOLE_CELL for all */
  readonly quarters: number
}

export interface PlacementVolumeInput {
  readonly cells: readonly PlacedCell[]
  /** number of loads counted, or undefined when none were entered */
  readonly loads: number | undefined
  /** loose volume of one load, cm³ */
  readonly loadVolumeCm3: number
  /** looseToCompactedFactor of the material */
  readonly looseToCompacted: number
}

export type PlacementVolumeResult =
  | {
      readonly ok: true
      /** compacted, whole cm³, from area and thickness */
      readonly geometryCm3: number
      /** compacted, whole cm³, from the loads; undefined without loads */
      readonly loadsCm3: number | undefined
      /** the one of the two that counts, whole cm³ */
      readonly drivingCm3: number
      /** which one that is: geometry where the zone asks for loads but none were entered */
      readonly drivenBy: VolumeDriver
      /** whole cm³ in the order of the cells, summing to drivingCm3 */
      readonly perCell: readonly number[]
      /** loads against geometry, percent of geometry, signed; undefined without loads */
      readonly differencePercent: number | undefined
      /** the difference is above VOLUME_DIFFERENCE_LIMIT_PERCENT */
      readonly flagged: boolean
    }
  | { readonly ok: false; readonly reason: string }

/**
 * Compacted volume of a placement, from geometry and from its loads, and each cell's share (domain section 5).
 * @param input cells with their placed layers, loads and the material's factor
 * @param drivenBy the zone's choice; without loads geometry counts
 * @returns both volumes, the one that counts, shares by largest remainder; or the reason why there is no volume
 */
export function placementVolume(input: PlacementVolumeInput, drivenBy: VolumeDriver): PlacementVolumeResult {
  if (input.cells.length === 0) return { ok: false, reason: 'No cells are chosen.' }
  const byGeometry = input.cells.map(({ areaMm2, layer, quarters }) =>
    layerVolumeCm3(areaMm2, layer.topUm - layer.bottomUm, quarters),
  )
  if (byGeometry.some((cm3) => !(cm3 > 0))) return { ok: false, reason: 'A cell of this placement has no thickness.' }
  if (input.loads !== undefined && !(input.loads > 0 && input.loadVolumeCm3 > 0 && input.looseToCompacted > 0)) {
    return { ok: false, reason: 'Loads, volume per load and the loose to compacted factor must be above zero.' }
  }
  const geometryCm3 = byGeometry.reduce((a, b) => a + b, 0)
  const loadsCm3 = input.loads === undefined ? undefined : loadsVolumeCm3(input, input.loads)
  const loadsDrive = drivenBy === 'loads' && loadsCm3 !== undefined
  const drivingCm3 = loadsDrive ? loadsCm3 : geometryCm3
  const differencePercent = loadsCm3 === undefined ? undefined : (100 * (loadsCm3 - geometryCm3)) / geometryCm3
  return {
    ok: true,
    geometryCm3,
    loadsCm3,
    drivingCm3,
    drivenBy: loadsDrive ? 'loads' : 'geometry',
    perCell: apportion(drivingCm3, byGeometry),
    differencePercent,
    flagged: differencePercent !== undefined && Math.abs(differencePercent) > VOLUME_DIFFERENCE_LIMIT_PERCENT,
  }
}

function loadsVolumeCm3(input: PlacementVolumeInput, loads: number): number {
  const loose = volumeOf('loose', loads * input.loadVolumeCm3)
  return Math.round(compactedFromLoose(loose, input.looseToCompacted).cm3)
}
