import { refusal, refuseIf } from '#api/http/refuse-input.ts'
import { siteProblems, tooManyCells } from '#api/features/sites/site-problems.ts'
import type { InputIssue } from '#api/http/validate.ts'
import { cellLabel } from '#shared/domain/cell-label.ts'
import { buildCells } from '#shared/domain/cells.ts'
import { locateGridPoint, siteToGrid } from '#shared/domain/grid.ts'
import { cellLayers, checkLiftPlan } from '#shared/domain/lift-schedule.ts'
import { layerVolumeCm3 } from '#shared/domain/placement-volume.ts'
import type { CellGeometry, GridDefinition, GridPoint, Layer } from '#shared/domain/site-geometry.ts'
import { makeSurface } from '#shared/domain/surface.ts'
import { SITE_LIMITS } from '#shared/schemas/site.ts'
import type { CreateSite, ZoneInput } from '#shared/schemas/site.ts'

/** As many lifts as a zone may have (liftSchema). */
const MOST_LIFTS = 500

export interface LaidOutZone {
  readonly input: ZoneInput
  readonly minBaseUm: number
  readonly maxDesignUm: number
  /** all planned layers of its cells */
  readonly designCm3: number
}

export interface LaidOutSite {
  readonly cells: readonly CellGeometry[]
  readonly zones: readonly LaidOutZone[]
  /** planned layers of a cell, lowest first; empty outside every zone */
  readonly layers: readonly (readonly Layer[])[]
}

/** Cells, layers and design volumes of a site as entered; or 400 with all that is wrong, each at its part of the form. */
export function layOutSite(input: CreateSite): LaidOutSite {
  refuseIf(siteProblems(input))
  const cells = layOutCells(input)
  const zones = input.zones.map((zone, index) => ({ zone, own: cells.filter((cell) => cell.zone === index) }))
  refuseIf(zones.flatMap(({ zone, own }, index) => planProblems(zone, own, `body.zones.${index}`)))

  const layers = cells.map((cell) => {
    const plan = input.zones[cell.zone]?.liftPlan
    return plan ? cellLayers(plan, cell.baseUm, cell.designUm) : []
  })
  return {
    cells,
    layers,
    zones: zones.map(({ zone, own }) => ({ input: zone, ...extremes(own), designCm3: volumeOf(own, layers) })),
  }
}

type ElevationAt = (point: GridPoint) => number

/** The cells with their surfaces sampled; a surface that stops short of a cell is told with that cell's name. */
function layOutCells(input: CreateSite): CellGeometry[] {
  const gaps = new Map<string, InputIssue>()
  const ground = surfaceOf(input.grid, input.ground, 'body.ground', 'The ground surface', gaps)
  const designs = new Map<ZoneInput, ElevationAt>(
    input.zones.map((zone, i) => [zone, surfaceOf(input.grid, zone.design, `body.zones.${i}.design`, `The design surface of zone ${zone.name}`, gaps)]),
  )
  const cells = buildCells({
    grid: input.grid,
    boundary: input.boundary,
    zones: input.zones,
    baseAt: ground,
    designAt: (zone, point) => designs.get(zone)?.(point) ?? Number.NaN,
  })
  refuseIf([...gaps.values()])
  if (cells.length === 0) {
    throw refusal([{ path: 'body.grid', message: 'The grid has no cell inside the boundary. Check its origin, rotation and cell size.' }])
  }
  if (cells.length > SITE_LIMITS.cells) {
    throw refusal([{ path: 'body.grid', message: tooManyCells(cells.length.toLocaleString('en-US')) }])
  }
  return cells
}

function surfaceOf(grid: GridDefinition, surface: ZoneInput['design'], path: string, name: string, gaps: Map<string, InputIssue>): ElevationAt {
  if (surface.kind === 'level') return () => surface.elevationUm
  const made = makeSurface(surface.points.map((point) => ({ ...siteToGrid(grid, point), zUm: point.elevationUm })))
  if (!made.ok) throw refusal([{ path, message: `${name}: ${made.reason}` }])
  return (point) => {
    const found = made.surface.elevationAt(point)
    if (found.ok) return found.um
    const address = locateGridPoint(grid, point)
    if (!gaps.has(path)) {
      gaps.set(path, { path, message: `${name} does not reach ${address ? `cell ${cellLabel(address)}` : 'every cell'}. Add points around the site.` })
    }
    return 0
  }
}

function planProblems(zone: ZoneInput, own: readonly CellGeometry[], path: string): InputIssue[] {
  if (own.length === 0) {
    return [{ path: `${path}.ring`, message: `Zone ${zone.name} holds no cell: it is smaller than a cell, or a zone listed before it covers it.` }]
  }
  const { minBaseUm, maxDesignUm } = extremes(own)
  const check = checkLiftPlan(zone.liftPlan, minBaseUm)
  if (!check.ok) return [{ path: `${path}.liftPlan`, message: `Zone ${zone.name}: ${check.reason}` }]
  if (!own.some((cell) => cell.designUm > cell.baseUm)) {
    return [{ path: `${path}.design`, message: `Zone ${zone.name}: the design is nowhere above the ground, so there is nothing to fill.` }]
  }
  const fromUm = zone.liftPlan.kind === 'level' ? zone.liftPlan.datumUm : minBaseUm
  if ((maxDesignUm - fromUm) / zone.liftPlan.thicknessUm > MOST_LIFTS) {
    return [{ path: `${path}.liftPlan`, message: `Zone ${zone.name} would have more than ${MOST_LIFTS} lifts. Check the elevations and the lift thickness.` }]
  }
  return []
}

function extremes(cells: readonly CellGeometry[]): { minBaseUm: number; maxDesignUm: number } {
  return cells.reduce(
    ({ minBaseUm, maxDesignUm }, cell) => ({ minBaseUm: Math.min(minBaseUm, cell.baseUm), maxDesignUm: Math.max(maxDesignUm, cell.designUm) }),
    { minBaseUm: Infinity, maxDesignUm: -Infinity },
  )
}

function volumeOf(own: readonly CellGeometry[], layers: LaidOutSite['layers']): number {
  return own.reduce((sum, { cell, areaMm2 }) => (layers[cell] ?? []).reduce((part, layer) => part + layerVolumeCm3(areaMm2, layer.topUm - layer.bottomUm), sum), 0)
}
