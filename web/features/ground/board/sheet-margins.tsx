import { useEffect, useRef } from 'react'
import { columnLetters } from '#shared/domain/cell-label.ts'
import { MARGIN, sheetFrame, type SheetFrame } from './board-camera.ts'
import type { BoardMap } from './board-map.ts'

export interface SheetMarginsProps {
  readonly board: BoardMap
  readonly selectedCell: number | undefined
}

const SVG = 'http://www.w3.org/2000/svg'
const STEPS = [1, 2, 5, 10, 20, 50, 100]

export interface MarginLabel {
  readonly index: number
  readonly at: number
}

/** Pixel of the first line, and pixels from one to the next. */
interface MarginScale {
  readonly origin: number
  readonly step: number
}

interface MarginRange extends MarginScale {
  readonly count: number
  readonly length: number
  readonly gap: number
  readonly selected: number | undefined
}

/** The labels that fit, in the middle of their cells: every 1st, 2nd, 5th … and always the selected one. */
export function marginLabels({ origin, step, count, length, gap, selected }: MarginRange): MarginLabel[] {
  if (!(step > 0)) return []
  const every = STEPS.find((candidate) => candidate * step >= gap) ?? STEPS.at(-1)!
  const at = (index: number): number => origin + (index + 0.5) * step
  const first = Math.max(0, Math.floor((MARGIN - origin) / step))
  const last = Math.min(count - 1, Math.ceil((length - origin) / step))
  const labels: MarginLabel[] = []
  for (let index = first; index <= last; index++) {
    const chosen = index === selected
    // counted from 1, so that thinned rows read 5, 10, 15
    const regular = (index + 1) % every === 0
    const crowded = selected !== undefined && !chosen && Math.abs(index - selected) * step < gap
    const inside = at(index) > MARGIN + 4 && at(index) < length - 4
    if (inside && (chosen || (regular && !crowded))) labels.push({ index, at: at(index) })
  }
  return labels
}

/** Where the column lines meet the upper margin: web maps shear a turned grid by up to a thousandth. */
function columnScale({ x, y, columnX, columnY, rowX, rowY }: SheetFrame): MarginScale {
  return { origin: x + (rowX * (MARGIN - y)) / rowY, step: columnX - (rowX * columnY) / rowY }
}

/** Where the row lines meet the left margin. */
function rowScale({ x, y, columnX, columnY, rowX, rowY }: SheetFrame): MarginScale {
  return { origin: y + (columnY * (MARGIN - x)) / columnX, step: rowY - (columnY * rowX) / columnX }
}

/** Sets the texts of a group, using again the elements that are there. */
function writeLabels(group: SVGGElement, labels: readonly MarginLabel[], side: 'top' | 'left', selected: number | undefined): void {
  while (group.childElementCount < labels.length) group.append(document.createElementNS(SVG, 'text'))
  while (group.childElementCount > labels.length) group.lastElementChild?.remove()
  labels.forEach(({ index, at }, place) => {
    const text = group.children[place]!
    const words = side === 'top' ? columnLetters(index) : String(index + 1)
    if (text.textContent !== words) text.textContent = words
    text.setAttribute('x', String(side === 'top' ? at : MARGIN / 2))
    text.setAttribute('y', String(side === 'top' ? 20 : at + 4))
    text.setAttribute('class', index === selected ? 'board-margin-chosen' : '')
  })
}

function ticks(range: MarginRange, side: 'top' | 'left'): string {
  const every = STEPS.find((candidate) => candidate * range.step >= 7) ?? STEPS.at(-1)!
  let path = ''
  for (let index = 0; index <= range.count; index += every) {
    const at = range.origin + index * range.step
    if (at < MARGIN || at > range.length) continue
    path += side === 'top' ? `M${at} ${MARGIN - 6}v6` : `M${MARGIN - 6} ${at}h6`
  }
  return path
}

/** Column letters above and row numbers at the left, moving with the map without a React render. */
export function SheetMargins({ board, selectedCell }: SheetMarginsProps) {
  const svg = useRef<SVGSVGElement>(null)
  useEffect(() => {
    const root = svg.current
    if (root === null) return
    const { map, projection, site } = board
    const [top, left] = Array.from(root.querySelectorAll('g'))
    const marks = root.querySelector<SVGPathElement>('.board-margin-ticks')
    const frameLine = root.querySelector<SVGPathElement>('.board-margin-line')
    const bands = root.querySelectorAll('rect')
    const column = selectedCell === undefined ? undefined : site.cells.column[selectedCell]
    const row = selectedCell === undefined ? undefined : site.cells.row[selectedCell]
    let drawn = ''
    const draw = (): void => {
      const frame = sheetFrame(map, projection)
      const { clientWidth: width, clientHeight: height } = map.getContainer()
      const key = `${Object.values(frame).join()} ${width} ${height}`
      if (key === drawn) return
      drawn = key
      const across: MarginRange = { ...columnScale(frame), count: site.grid.columns, length: width, gap: 20, selected: column }
      const down: MarginRange = { ...rowScale(frame), count: site.grid.rows, length: height, gap: 17, selected: row }
      if (top !== undefined) writeLabels(top, marginLabels(across), 'top', column)
      if (left !== undefined) writeLabels(left, marginLabels(down), 'left', row)
      marks?.setAttribute('d', ticks(across, 'top') + ticks(down, 'left'))
      frameLine?.setAttribute('d', `M${MARGIN} ${height}V${MARGIN}H${width}`)
      bands[0]?.setAttribute('width', String(width))
      bands[1]?.setAttribute('height', String(height))
    }
    draw()
    map.on('render', draw)
    map.on('resize', draw)
    return () => {
      map.off('render', draw)
      map.off('resize', draw)
    }
  }, [board, selectedCell])
  return (
    <svg ref={svg} className="board-margins" aria-hidden>
      <rect height={MARGIN} />
      <rect width={MARGIN} />
      <path className="board-margin-ticks" />
      <path className="board-margin-line" />
      <g />
      <g />
    </svg>
  )
}
