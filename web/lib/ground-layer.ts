import type { SitePoint } from '#shared/domain/site-geometry.ts'
import { applyPatch, type GroundCut, type GroundPatch, type GroundSheet } from '#shared/ground-codec.ts'

export const SURFACE: GroundCut = { kind: 'surface' }

/** One sheet of a site that is kept live, and how far it has come. */
export type GroundLayer = {
  readonly cut: GroundCut
  sheet: GroundSheet | undefined
  /** revision up to which nothing is missing */
  have: number
  /** the reading under way, at first or anew */
  reading: AbortController | null
  changedCells: readonly number[]
  from: SitePoint | null
  error: unknown
  /** how many look at it */
  shown: number
  cancelRetry: (() => void) | null
}

export function layerName(cut: GroundCut): string {
  return cut.kind === 'surface' ? 'surface' : String(cut.um)
}

export function newLayer(cut: GroundCut): GroundLayer {
  return { cut, sheet: undefined, have: 0, reading: null, changedCells: [], from: null, error: null, shown: 0, cancelRetry: null }
}

export function endReading(layer: GroundLayer): void {
  layer.reading?.abort()
  layer.reading = null
  layer.cancelRetry?.()
  layer.cancelRetry = null
}

/**
 * Applies the patches that follow the layer's revision without a gap.
 * @param patches in the order of their revisions
 * @returns the last patch that was applied, and whether a gap stands before the next
 */
export function advanceLayer(layer: GroundLayer, patches: readonly GroundPatch[]): { last: GroundPatch | null; gap: boolean } {
  const cells = new Set<number>()
  let from: SitePoint | null = null
  let last: GroundPatch | null = null
  let gap = false
  for (const patch of patches) {
    if (patch.revision <= layer.have || layer.sheet === undefined) continue
    gap = patch.base > layer.have
    if (gap) break
    const change = applyPatch(layer.sheet, patch)
    layer.sheet = change.sheet
    layer.have = patch.revision
    change.cells.forEach((cell) => cells.add(cell))
    from = patch.from ?? from
    last = patch
  }
  if (last !== null) Object.assign(layer, { changedCells: [...cells], from })
  return { last, gap }
}
