import { useEffect, useRef } from 'react'
import type { SitePoint } from '#shared/domain/site-geometry.ts'
import { framePoint, sheetFrame, type SheetFrame } from './board-camera.ts'
import type { SheetArea } from './board-gestures.ts'
import type { BoardMap } from './board-map.ts'

export interface BoardOverlayProps {
  readonly board: BoardMap
  readonly selectedCell: number | undefined
  readonly area: SheetArea | undefined
  readonly point: SitePoint | null
}

function rectanglePath(frame: SheetFrame, left: number, top: number, right: number, bottom: number, outward: number): string {
  const corner = (column: number, row: number, dx: number, dy: number): string => {
    const { x, y } = framePoint(frame, column, row)
    return `${x + dx * outward} ${y + dy * outward}`
  }
  return `M${corner(left, top, -1, -1)}L${corner(right, top, 1, -1)}L${corner(right, bottom, 1, 1)}L${corner(left, bottom, -1, 1)}Z`
}

/** What must answer at once and stay sharp: the selected cell, the rectangle being drawn, the picked place. */
export function BoardOverlay({ board, selectedCell, area, point }: BoardOverlayProps) {
  const svg = useRef<SVGSVGElement>(null)
  useEffect(() => {
    const { map, projection, site } = board
    const [casing, line, rectangle, crossCasing, cross] = Array.from(svg.current?.querySelectorAll('path') ?? [])
    const draw = (): void => {
      const frame = sheetFrame(map, projection)
      const column = selectedCell === undefined ? undefined : site.cells.column[selectedCell]
      const row = selectedCell === undefined ? undefined : site.cells.row[selectedCell]
      const cell = column === undefined || row === undefined ? '' : rectanglePath(frame, column, row, column + 1, row + 1, 1.5)
      casing?.setAttribute('d', cell)
      line?.setAttribute('d', cell)
      rectangle?.setAttribute(
        'd',
        area === undefined ? '' : rectanglePath(frame, area.from.column, area.from.row, area.to.column, area.to.row, 0),
      )
      const at = point === null ? undefined : map.project([...projection.siteToLonLat(point)])
      for (const path of [crossCasing, cross]) path?.setAttribute('d', at === undefined ? '' : `M${at.x - 9} ${at.y}h18M${at.x} ${at.y - 9}v18`)
    }
    draw()
    map.on('render', draw)
    return () => {
      map.off('render', draw)
    }
  }, [board, selectedCell, area, point])
  return (
    <svg ref={svg} className="board-overlay" aria-hidden>
      <path className="board-cell-casing" />
      <path className="board-cell-line" />
      <path className="board-area" />
      <path className="board-cross-casing" />
      <path className="board-cross" />
    </svg>
  )
}
