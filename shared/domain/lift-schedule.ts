import type { Layer, LiftPlan } from './site-geometry.ts'

export interface LiftOptions {
  /** a layer is never made thicker than this by joining a partial lift, µm; default 1.5 × the plan's thickness */
  readonly maxThicknessUm?: number
}

export type LiftPlanCheck = { readonly ok: true } | { readonly ok: false; readonly reason: string }

/**
 * Whether a plan can cut a zone's fill into lifts.
 * @param plan the zone's lift plan
 * @param minBaseUm lowest ground in the zone, µm
 * @param options thickness limit
 */
export function checkLiftPlan(plan: LiftPlan, minBaseUm: number, options: LiftOptions = {}): LiftPlanCheck {
  const refuse = (reason: string): LiftPlanCheck => ({ ok: false, reason })
  if (!Number.isSafeInteger(plan.thicknessUm) || plan.thicknessUm <= 0) return refuse('The lift thickness must be above zero.')
  if (options.maxThicknessUm !== undefined && options.maxThicknessUm < plan.thicknessUm) {
    return refuse('The greatest thickness allowed is less than the planned thickness of a lift.')
  }
  if (plan.kind === 'level' && plan.datumUm > minBaseUm) {
    return refuse('The datum of the level lifts stands above the lowest ground: set it at or below that ground.')
  }
  return { ok: true }
}

/** The plan's bands between two elevations, cut off at both, before any partial lift joins a neighbour. */
function plannedBands(plan: LiftPlan, baseUm: number, designUm: number): Layer[] {
  const { thicknessUm } = plan
  if (designUm <= baseUm) return []
  if (plan.kind === 'level' && baseUm < plan.datumUm) {
    throw new RangeError('Fill lies below the datum of the level lifts: check the plan with checkLiftPlan first')
  }
  const steps = Math.ceil((designUm - baseUm) / thicknessUm)
  const from =
    plan.kind === 'level' ? plan.datumUm : plan.kind === 'parallel-to-base' ? baseUm : designUm - steps * thicknessUm
  const bands: Layer[] = []
  for (let step = Math.floor((baseUm - from) / thicknessUm); from + step * thicknessUm < designUm; step++) {
    const bottomUm = Math.max(baseUm, from + step * thicknessUm)
    const topUm = Math.min(designUm, from + (step + 1) * thicknessUm)
    bands.push({ lift: step + 1, bottomUm, topUm })
  }
  return bands
}

/**
 * One layer over two that touch. It keeps the lift number of the thicker, of the upper where both are equal.
 */
function join(below: Layer, above: Layer): Layer {
  const lift = below.topUm - below.bottomUm > above.topUm - above.bottomUm ? below.lift : above.lift
  return { lift, bottomUm: below.bottomUm, topUm: above.topUm }
}

/**
 * The planned layers of one cell (domain section 4). Only the lowest and the highest band can be partial; one
 * under half a thickness joins its neighbour unless the layer would exceed the limit.
 * Level bands are numbered from the datum, so a cell's first layer may be lift 3; the other kinds from the
 * cell's base, lift 1 lowest.
 * @param plan the zone's lift plan; thickness a whole number of µm above 0
 * @param baseUm ground at the cell, µm, whole; not below the datum of a level plan
 * @param designUm design top of fill at the cell, µm, whole
 * @param options thickness limit; one below the plan's thickness counts as the thickness
 * @returns layers from the lowest up, without gaps or overlaps from base to design; none where design is not above base
 * @throws RangeError when the base lies below the datum of a level plan (checkLiftPlan says so before)
 */
export function cellLayers(plan: LiftPlan, baseUm: number, designUm: number, options: LiftOptions = {}): Layer[] {
  const limitUm = Math.max(plan.thicknessUm, options.maxThicknessUm ?? 1.5 * plan.thicknessUm)
  const layers = plannedBands(plan, baseUm, designUm)
  const thin = (layer: Layer) => 2 * (layer.topUm - layer.bottomUm) < plan.thicknessUm
  const [first, second] = layers
  if (first && second && thin(first) && second.topUm - first.bottomUm <= limitUm) layers.splice(0, 2, join(first, second))
  const last = layers.at(-1)
  const beforeLast = layers.at(-2)
  if (last && beforeLast && thin(last) && last.topUm - beforeLast.bottomUm <= limitUm) {
    layers.splice(-2, 2, join(beforeLast, last))
  }
  return layers
}

