import { cellLabel, columnLetters, parseCellLabel } from './cell-label.ts'
import type { CellAddress } from './grid.ts'
import type { GridDefinition } from './site-geometry.ts'

export type CellRangeResult =
  | { readonly ok: true; readonly cells: readonly CellAddress[] }
  | { readonly ok: false; readonly reason: string }

type SheetSize = Pick<GridDefinition, 'columns' | 'rows'>

/** The two corner labels of a part: "G11:I13", "G11 to I13", "G11-I13"; one label stands for both. */
function cornersOf(part: string): readonly string[] {
  return part.split(/\s*(?:[:\u2013-]|\bto\b)\s*/i)
}

function rowMajor(a: CellAddress, b: CellAddress): number {
  return a.row - b.row || a.column - b.column
}

/**
 * Cells named by a text such as "G11:I13, K12".
 * @param text labels and rectangles (two opposite corners joined by a colon, a dash or "to") between commas or semicolons
 * @param sheet number of columns and rows; a cell outside is refused
 * @returns the cells, each once, row by row from the top; or the reason, naming the part that cannot be read
 */
export function parseCellRange(text: string, sheet: SheetSize): CellRangeResult {
  const parts = text.split(/[,;\n]/).map((part) => part.trim()).filter((part) => part !== '')
  if (parts.length === 0) return { ok: false, reason: 'No cells are named. Write them like G11:I13, K12.' }
  const cells = new Map<number, CellAddress>()
  for (const part of parts) {
    const labels = cornersOf(part)
    const corners = labels.map(parseCellLabel)
    const [from, to = from] = corners
    if (from === undefined || to === undefined || corners.length > 2 || corners.includes(undefined)) {
      return { ok: false, reason: `"${part}" is not a cell or a range of cells. Write it like G11 or G11:I13.` }
    }
    for (const corner of [from, to]) {
      if (corner.column >= sheet.columns || corner.row >= sheet.rows) {
        const last = cellLabel({ column: sheet.columns - 1, row: sheet.rows - 1 })
        return { ok: false, reason: `"${part}": ${cellLabel(corner)} is outside the sheet, which ends at ${last}.` }
      }
    }
    for (let row = Math.min(from.row, to.row); row <= Math.max(from.row, to.row); row++) {
      for (let column = Math.min(from.column, to.column); column <= Math.max(from.column, to.column); column++) {
        cells.set(row * sheet.columns + column, { column, row })
      }
    }
  }
  return { ok: true, cells: [...cells.values()].sort(rowMajor) }
}

/**
 * The cells as a text that parseCellRange reads back, rectangles where they form one.
 * @param cells column and row from 0, any order; repeats count once
 * @returns such as "G11:I13, K12", rectangles in order of their top left cell; empty for no cells
 */
export function formatCellRange(cells: readonly CellAddress[]): string {
  const left = new Set(cells.map(cellLabel))
  const has = (column: number, row: number) => left.has(cellLabel({ column, row }))
  const parts: string[] = []
  for (const first of [...cells].sort(rowMajor)) {
    if (!has(first.column, first.row)) continue
    let lastColumn = first.column
    while (has(lastColumn + 1, first.row)) lastColumn++
    const wholeRow = (row: number) => {
      for (let column = first.column; column <= lastColumn; column++) if (!has(column, row)) return false
      return true
    }
    let lastRow = first.row
    while (wholeRow(lastRow + 1)) lastRow++
    for (let row = first.row; row <= lastRow; row++) {
      for (let column = first.column; column <= lastColumn; column++) left.delete(cellLabel({ column, row }))
    }
    const single = lastColumn === first.column && lastRow === first.row
    parts.push(single ? cellLabel(first) : `${cellLabel(first)}:${columnLetters(lastColumn)}${lastRow + 1}`)
  }
  return parts.join(', ')
}
