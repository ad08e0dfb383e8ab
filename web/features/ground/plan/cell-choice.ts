import type { AreaPick } from '#web/features/ground/board/board-types.ts'
import type { GroundPlan } from './ground-plan.ts'

/** Chosen cells after a pick on the map, lowest first. A single cell that is clicked goes in or out. */
export function pickCells(chosen: readonly number[], picked: readonly number[], how: AreaPick): number[] {
  const set = new Set(how === 'replace' && picked.length !== 1 ? [] : chosen)
  const toggles = how === 'toggle' || (how === 'replace' && picked.length === 1)
  for (const cell of picked) {
    if (toggles && set.has(cell)) set.delete(cell)
    else set.add(cell)
  }
  return [...set].sort((a, b) => a - b)
}

export function withoutCells(chosen: readonly number[], left: readonly number[]): number[] {
  const out = new Set(left)
  return chosen.filter((cell) => !out.has(cell))
}

/** The next cell of the site in a direction from a cell, over gaps of the boundary; the cell itself at the edge. */
export function moveCell(plan: GroundPlan, from: number | undefined, columns: number, rows: number): number | undefined {
  const place = from === undefined ? undefined : plan.lookup.addressOf(from)
  if (place === undefined) return plan.cells[0]?.cell
  const { grid } = plan.site
  let { column, row } = place
  for (;;) {
    column += columns
    row += rows
    if (column < 0 || row < 0 || column >= grid.columns || row >= grid.rows) return from
    const cell = plan.lookup.at(column, row)
    if (cell !== undefined) return cell
  }
}
