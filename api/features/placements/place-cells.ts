import { conflict, invalid } from '#api/errors.ts'
import { layerOf } from '#api/features/ground/site-plan.ts'
import type { PlanZone, SitePlan } from '#api/features/ground/site-plan.ts'
import { formatCellRange } from '#shared/domain/cell-range.ts'
import type { CellGeometry, Layer } from '#shared/domain/site-geometry.ts'
import type { CreatePlacement } from '#shared/schemas/placement.ts'

export interface CellToPlace extends CellGeometry {
  readonly layer: Layer
  readonly quarters: number
}

/** Checks the cells of a placement one by one and takes off the quarters that already have this lift. */
export function placeCells(
  plan: SitePlan,
  zone: PlanZone,
  input: Pick<CreatePlacement, 'cells' | 'lift'>,
  placed: ReadonlyMap<number, number>,
): CellToPlace[] {
  const seen = new Set<number>()
  const outside: number[] = []
  const noLayer: number[] = []
  const already: number[] = []
  const cells: CellToPlace[] = []
  for (const { cell, quarters } of input.cells) {
    if (seen.has(cell)) continue
    seen.add(cell)
    const geometry = plan.cells[cell]
    if (!geometry || plan.zoneOf(cell)?.id !== zone.id) {
      outside.push(cell)
      continue
    }
    const layer = layerOf(plan, cell, input.lift)
    const fresh = quarters & ~(placed.get(cell) ?? 0)
    if (!layer) noLayer.push(cell)
    else if (fresh === 0) already.push(cell)
    else cells.push({ ...geometry, layer, quarters: fresh })
  }
  if (outside.length > 0) throw invalid(`${name(plan, outside)} does not lie in ${zone.name}. Leave it out and save again; what you entered was kept.`)
  if (noLayer.length > 0) {
    throw invalid(`Lift ${input.lift} is not planned in ${name(plan, noLayer)}: its fill starts higher or ends lower. What you entered was kept.`, { cells: noLayer })
  }
  if (already.length > 0) {
    throw conflict(`${name(plan, already)} is already placed at lift ${input.lift}. Leave it out and save again; what you entered was kept.`, { cells: already })
  }
  return cells
}

/** Cells as people write them; a cell that is none of the site's by its number. */
function name(plan: SitePlan, cells: readonly number[]): string {
  const known = cells.flatMap((cell) => plan.cells[cell] ?? [])
  return known.length > 0 ? formatCellRange(known) : 'A chosen cell'
}