/**
 * The layer that holds an elevation. A boundary belongs to the lift below.
 * @param layers a cell's layers from the lowest up
 * @param elevationUm µm
 * @returns the layer, or undefined at or below the first one's bottom and above the last one's top
 */
export function layerAt(layers: readonly Layer[], elevationUm: number): Layer | undefined {
  return layers.find((layer) => elevationUm > layer.bottomUm && elevationUm <= layer.topUm)
}

/**
 * The lift number at an elevation.
 * @param layers a cell's layers from the lowest up
 * @param elevationUm µm
 * @returns the lift; 0 (the foundation) at or below the bottom of the fill; undefined above the planned fill or where there is none
 */
export function liftAtElevation(layers: readonly Layer[], elevationUm: number): number | undefined {
  const lowest = layers[0]
  if (lowest !== undefined && elevationUm <= lowest.bottomUm) return 0
  return layerAt(layers, elevationUm)?.lift
}

export type DepthWarning = 'short-of-layer' | 'into-layer-below'

/** What to tell the technician, for each warning of testLayer. */
export const DEPTH_WARNING_WORDS: Readonly<Record<DepthWarning, string>> = {
  'short-of-layer': 'The test does not reach the full depth of the layer.',
  'into-layer-below': 'The test passes into the layer below.',
}

export type TestLayerResult =
  | {
      readonly ok: true
      readonly lift: number
      /** undefined for the foundation, lift 0 */
      readonly layer: Layer | undefined
      readonly warnings: readonly DepthWarning[]
    }
  | { readonly ok: false; readonly reason: string }

/**
 * The layer a test belongs to: the one that holds its surface elevation minus half its depth (domain section 4).
 * @param layers a cell's layers from the lowest up
 * @param surfaceUm elevation of the surface the test was made from, µm
 * @param depthUm depth the test measures, µm, above 0
 * @param options toleranceUm: how far the depth may miss the layer's bottom without a warning, default 0
 * @returns lift and layer with warnings, or the reason why no layer holds it
 */
export function testLayer(
  layers: readonly Layer[],
  surfaceUm: number,
  depthUm: number,
  options: { readonly toleranceUm?: number } = {},
): TestLayerResult {
  if (!(depthUm > 0)) return { ok: false, reason: 'The depth of the test must be above zero.' }
  if (layers.length === 0) return { ok: false, reason: 'No fill is planned in this cell.' }
  const middleUm = surfaceUm - depthUm / 2
  const lift = liftAtElevation(layers, middleUm)
  if (lift === undefined) return { ok: false, reason: 'The test lies above the planned top of fill in this cell.' }
  const layer = layerAt(layers, middleUm)
  const toleranceUm = options.toleranceUm ?? 0
  const warnings: DepthWarning[] = []
  if (layer !== undefined) {
    const missUm = surfaceUm - depthUm - layer.bottomUm
    if (missUm > toleranceUm) warnings.push('short-of-layer')
    if (missUm < -toleranceUm) warnings.push('into-layer-below')
  }
  return { ok: true, lift, layer, warnings }
}

/**
 * The bands of the lift rail of a zone: every lift number any of its cells can carry, from the lowest up.
 * Thin bands at the ends are kept (a shallow cell may have only that one), so a band may hold no cell.
 * @param plan the zone's lift plan
 * @param minBaseUm lowest ground in the zone, µm
 * @param maxDesignUm highest design top in the zone, µm
 * @returns bands cut off at both elevations; none where the design is not above the base
 */
export function railBands(plan: LiftPlan, minBaseUm: number, maxDesignUm: number): Layer[] {
  return plannedBands(plan, minBaseUm, maxDesignUm)
}
