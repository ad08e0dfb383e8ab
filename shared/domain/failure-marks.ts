import { piecesOf, type PlacedCell } from './assign-lots.ts'
import type { GridPoint } from './site-geometry.ts'

export interface MarkableCell extends PlacedCell {
  readonly centroid: GridPoint
  /** placed volume of the cell in this lot, whole cm³ */
  readonly volumeCm3: number
}

export interface FailureInput {
  readonly failAt: GridPoint
  /** the cell the failing test lies in */
  readonly failCell: number
  /** where the lot's current passes lie, of any purpose */
  readonly passes: readonly GridPoint[]
  readonly lotCells: readonly MarkableCell[]
  /** volume one test may speak for, cm³ */
  readonly fCm3: number
}

/**
 * The ground a failing (or suspect) result marks (domain section 6): its own cell always; then every cell of its lot
 * connected to it through the lot, sides or corners touching, whose centroid is nearer to it than to any pass,
 * nearest first (equal distances: lower cell index), as long as the marked volume stays within f. A cell as near to
 * a pass as to the failure is not marked.
 * @returns cell indices, the own cell first
 */
export function markFailure({ failAt, failCell, passes, lotCells, fCm3 }: FailureInput): number[] {
  const own = lotCells.find((cell) => cell.cell === failCell)
  if (own === undefined) return [failCell]
  const piece = piecesOf(lotCells).find((cells) => cells.includes(own)) ?? [own]
  const nearest = piece
    .filter((cell) => cell !== own)
    .map((cell) => ({ cell, distance: squaredDistance(cell.centroid, failAt) }))
    .filter(({ cell, distance }) => passes.every((pass) => distance < squaredDistance(cell.centroid, pass)))
    .sort((a, b) => a.distance - b.distance || a.cell.cell - b.cell.cell)
  const marked = [failCell]
  let volume = own.volumeCm3
  for (const { cell } of nearest) {
    volume += cell.volumeCm3
    if (volume > fCm3) break
    marked.push(cell.cell)
  }
  return marked
}

/** Squared distance of two plan positions, mm². */
export function squaredDistance(a: GridPoint, b: GridPoint): number {
  return (a.u - b.u) ** 2 + (a.v - b.v) ** 2
}
