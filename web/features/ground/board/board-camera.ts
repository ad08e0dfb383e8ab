import type { Map as MapLibreMap } from 'maplibre-gl'
import { lonLatOf, type BoardProjection } from './board-projection.ts'
import type { BoardSite, GroundMapProps } from './board-types.ts'

/** Width of the sheet margins with the letters and numbers, CSS pixels. */
export const MARGIN = 30

/** Free of the plan when it is fitted: the margins, and below it the legend and the scale. */
const FIT_PADDING = { top: MARGIN + 32, right: 48, bottom: 84, left: MARGIN + 22 }
const TILE = 512

export interface BoardCamera {
  readonly center: [number, number]
  readonly zoom: number
  readonly bearing: number
}

/** The camera that shows the whole boundary, columns level, inside the padding. */
export function fitCamera(
  projection: BoardProjection,
  boundary: BoardSite['boundary'],
  size: { readonly width: number; readonly height: number },
  padding: GroundMapProps['fitPadding'] = {},
): BoardCamera {
  const free = { ...FIT_PADDING, ...padding }
  const places = boundary.map((point) => projection.siteToSheet(point))
  const columns = places.map((place) => place.column)
  const rows = places.map((place) => place.row)
  const [left, right] = [Math.min(...columns), Math.max(...columns)]
  const [top, bottom] = [Math.min(...rows), Math.max(...rows)]
  const at = projection.sheetToMercator
  const span = (a: { x: number; y: number }, b: { x: number; y: number }): number => Math.hypot(a.x - b.x, a.y - b.y)
  const middleRow = (top + bottom) / 2
  const middleColumn = (left + right) / 2
  const width = span(at(left, middleRow), at(right, middleRow))
  const height = span(at(middleColumn, top), at(middleColumn, bottom))
  const world = Math.min(
    Math.max(80, size.width - free.left - free.right) / width,
    Math.max(80, size.height - free.top - free.bottom) / height,
  )
  // the middle of the free area, not of the window, is where the plan's middle goes
  const right_ = (free.right - free.left) / 2 / world
  const down = (free.bottom - free.top) / 2 / world
  const turn = (projection.bearing * Math.PI) / 180
  const middle = at(middleColumn, middleRow)
  const center = lonLatOf({
    x: middle.x + right_ * Math.cos(turn) - down * Math.sin(turn),
    y: middle.y + right_ * Math.sin(turn) + down * Math.cos(turn),
  })
  return { center: [...center], zoom: Math.log2(world / TILE), bearing: projection.bearing }
}

/** Affine map from columns and rows of the sheet to CSS pixels, good to a fraction of a pixel. */
export interface SheetFrame {
  readonly x: number
  readonly y: number
  readonly columnX: number
  readonly columnY: number
  readonly rowX: number
  readonly rowY: number
}

/** The frame as the map shows it now, taken around the middle of the sheet. */
export function sheetFrame(map: MapLibreMap, projection: BoardProjection): SheetFrame {
  const { columns, rows } = projection.grid
  const pixel = (column: number, row: number): { x: number; y: number } => map.project([...projection.sheetToLonLat(column, row)])
  const left = pixel(0, rows / 2)
  const right = pixel(columns, rows / 2)
  const top = pixel(columns / 2, 0)
  const bottom = pixel(columns / 2, rows)
  const columnX = (right.x - left.x) / columns
  const columnY = (right.y - left.y) / columns
  const rowX = (bottom.x - top.x) / rows
  const rowY = (bottom.y - top.y) / rows
  return { x: left.x - (rowX * rows) / 2, y: left.y - (rowY * rows) / 2, columnX, columnY, rowX, rowY }
}

/** CSS pixel of a place in the sheet. */
export function framePoint(frame: SheetFrame, column: number, row: number): { x: number; y: number } {
  return { x: frame.x + frame.columnX * column + frame.rowX * row, y: frame.y + frame.columnY * column + frame.rowY * row }
}
