import { formatCellRange } from '#shared/domain/cell-range.ts'
import type { CellLookup } from '#shared/domain/cells.ts'

/** Cells as a text that can be typed again: "G11:I13, K12". */
export function cellRange(lookup: CellLookup, cells: readonly number[]): string {
  return formatCellRange(cells.flatMap((cell) => lookup.addressOf(cell) ?? []))
}

/** The same, to be read: "G11 to I13, K12". */
export function cellRangeWords(lookup: CellLookup, cells: readonly number[]): string {
  return cellRange(lookup, cells).replaceAll(':', ' to ')
}
