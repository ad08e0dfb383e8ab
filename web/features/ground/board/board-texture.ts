import { GROUND_FLAGS } from '#shared/domain/ground-state.ts'
import type { GroundSheet } from '#shared/ground-codec.ts'
import type { BoardCells } from './board-types.ts'

/**
 * One texel per place of the grid, four bytes:
 * R state, and in the high half the state before the running change;
 * G overlay bits of ground-state, then SELECTED_BIT and HIGHLIGHT_BIT;
 * B step edges, two bits a side in the order of EDGE_SIDES;
 * A slot of the running change (0 none), and above it the overlay bits before the change.
 */
export const TEXEL_BYTES = 4
/** Changes that can run at once; one more settles the oldest. */
export const CHANGE_SLOTS = 3
export const SELECTED_BIT = 64
export const HIGHLIGHT_BIT = 128
const OVERLAY_BITS = 63
/** Every overlay but near, which is a hatch of the ground itself. */
const MARK_BITS = OVERLAY_BITS & ~GROUND_FLAGS.near

/** Bit pair of a side: 0 level, 1 this cell stands higher, 2 this cell lies lower. */
export const EDGE_SIDES = [
  { side: 'top', column: 0, row: -1, shift: 0 },
  { side: 'right', column: 1, row: 0, shift: 2 },
  { side: 'bottom', column: 0, row: 1, shift: 4 },
  { side: 'left', column: -1, row: 0, shift: 6 },
] as const

/** Tops nearer than this, in tenths of a millimetre, are level: elevations are shown to 0.1 ft. */
const LEVEL_TOLERANCE = 300
const NOT_PLACED = 1

export interface TexelBox {
  readonly column: number
  readonly row: number
  readonly columns: number
  readonly rows: number
}

export interface BoardTexture {
  readonly columns: number
  readonly rows: number
  readonly bytes: Uint8Array
  /** writes the cells (all of them when left out) as the sheet has them; returns those that look different now */
  readonly write: (sheet: GroundSheet, slot: number, cells?: readonly number[]) => number[]
  /** forgets the look before the change of a slot */
  readonly settle: (slot: number) => void
  /** sets a bit on exactly these cells */
  readonly mark: (bit: typeof SELECTED_BIT | typeof HIGHLIGHT_BIT, cells: readonly number[]) => void
  /** how many cells carry an overlay that is drawn as a mark, and how many a selection or preview */
  readonly counts: () => { readonly marks: number; readonly regions: number }
  /** the texels written since the last call */
  readonly takeDirty: () => TexelBox | undefined
}

/** 1 when `own` stands higher than `other`, 2 when lower, 0 when level or both are bare ground. */
function stepBetween(sheet: GroundSheet, own: number, other: number): number {
  const bare = (cell: number): boolean => sheet.lift[cell]! <= 0 || sheet.state[cell]! <= NOT_PLACED
  const unplaced = (cell: number): boolean => sheet.state[cell] === NOT_PLACED
  if (bare(own) && bare(other)) return 0
  // the top of a layer that is only planned is not ground yet
  if (unplaced(own)) return 2
  if (unplaced(other)) return 1
  const rise = sheet.top[own]! - sheet.top[other]!
  if (Math.abs(rise) < LEVEL_TOLERANCE) return 0
  return rise > 0 ? 1 : 2
}

