import { In } from 'typeorm'
import type { EntityManager } from 'typeorm'
import { CellEntity } from '#api/entities/cell.entity.ts'
import type { SitePlan } from '#api/features/ground/site-plan.ts'
import { compassSide } from '#shared/domain/compass.ts'
import type { GridSide } from '#shared/domain/compass.ts'
import type { Order } from '#shared/schemas/rework.ts'

/** A fall of less than this beside the work is a lift's edge, not a hazard: 300 mm. Common practice; the site's safety plan decides. */
const HAZARD_UM = 300_000

const SIDES: readonly { readonly side: GridSide; readonly right: number; readonly down: number }[] = [
  { side: 'right', right: 1, down: 0 },
  { side: 'left', right: -1, down: 0 },
  { side: 'up', right: 0, down: -1 },
  { side: 'down', right: 0, down: 1 },
]

/** Sides of the cells where the working surface falls away. */
export async function loadOrderEdges(manager: EntityManager, plan: SitePlan, cells: readonly number[]): Promise<Order['edges']> {
  const own = new Set(cells)
  const around = [...own].flatMap((cell) => neighboursOf(plan, cell).map(({ neighbour }) => neighbour))
  const tops = await surfaceTops(manager, plan, [...new Set([...cells, ...around])])
  const edges = new Map<GridSide, { cells: number[]; dropUm: number }>()
  for (const cell of cells) {
    for (const { side, neighbour } of neighboursOf(plan, cell)) {
      const drop = (tops.get(cell) ?? 0) - (tops.get(neighbour) ?? 0)
      if (own.has(neighbour) || drop < HAZARD_UM) continue
      const edge = edges.get(side) ?? { cells: [], dropUm: 0 }
      edge.cells.push(cell)
      edges.set(side, { cells: edge.cells, dropUm: Math.max(edge.dropUm, drop) })
    }
  }
  return [...edges].map(([side, edge]) => ({ side: compassSide(side, plan.site.grid.rotationDeg), ...edge }))
}

function neighboursOf(plan: SitePlan, cell: number): { side: GridSide; neighbour: number }[] {
  const place = plan.lookup.addressOf(cell)
  if (!place) return []
  return SIDES.flatMap(({ side, right, down }) => {
    const neighbour = plan.lookup.at(place.column + right, place.row + down)
    return neighbour === undefined ? [] : [{ side, neighbour }]
  })
}

async function surfaceTops(manager: EntityManager, plan: SitePlan, cells: readonly number[]): Promise<Map<number, number>> {
  const rows = cells.length > 0 ? await manager.findBy(CellEntity, { siteId: plan.site.id, cell: In([...cells]) }) : []
  return new Map(
    rows.map((row) => [row.cell, plan.layersOf(row.cell).find((layer) => layer.lift === row.surfaceLift)?.topUm ?? row.baseUm]),
  )
}
