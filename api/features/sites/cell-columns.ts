import { sha256 } from '#api/features/site-head/canonical-json.ts'
import type { CellGeometry } from '#shared/domain/site-geometry.ts'
import type { SiteCells } from '#shared/schemas/site.ts'

/** A site's cells stay one list as long as they are kept (site-plan.ts), so that their columns and hash are made once. */
const made = new WeakMap<readonly CellGeometry[], SiteCells>()

/** The static geometry of the cells by columns, with its hash. */
export function cellColumns(cells: readonly CellGeometry[]): SiteCells {
  const known = made.get(cells)
  if (known) return known
  const columns = {
    column: cells.map((cell) => cell.column),
    row: cells.map((cell) => cell.row),
    zone: cells.map((cell) => cell.zone),
    areaMm2: cells.map((cell) => cell.areaMm2),
    centroidU: cells.map((cell) => cell.centroid.u),
    centroidV: cells.map((cell) => cell.centroid.v),
    baseUm: cells.map((cell) => cell.baseUm),
    designUm: cells.map((cell) => cell.designUm),
  }
  const present = { hash: sha256(JSON.stringify(columns)), ...columns }
  made.set(cells, present)
  return present
}
