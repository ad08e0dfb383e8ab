import { formatCellRange } from '#shared/domain/cell-range.ts'
import type { CellLookup } from '#shared/domain/cells.ts'
import { countOf } from './outcome-words.ts'

const MOST_PARTS = 3

/** Cells in words: "Cell N4", "Cells N4 to P6", "Cells N4 to P6, Q4"; of many scattered ones only how many. */
export function cellsWords(cells: readonly number[], lookup: CellLookup): string {
  const text = formatCellRange(cells.map((cell) => lookup.addressOf(cell)).filter((address) => address !== undefined))
  const parts = text.split(', ').map((part) => part.replace(':', ' to '))
  if (parts.length > MOST_PARTS) return countOf(cells.length, 'cell')
  return `${cells.length === 1 ? 'Cell' : 'Cells'} ${parts.join(', ')}`
}
