import { conflict } from '#api/errors.ts'
import { layerOf } from '#api/features/ground/site-plan.ts'
import type { PlanZone, SitePlan } from '#api/features/ground/site-plan.ts'
import { refusal } from '#api/http/refuse-input.ts'
import { cellRectangle, cellSideMm, locateGridPoint, siteToGrid } from '#shared/domain/grid.ts'
import { DEPTH_WARNING_WORDS, liftAtElevation, testLayer } from '#shared/domain/lift-schedule.ts'
import { distanceToEdge } from '#shared/domain/lot-edge.ts'
import { clipToRectangle, ringHolds } from '#shared/domain/plan-ring.ts'
import type { Reason } from '#shared/domain/result.ts'
import type { GridPoint, Layer, SitePoint } from '#shared/domain/site-geometry.ts'
import type { CreateTest } from '#shared/schemas/field-test.ts'

/** A point this near to the boundary counts as inside: it was read off the line. */
const ON_BOUNDARY_MM = 10
/** How far a rod or a hole may miss the layer's bottom before it is said (1 in). */
const DEPTH_TOLERANCE_UM = 25_400

export interface LocatedTest {
  readonly cell: number
  readonly zone: PlanZone
  readonly at: GridPoint
}

/** The site's boundary in grid axes. */
export function boundaryRing({ site }: SitePlan): GridPoint[] {
  return site.boundary.map((point) => siteToGrid(site.grid, point))
}

/** The part of a cell inside the boundary, in grid axes. */
export function cellOutline(plan: SitePlan, boundary: readonly GridPoint[], cell: number): GridPoint[] {
  const geometry = plan.cells[cell]
  return geometry ? clipToRectangle(boundary, cellRectangle(plan.site.grid, geometry)) : []
}

/** The cell and zone a point lies in, or undefined off the site and between its zones. */
export function locateTest(plan: SitePlan, point: SitePoint): LocatedTest | undefined {
  const { grid } = plan.site
  const at = siteToGrid(grid, point)
  const ring = boundaryRing(plan)
  const sides = ring.map((from, i) => [from, ring[(i + 1) % ring.length] ?? from] as const)
  if (!ringHolds(ring, at) && !(distanceToEdge(at, sides) <= ON_BOUNDARY_MM)) return undefined
  // a point read off the far edge of the sheet belongs to the last column or row
  const inset = { u: Math.min(Math.max(at.u, 0), grid.columns * cellSideMm(grid) - 1), v: Math.min(Math.max(at.v, 0), grid.rows * cellSideMm(grid) - 1) }
  const place = locateGridPoint(grid, inset)
  const cell = place && plan.lookup.at(place.column, place.row)
  const zone = cell === undefined ? undefined : plan.zoneOf(cell)
  return cell === undefined || !zone ? undefined : { cell, zone, at }
}

/** As locateTest; a point that lies nowhere is refused in plain words. */
export function placeTest(plan: SitePlan, { at, lift }: Pick<CreateTest, 'at' | 'lift'>): LocatedTest & { readonly layer: Layer } {
  const located = locateTest(plan, at)
  if (!located) {
    throw refusal([{ path: 'body.at', message: 'That place is outside every zone of this site. Check easting and northing.' }])
  }
  const layer = layerOf(plan, located.cell, lift)
  if (!layer) {
    const lifts = plan.layersOf(located.cell).map((other) => other.lift)
    const planned = lifts.length === 0 ? 'No fill is planned there' : `Its lifts are ${lifts[0]} to ${lifts.at(-1)}`
    throw refusal([{ path: 'body.lift', message: `Lift ${lift} is not planned in ${plan.label(located.cell)}. ${planned}. Choose another lift or place.` }])
  }
  return { ...located, layer }
}

/**
 * Compares the elevation with the lift that was chosen: where they disagree the person is asked first (409
 * lift_differs), and a confirmed lift is flagged. Where they agree, what the depth misses is flagged.
 */
export function checkLift(plan: SitePlan, cell: number, input: Pick<CreateTest, 'lift' | 'surfaceUm' | 'depthUm' | 'liftConfirmed'>): Reason[] {
  const { lift, surfaceUm, depthUm, liftConfirmed } = input
  if (surfaceUm === null) return []
  const layers = plan.layersOf(cell)
  const found = depthUm > 0 ? testLayer(layers, surfaceUm, depthUm, { toleranceUm: DEPTH_TOLERANCE_UM }) : null
  const computed = found === null ? (liftAtElevation(layers, surfaceUm) ?? null) : found.ok ? found.lift : null
  if (computed !== lift) {
    const where = computed === null ? 'above the planned top of fill' : computed === 0 ? 'in the foundation, below lift 1' : `in lift ${computed}`
    const message = `By its elevation the test lies ${where}, not in lift ${lift}.`
    if (!liftConfirmed) {
      throw conflict(`${message} Choose that lift, or confirm lift ${lift}; what you entered was kept.`, { lift: computed }, 'lift_differs')
    }
    return [{ code: 'lift-confirmed', message: `${message} Lift ${lift} was confirmed.` }]
  }
  const warnings = found?.ok ? found.warnings : []
  return warnings.map((code) => ({ code, message: DEPTH_WARNING_WORDS[code] }))
}
