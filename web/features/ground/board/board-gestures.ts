import { MARGIN } from './board-camera.ts'
import type { BoardMap } from './board-map.ts'
import type { SheetPlace } from './board-projection.ts'
import type { AreaPick, BoardMode, GroundMapProps } from './board-types.ts'

/** A pointer that moved less is a click, CSS pixels. */
const CLICK_TOLERANCE = 4
const PAN_STEP = 80
const ZOOM_STEP = 0.5

export interface SheetArea {
  readonly from: SheetPlace
  readonly to: SheetPlace
}

export interface GestureOptions {
  readonly board: BoardMap
  readonly element: HTMLElement
  readonly mode: () => BoardMode
  readonly props: () => GroundMapProps
  /** the rectangle being drawn, undefined when there is none */
  readonly onArea: (area: SheetArea | undefined) => void
}

interface Start {
  readonly x: number
  readonly y: number
  readonly pointer: number
  readonly shift: boolean
  readonly area: boolean
}

/** The cells whose squares a rectangle of the sheet touches, lowest index first. */
export function cellsInArea(board: Pick<BoardMap, 'cellAt' | 'site'>, { from, to }: SheetArea): number[] {
  const { columns, rows } = board.site.grid
  const clamp = (value: number, most: number): number => Math.min(Math.max(Math.floor(value), 0), most - 1)
  const cells: number[] = []
  for (let row = clamp(Math.min(from.row, to.row), rows); row <= clamp(Math.max(from.row, to.row), rows); row++) {
    for (let column = clamp(Math.min(from.column, to.column), columns); column <= clamp(Math.max(from.column, to.column), columns); column++) {
      const cell = board.cellAt({ column, row })
      if (cell !== undefined) cells.push(cell)
    }
  }
  return cells
}

function click({ board, mode, props }: GestureOptions, x: number, y: number, shift: boolean): void {
  const given = props()
  const mark = mode() === 'select' && !shift ? board.markAt(x, y) : undefined
  if (mark !== undefined && given.onOpenTest !== undefined) return given.onOpenTest(mark.id)
  const cell = board.cellAt(board.placeAt(x, y))
  if (mode() === 'point' && !shift) return given.onPickPoint?.(board.siteAt(x, y), cell)
  if (cell === undefined) return
  if (mode() === 'area' || shift) return given.onPickArea?.([cell], shift ? 'toggle' : 'replace')
  given.onPickCell?.(cell)
}

/** Picks and drawn rectangles by mouse, pen and finger; panning and zooming stay the map's. Returns how to stop. */
export function attachGestures(options: GestureOptions): () => void {
  const { board, element, onArea } = options
  let start: Start | undefined
  const local = (event: MouseEvent): { x: number; y: number } => {
    const box = element.getBoundingClientRect()
    return { x: event.clientX - box.left, y: event.clientY - box.top }
  }
  const canvas = board.map.getCanvas()
  const areaOf = (from: Start, x: number, y: number): SheetArea => ({ from: board.placeAt(from.x, from.y), to: board.placeAt(x, y) })

  const handleDown = (event: PointerEvent): void => {
    if (event.target !== canvas || event.button !== 0) return
    if (!event.isPrimary) {
      // a second finger means the map, not a rectangle
      start = undefined
      return onArea(undefined)
    }
    const { x, y } = local(event)
    if (x < MARGIN || y < MARGIN) return
    start = { x, y, pointer: event.pointerId, shift: event.shiftKey, area: event.shiftKey || options.mode() === 'area' }
  }
  const handleMove = (event: PointerEvent): void => {
    const { x, y } = local(event)
    if (start === undefined || start.pointer !== event.pointerId) return
    if (start.area && Math.hypot(x - start.x, y - start.y) >= CLICK_TOLERANCE) onArea(areaOf(start, x, y))
  }
  const handleUp = (event: PointerEvent): void => {
    if (start === undefined || start.pointer !== event.pointerId) return
    const { x, y } = local(event)
    const from = start
    start = undefined
    onArea(undefined)
    if (Math.hypot(x - from.x, y - from.y) < CLICK_TOLERANCE) return click(options, x, y, from.shift)
    if (!from.area) return
    const how: AreaPick = from.shift ? 'add' : 'replace'
    const cells = cellsInArea(board, areaOf(from, x, y))
    if (cells.length > 0) options.props().onPickArea?.(cells, how)
  }
  const handleCancel = (): void => {
    start = undefined
    onArea(undefined)
  }
  /** The map must not pan while a rectangle is drawn; it listens below this element. */
  const keepFromMap = (event: Event): void => {
    if (start?.area === true && event.target === canvas) event.stopPropagation()
  }

  element.addEventListener('pointerdown', handleDown, true)
  window.addEventListener('pointermove', handleMove)
  window.addEventListener('pointerup', handleUp)
  window.addEventListener('pointercancel', handleCancel)
  element.addEventListener('mousedown', keepFromMap, true)
  element.addEventListener('touchstart', keepFromMap, true)
  return () => {
    element.removeEventListener('pointerdown', handleDown, true)
    window.removeEventListener('pointermove', handleMove)
    window.removeEventListener('pointerup', handleUp)
    window.removeEventListener('pointercancel', handleCancel)
    element.removeEventListener('mousedown', keepFromMap, true)
    element.removeEventListener('touchstart', keepFromMap, true)
  }
}

const ARROWS: Readonly<Record<string, readonly [right: number, down: number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
}

interface KeyPress {
  readonly key: string
  readonly shiftKey: boolean
  readonly ctrlKey: boolean
  readonly metaKey: boolean
  readonly altKey: boolean
}

/** What a key does on the map; true when it was used. Arrows move the cell, with shift the map; + − zoom, 0 fits. */
export function pressKey(board: BoardMap, event: KeyPress, onMoveCell: GroundMapProps['onMoveCell']): boolean {
  if (event.ctrlKey || event.metaKey || event.altKey) return false
  const arrow = ARROWS[event.key]
  if (arrow !== undefined) {
    if (event.shiftKey) board.map.panBy([arrow[0] * PAN_STEP, arrow[1] * PAN_STEP], { duration: 100 })
    else if (onMoveCell === undefined) return false
    else onMoveCell(arrow[0], arrow[1])
    return true
  }
  if (event.key === '+' || event.key === '=') board.map.easeTo({ zoom: board.map.getZoom() + ZOOM_STEP, duration: 100 })
  else if (event.key === '-' || event.key === '_') board.map.easeTo({ zoom: board.map.getZoom() - ZOOM_STEP, duration: 100 })
  else if (event.key === '0' || event.key === 'Home') board.fit()
  else return false
  return true
}