/** The texels of a site's sheet, kept in step with what is drawn. */
export function createBoardTexture(size: { readonly columns: number; readonly rows: number }, cells: BoardCells): BoardTexture {
  const { columns, rows } = size
  const bytes = new Uint8Array(columns * rows * TEXEL_BYTES)
  const cellAt = new Int32Array(columns * rows).fill(-1)
  const count = cells.column.length
  for (let cell = 0; cell < count; cell++) cellAt[cells.row[cell]! * columns + cells.column[cell]!] = cell
  const running: number[][] = Array.from({ length: CHANGE_SLOTS + 1 }, () => [])
  const marked = new Map<number, readonly number[]>()
  let marks = 0
  let dirty: { left: number; top: number; right: number; bottom: number } | undefined

  const placeOf = (cell: number): number => cells.row[cell]! * columns + cells.column[cell]!
  const neighbour = (cell: number, column: number, row: number): number => {
    const c = cells.column[cell]! + column
    const r = cells.row[cell]! + row
    return c < 0 || r < 0 || c >= columns || r >= rows ? -1 : cellAt[r * columns + c]!
  }
  const touch = (cell: number): void => {
    const column = cells.column[cell]!
    const row = cells.row[cell]!
    dirty ??= { left: column, top: row, right: column, bottom: row }
    dirty.left = Math.min(dirty.left, column)
    dirty.top = Math.min(dirty.top, row)
    dirty.right = Math.max(dirty.right, column)
    dirty.bottom = Math.max(dirty.bottom, row)
  }
  const writeEdges = (sheet: GroundSheet, cell: number): boolean => {
    let edges = 0
    for (const { column, row, shift } of EDGE_SIDES) {
      const other = neighbour(cell, column, row)
      if (other >= 0) edges |= stepBetween(sheet, cell, other) << shift
    }
    const at = placeOf(cell) * TEXEL_BYTES + 2
    if (bytes[at] === edges) return false
    bytes[at] = edges
    touch(cell)
    return true
  }
  const writeLook = (sheet: GroundSheet, cell: number, slot: number): boolean => {
    const at = placeOf(cell) * TEXEL_BYTES
    const before = bytes[at]! & 15
    const beforeFlags = bytes[at + 1]! & OVERLAY_BITS
    const state = sheet.state[cell]!
    const flags = sheet.flags[cell]! & OVERLAY_BITS
    if (before === state && beforeFlags === flags) return false
    marks += Number((flags & MARK_BITS) !== 0) - Number((beforeFlags & MARK_BITS) !== 0)
    bytes[at] = state | (before << 4)
    bytes[at + 1] = flags | (bytes[at + 1]! & ~OVERLAY_BITS)
    bytes[at + 3] = slot | (beforeFlags << 2)
    if (slot > 0) running[slot]!.push(cell)
    touch(cell)
    return true
  }

  return {
    columns,
    rows,
    bytes,
    write(sheet, slot, named) {
      const total = Math.min(count, sheet.state.length)
      const list = named?.filter((cell) => cell >= 0 && cell < total) ?? Array.from({ length: total }, (_, cell) => cell)
      const changed = list.filter((cell) => writeLook(sheet, cell, slot))
      for (const cell of list) {
        writeEdges(sheet, cell)
        if (named === undefined) continue
        for (const { column, row } of EDGE_SIDES) {
          const other = neighbour(cell, column, row)
          if (other >= 0 && other < total) writeEdges(sheet, other)
        }
      }
      return changed
    },
    settle(slot) {
      for (const cell of running[slot] ?? []) {
        const at = placeOf(cell) * TEXEL_BYTES + 3
        // a later change may have taken the cell over
        if ((bytes[at]! & 3) !== slot) continue
        bytes[at] = 0
        touch(cell)
      }
      running[slot] = []
    },
    mark(bit, named) {
      for (const cell of marked.get(bit) ?? []) {
        bytes[placeOf(cell) * TEXEL_BYTES + 1]! &= ~bit
        touch(cell)
      }
      const present = named.filter((cell) => cell >= 0 && cell < count)
      for (const cell of present) {
        bytes[placeOf(cell) * TEXEL_BYTES + 1]! |= bit
        touch(cell)
      }
      marked.set(bit, present)
    },
    counts: () => ({ marks, regions: (marked.get(SELECTED_BIT)?.length ?? 0) + (marked.get(HIGHLIGHT_BIT)?.length ?? 0) }),
    takeDirty() {
      if (dirty === undefined) return undefined
      const { left, top, right, bottom } = dirty
      dirty = undefined
      return { column: left, row: top, columns: right - left + 1, rows: bottom - top + 1 }
    },
  }
}
